import { z } from 'zod';
import { versionEntry } from '~/features/versions/contract';
import { readVersion } from '~/features/versions/server';
import { Problem } from '~/server/problem';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'version.view',
    summary: 'A version with its manifest, byte for byte as it was hashed',
    answer: versionEntry.extend({ manifest: z.string() }),
  },
  ({ access, params }) => {
    if (!/^[1-9]\d{0,8}$/.test(params['number'] ?? '')) throw new Problem('UnknownVersion');
    return readVersion(access, Number(params['number']));
  },
);
