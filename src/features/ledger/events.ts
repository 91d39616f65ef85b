import { demand, may, openProject, type Access } from '~/server/access';
import { onEnding, subscribe, type DraftEvent } from '~/server/events';

/** Keeps proxies from closing a stream on which nothing happens. */
const HEARTBEAT_MS = 25_000;

export const EVENT_HEADERS = {
  'Content-Type': 'text/event-stream',
  'Cache-Control': 'no-cache, no-transform',
  'X-Accel-Buffering': 'no',
} as const;

/**
 * Server-sent events (HTML Living Standard §9.2): `open` with the revision at the start, then `change` for every
 * transaction. Who may not see the history is told that there is a change, not by whom.
 */
export function draftEvents(
  access: Access,
  signal: AbortSignal,
  stillSignedIn: () => Promise<boolean>,
): Response {
  demand(access, 'draft.view');
  const named = may(access, 'history.view');
  const { slug } = access.project;
  /** Who left the team or signed out hears no more. */
  const mayHear = async (): Promise<boolean> => {
    if (!(await stillSignedIn())) return false;
    const now = await openProject(access.actor, slug, 'draft.view').catch(() => null);
    return now !== null && may(now, 'history.view') === named;
  };
  const encoder = new TextEncoder();
  let end = () => {};
  let ended = false;
  const stream = new ReadableStream<Uint8Array>({
    start(controller) {
      const send = (text: string): void => {
        try {
          controller.enqueue(encoder.encode(text));
        } catch {
          end();
        }
      };
      const event = (name: string, data: object, id: number) =>
        send(`event: ${name}\nid: ${id}\ndata: ${JSON.stringify(data)}\n\n`);
      const { revision, id } = access.project;
      send('retry: 2000\n\n');
      event('open', { revision }, revision);
      const orEnd = async (work: () => void): Promise<void> => {
        const mayStill = !ended && (await mayHear().catch(() => false));
        if (ended) return;
        if (mayStill) work();
        else {
          end();
          controller.close();
        }
      };
      const unsubscribe = subscribe(id, (change: DraftEvent) => {
        void orEnd(() => event('change', named ? change : { revision: change.revision }, change.revision));
      });
      const heedEnding = onEnding(() => {
        end();
        controller.close();
      });
      const beat = setInterval(() => void orEnd(() => send(': \n\n')), HEARTBEAT_MS);
      end = () => {
        ended = true;
        unsubscribe();
        heedEnding();
        clearInterval(beat);
        signal.removeEventListener('abort', end);
      };
      signal.addEventListener('abort', end);
    },
    cancel: () => end(),
  });
  return new Response(stream, { headers: EVENT_HEADERS });
}
