import { rejectedRows } from '~/features/interchange/server';
import { projectRoute } from '~/server/route';
import { attachment } from '~/server/attachment';

export const GET = projectRoute(
  { action: 'import', summary: 'The rejected rows of an import, as CSV' },
  async ({ access, params }) => {
    const { name, csv } = await rejectedRows(access, params['id'] ?? '');
    return attachment(csv, 'text/csv; charset=utf-8', name);
  },
);
