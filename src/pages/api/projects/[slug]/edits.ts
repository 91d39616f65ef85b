import { batchAnswerOf, expectedRevision } from '~/features/ledger/answers';
import { batchAnswer, editBatch } from '~/features/ledger/contract';
import { EDIT_LIMIT_BYTES, withRevision } from '~/features/ledger/routes';
import { requestKey } from '~/features/ledger/repeats';
import { editDraft } from '~/features/ledger/server';
import { projectRoute } from '~/server/route';

export const POST = projectRoute(
  {
    action: 'ledger.edit',
    summary: 'Edit rows of any tables in one step',
    body: editBatch,
    answer: batchAnswer,
    edits: true,
    limitBytes: EDIT_LIMIT_BYTES,
  },
  async ({ access, request, body: { edits, label } }) => {
    const result = await editDraft(access, edits, {
      expected: expectedRevision(request),
      action: 'edit',
      label,
      key: requestKey(request),
    });
    return withRevision(await batchAnswerOf(access, result), result);
  },
);
