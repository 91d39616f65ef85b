import { me, signIn } from '~/features/accounts/contract';
import { signInByPassword } from '~/features/accounts/server';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  { action: 'public', summary: 'Sign in', body: signIn, answer: me, form: ({ next }) => paths.signIn(next) },
  async ({ context, body, posted }) => {
    const account = await signInByPassword(context, body);
    return posted ? onward(body.next, paths.projects) : account;
  },
);
