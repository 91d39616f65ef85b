import { resetRequest } from '~/features/accounts/contract';
import { requestReset } from '~/features/accounts/reset';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  {
    action: 'public',
    summary: 'Ask for a mail with a link to set a new password',
    body: resetRequest,
    status: 202,
    form: () => paths.forgotten,
  },
  async ({ context, body, posted }) => {
    await requestReset(context, body.email);
    return posted ? onward(undefined, `${paths.forgotten}?sent=1`) : {};
  },
);
