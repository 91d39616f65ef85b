import { demand, may, type Access } from '~/server/access';
import { subscribe, type DraftEvent } from '~/server/events';

/** Keeps proxies from closing a stream on which nothing happens. */
const HEARTBEAT_MS = 25_000;

/**
 * Server-sent events (HTML Living Standard §9.2): `open` with the revision at the start, then `change` for every
 * transaction. Who may not see the history is told that there is a change, not by whom.
 */
export function draftEvents(access: Access, signal: AbortSignal): Response {
  demand(access, 'draft.view');
  const named = may(access, 'history.view');
  const encoder = new TextEncoder();
  let end = () => {};
  const stream = new ReadableStream<Uint8Array>({
    start(controller) {
      const send = (text: string) => controller.enqueue(encoder.encode(text));
      const event = (name: string, data: object, id: number) =>
        send(`event: ${name}\nid: ${id}\ndata: ${JSON.stringify(data)}\n\n`);
      const { revision, id } = access.project;
      send('retry: 2000\n\n');
      event('open', { revision }, revision);
      const unsubscribe = subscribe(id, (change: DraftEvent) =>
        event('change', named ? change : { revision: change.revision }, change.revision),
      );
      const beat = setInterval(() => send(': \n\n'), HEARTBEAT_MS);
      end = () => {
        unsubscribe();
        clearInterval(beat);
        signal.removeEventListener('abort', end);
      };
      signal.addEventListener('abort', end);
    },
    cancel: () => end(),
  });
  const headers = {
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-cache, no-transform',
    'X-Accel-Buffering': 'no',
  };
  return new Response(stream, { headers });
}
