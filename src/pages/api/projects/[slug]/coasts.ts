import { cutCoasts } from '~/features/interchange/coasts';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  {
    action: 'ledger.edit',
    summary: 'Cut the present coastline by the outlines, for a project on the real Earth',
  },
  ({ access, request }) => cutCoasts(access, '*', request.signal),
);
