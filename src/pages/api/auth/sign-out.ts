import { endSession } from '~/features/accounts/session';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  { action: 'public', summary: 'End this session', status: 204, form: () => paths.home },
  async ({ context, posted }) => {
    await endSession(context);
    return posted ? onward(undefined, paths.home) : undefined;
  },
);
