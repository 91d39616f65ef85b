import { reset } from '~/features/accounts/contract';
import { resetPassword } from '~/features/accounts/reset';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  {
    action: 'public',
    summary: 'Set a new password with the token of the mail',
    body: reset,
    status: 204,
    form: ({ token }) => (token ? paths.reset(token) : paths.forgotten),
  },
  async ({ context, body, posted }) => {
    await resetPassword(context, body.token, body.password);
    return posted ? onward(undefined, `${paths.signIn()}?notice=password-set`) : undefined;
  },
);
