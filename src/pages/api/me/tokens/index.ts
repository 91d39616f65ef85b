import { createdToken, createToken, tokens } from '~/features/accounts/contract';
import { listTokens, makeToken, revokeTokens } from '~/features/accounts/tokens';
import { route } from '~/server/route';

export const GET = route(
  { action: 'account.manage', summary: 'My API tokens', answer: tokens },
  async ({ actor }) => ({ items: await listTokens(actor) }),
);

export const POST = route(
  {
    action: 'account.manage',
    summary: 'Make an API token; the answer is the only place that shows it',
    body: createToken,
    answer: createdToken,
    status: 201,
  },
  ({ actor, body }) => makeToken(actor, body),
);

export const DELETE = route(
  { action: 'account.manage', summary: 'Revoke all my API tokens', status: 204 },
  ({ actor }) => revokeTokens(actor).then(() => undefined),
);
