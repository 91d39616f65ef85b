import { releaseVersion, versionEntry, versions } from '~/features/versions/contract';
import { listVersions, release } from '~/features/versions/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  { action: 'version.view', summary: 'The released versions, newest first', answer: versions },
  async ({ access }) => ({ items: await listVersions(access) }),
);

export const POST = projectRoute(
  {
    action: 'version.release',
    summary: 'Release the draft as the next version',
    body: releaseVersion,
    answer: versionEntry,
    status: 201,
  },
  ({ access, body }) => release(access, body),
);
