import { z } from 'zod';
import { EXPORT_NAMES, type ExportName } from '~/features/interchange/files';
import { exportFile } from '~/features/interchange/server';
import { loadState } from '~/features/ledger/state';
import { isShared } from '~/features/ledger/state-answer';
import { attachment } from '~/server/attachment';
import { immutable } from '~/server/etag';
import { Problem } from '~/server/problem';
import { queryVersion } from '~/server/queries';
import { projectRoute } from '~/server/route';

const isExport = (name: string): name is ExportName => EXPORT_NAMES.some((known) => known === name);

export const GET = projectRoute(
  {
    action: 'export',
    summary: 'One of the project’s own files, for a version',
    query: z.object({ version: queryVersion }),
    streams: ['text/csv', 'application/geo+json'],
  },
  async ({ access, params, query }) => {
    const name = params['name'] ?? '';
    if (!isExport(name)) throw new Problem('NotFound', { detail: `Files are ${EXPORT_NAMES.join(', ')}.` });
    const state = await loadState(access, query.version);
    const { type, body } = await exportFile(state, name);
    const asked = typeof query.version === 'number';
    const lasting: Record<string, string> = asked ? { 'Cache-Control': immutable(isShared(access)) } : {};
    return attachment(body, type, name, lasting);
  },
);
