import { me, patchMe } from '~/features/accounts/contract';
import { changeMe } from '~/features/accounts/server';
import { route } from '~/server/route';

export const GET = route(
  { action: 'account.view', summary: 'Who am I', answer: me },
  ({ actor }) => actor.user!,
);

export const PATCH = route(
  { action: 'account.manage', summary: 'Change name or password', body: patchMe, answer: me },
  ({ actor, context, body }) => changeMe(actor, context.locals.session?.id ?? null, body),
);
