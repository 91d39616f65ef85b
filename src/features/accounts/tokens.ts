import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { database } from '~/db/client';
import { apiToken } from '~/db/schema';
import type { Actor } from '~/server/actor';
import { requireSite } from '~/server/policy';
import { Problem } from '~/server/problem';
import { newSecret, sha256 } from '~/server/secrets';
import type { createdToken, createToken, TokenEntry } from './contract';

const asEntry = (row: typeof apiToken.$inferSelect): TokenEntry => ({
  id: row.id,
  name: row.name,
  scope: row.scope,
  created_at: row.created_at.toISOString(),
  expires_at: row.expires_at.toISOString(),
  last_used_at: row.last_used_at?.toISOString() ?? null,
});

export async function listTokens(actor: Actor): Promise<TokenEntry[]> {
  requireSite(actor, 'account.manage');
  const rows = await database()
    .select()
    .from(apiToken)
    .where(eq(apiToken.user_id, actor.user!.id))
    .orderBy(apiToken.created_at);
  return rows.map(asEntry);
}

/** The token is in this answer and nowhere else. */
export async function makeToken(
  actor: Actor,
  body: z.output<typeof createToken>,
): Promise<z.infer<typeof createdToken>> {
  requireSite(actor, 'account.manage');
  const token = `dw_${newSecret()}`;
  const expires_at = new Date(Date.now() + body.expires_in_days * 86_400_000);
  const { name, scope } = body;
  const [row] = await database()
    .insert(apiToken)
    .values({ user_id: actor.user!.id, name, scope, expires_at, hash: sha256(token) })
    .returning();
  return { ...asEntry(row!), token };
}

/** @throws Problem `NotFound` for a token of someone else */
export async function revokeToken(actor: Actor, id: string): Promise<void> {
  requireSite(actor, 'account.manage');
  const gone = await database()
    .delete(apiToken)
    .where(and(eq(apiToken.id, id), eq(apiToken.user_id, actor.user!.id)))
    .returning({ id: apiToken.id });
  if (gone.length === 0) throw new Problem('NotFound');
}

export async function revokeTokens(actor: Actor): Promise<void> {
  requireSite(actor, 'account.manage');
  await database().delete(apiToken).where(eq(apiToken.user_id, actor.user!.id));
}
