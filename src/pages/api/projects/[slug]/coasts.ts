import { cutCoasts } from '~/features/interchange/coasts';
import { optionalRevision } from '~/features/ledger/answers';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  {
    action: 'ledger.edit',
    summary: 'Cut the present coastline by the outlines, for a project on the real Earth',
    edits: 'optional',
  },
  ({ access, request }) => cutCoasts(access, optionalRevision(request), request.signal),
);
