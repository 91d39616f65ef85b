import { demoSignIn, me } from '~/features/accounts/contract';
import { signInToDemo } from '~/features/accounts/server';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  {
    action: 'public',
    summary: 'Sign in as one of the demo’s people, while the demo is on',
    body: demoSignIn,
    answer: me,
    form: ({ next }) => paths.signIn(next),
  },
  async ({ context, body, posted }) => {
    const account = await signInToDemo(context, body.role);
    return posted ? onward(body.next, paths.projects) : account;
  },
);
