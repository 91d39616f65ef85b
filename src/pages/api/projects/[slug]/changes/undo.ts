import { batchAnswerOf, optionalRevision } from '~/features/ledger/answers';
import { batchAnswer } from '~/features/ledger/contract';
import { withRevision } from '~/features/ledger/routes';
import { undo } from '~/features/ledger/undo';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  { action: 'ledger.edit', summary: 'Take back my last step', answer: batchAnswer, edits: 'optional' },
  async ({ access, request }) => {
    const result = await undo(access, optionalRevision(request));
    return withRevision(await batchAnswerOf(access, result), result);
  },
);
