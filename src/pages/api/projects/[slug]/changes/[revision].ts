import { changeEntry } from '~/features/ledger/contract';
import { readChange } from '~/features/ledger/history';
import { Problem } from '~/server/problem';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'history.view',
    summary: 'One step of the change log with its rows before and after',
    answer: changeEntry,
  },
  ({ access, params }) => {
    if (!/^[1-9]\d{0,8}$/.test(params['revision'] ?? '')) throw new Problem('NotFound');
    return readChange(access, Number(params['revision']));
  },
);
