import { outbox } from '~/features/accounts/contract';
import { listOutbox } from '~/features/accounts/server';
import { route } from '~/server/route';

export const GET = route(
  { action: 'admin.outbox', summary: 'The mails written last', answer: outbox },
  async ({ actor }) => ({ items: await listOutbox(actor) }),
);
