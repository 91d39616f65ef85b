import { revokeSession } from '~/features/accounts/session';
import { route } from '~/server/route';

export const DELETE = route(
  { action: 'account.manage', summary: 'End one of my sessions', status: 204 },
  ({ actor, params }) => revokeSession(actor, params['id']!).then(() => undefined),
);
