import { revokeToken } from '~/features/accounts/tokens';
import { route } from '~/server/route';

export const DELETE = route(
  { action: 'account.manage', summary: 'Revoke one of my API tokens', status: 204 },
  ({ actor, params }) => revokeToken(actor, params['id']!).then(() => undefined),
);
