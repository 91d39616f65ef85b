import { me, signUp } from '~/features/accounts/contract';
import { createAccount } from '~/features/accounts/server';
import { paths } from '~/paths';
import { onward, route } from '~/server/route';

export const POST = route(
  {
    action: 'public',
    summary: 'Make an account and sign in',
    body: signUp,
    answer: me,
    status: 201,
    form: () => paths.signUp,
  },
  async ({ context, body, posted }) => {
    const account = await createAccount(context, body);
    return posted ? onward(body.next, paths.projects) : account;
  },
);
