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
    const number = Number(params['number']);
    if (!Number.isSafeInteger(number)) throw new Problem('UnknownVersion');
    return readVersion(access, number);
  },
);
