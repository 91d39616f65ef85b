import { jobEvents } from '~/features/jobs/events';
import { EVENT_HEADERS } from '~/features/ledger/events';
import { route } from '~/server/route';

export const GET = route(
  {
    action: 'job.own',
    summary: 'One of my jobs as server-sent events, to its end',
    streams: 'text/event-stream',
  },
  ({ actor, params, request }) =>
    request.method === 'HEAD'
      ? new Response(null, { headers: EVENT_HEADERS })
      : jobEvents(actor, params['id']!, request.signal),
);
