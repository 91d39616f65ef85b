import { z } from 'zod';
import { changeList } from '~/features/ledger/contract';
import { listChanges } from '~/features/ledger/history';
import { queryPage } from '~/server/queries';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'history.view',
    summary: 'The change log, newest first',
    query: z.object(queryPage),
    answer: changeList,
  },
  async ({ access, query: { limit, cursor } }) => ({
    ...(await listChanges(access, limit, cursor)),
    revision: access.project.revision,
  }),
);
