import { importedFile } from '~/features/interchange/server';
import { projectRoute } from '~/server/route';
import { attachment } from '~/server/attachment';

export const GET = projectRoute(
  { action: 'import', summary: 'An imported file as it came' },
  async ({ access, params }) => {
    const { name, content } = await importedFile(access, params['id'] ?? '');
    return attachment(content, 'application/octet-stream', name);
  },
);
