import { batchAnswerOf, optionalRevision } from '~/features/ledger/answers';
import { batchAnswer } from '~/features/ledger/contract';
import { withRevision } from '~/features/ledger/routes';
import { redo } from '~/features/ledger/undo';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  {
    action: 'ledger.edit',
    summary: 'Do again what I took back last',
    answer: batchAnswer,
    edits: 'optional',
  },
  async ({ access, request }) => {
    const result = await redo(access, optionalRevision(request));
    return withRevision(await batchAnswerOf(access, result), result);
  },
);
