import { EVENT_HEADERS } from '~/features/ledger/events';
import type { Actor } from '~/server/actor';
import { onEnding } from '~/server/events';
import { onJob, readJob } from './server';

/** Not more often than this, milliseconds: progress is for people. */
const TELL_MS = 200;

/** A job as server-sent `job` events, from how it stands now to its end. @throws Problem `NotFound` */
export async function jobEvents(actor: Actor, id: string, signal: AbortSignal): Promise<Response> {
  await readJob(actor, id);
  const encoder = new TextEncoder();
  let end = () => {};
  const stream = new ReadableStream<Uint8Array>({
    start(controller) {
      let timer: NodeJS.Timeout | undefined;
      let ended = false;
      const tell = async (): Promise<void> => {
        timer = undefined;
        const now = await readJob(actor, id).catch(() => null);
        if (ended) return;
        if (now) controller.enqueue(encoder.encode(`event: job\ndata: ${JSON.stringify(now)}\n\n`));
        if (now && (now.state === 'queued' || now.state === 'running')) return;
        end();
        controller.close();
      };
      const soon = (): void => {
        timer ??= setTimeout(() => void tell(), TELL_MS);
      };
      const offJob = onJob(id, soon);
      const offEnding = onEnding(() => {
        end();
        controller.close();
      });
      end = () => {
        ended = true;
        clearTimeout(timer);
        offJob();
        offEnding();
        signal.removeEventListener('abort', end);
      };
      signal.addEventListener('abort', end);
      void tell();
    },
    cancel: () => end(),
  });
  return new Response(stream, { headers: EVENT_HEADERS });
}
