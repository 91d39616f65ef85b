import { database } from '~/db/client';
import { sessions } from '~/features/accounts/contract';
import { listSessions, revokeSessions } from '~/features/accounts/session';
import { route } from '~/server/route';

export const GET = route(
  { action: 'account.manage', summary: 'Where I am signed in', answer: sessions },
  async ({ actor, context }) => ({ items: await listSessions(actor, context.locals.session?.id ?? null) }),
);

export const DELETE = route(
  { action: 'account.manage', summary: 'End all my other sessions', status: 204 },
  ({ actor, context }) =>
    revokeSessions(database(), actor.user!.id, context.locals.session?.id ?? null).then(() => undefined),
);
