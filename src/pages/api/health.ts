import { sql } from 'drizzle-orm';
import { z } from 'zod';
import { database } from '~/db/client';
import { json, route } from '~/server/route';

const answer = z.object({ status: z.literal('ok'), database: z.literal('ok') });

export const GET = route(
  { action: 'public', summary: 'Whether the server and its database answer', answer },
  async () => {
    await database().execute(sql`select 1`);
    return json({ status: 'ok', database: 'ok' }, 200, { 'Cache-Control': 'no-store' });
  },
);
