import { stillSignedIn } from '~/features/accounts/session';
import { draftEvents, EVENT_HEADERS } from '~/features/ledger/events';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'draft.view',
    summary: 'Changes of the draft as server-sent events',
    streams: 'text/event-stream',
  },
  ({ access, request, context }) =>
    request.method === 'HEAD'
      ? new Response(null, { headers: EVENT_HEADERS })
      : draftEvents(access, request.signal, () => stillSignedIn(context.locals.session?.id ?? null)),
);
