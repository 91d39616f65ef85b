import { rejectedRows } from '~/features/interchange/server';
import { projectRoute } from '~/server/route';
import { attachment } from '~/server/attachment';

export const GET = projectRoute(
  { action: 'import', summary: 'The rejected rows of an import, as a file to mend and import again' },
  async ({ access, params }) => {
    const { name, type, text } = await rejectedRows(access, params['id'] ?? '');
    return attachment(text, type, name);
  },
);
