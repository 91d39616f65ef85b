import { batchAnswerOf } from '~/features/ledger/answers';
import { batchAnswer } from '~/features/ledger/contract';
import { withRevision } from '~/features/ledger/routes';
import { undo } from '~/features/ledger/undo';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  { action: 'ledger.edit', summary: 'Take back my last step', answer: batchAnswer },
  async ({ access }) => {
    const result = await undo(access);
    return withRevision(await batchAnswerOf(access, result), result);
  },
);
