import type { APIContext } from 'astro';
import { and, desc, eq, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { database } from '~/db/client';
import { mailOutbox, user } from '~/db/schema';
import type { Actor } from '~/server/actor';
import { settings } from '~/server/env';
import { requireSite } from '~/server/policy';
import { Problem } from '~/server/problem';
import { countTry, giveBack } from '~/server/rate-limit';
import type { DemoRole, Me, OutboxMail, patchMe, signIn, signUp } from './contract';
import { hashPassword, passwordMatches } from './password';
import { demoPerson } from './people';
import { revokeSessions, startSession } from './session';

export const byEmail = (email: string) => sql`lower(${user.email}) = lower(${email})`;

const asMe = ({ id, name, email, site_role, is_demo }: typeof user.$inferSelect): Me => ({
  id,
  name,
  email,
  site_role,
  is_demo,
});

/** @throws Problem `EmailTaken` or `TooManyRequests` */
export async function createAccount(context: APIContext, body: z.output<typeof signUp>): Promise<Me> {
  await countTry('sign-up by address', context.clientAddress);
  const { name, email } = body;
  const password_hash = await hashPassword(body.password);
  const [created] = await database().insert(user).values({ name, email, password_hash }).returning();
  await startSession(context, created!.id);
  return asMe(created!);
}

/** Failures count against the address and against the account; a right answer is given back. */
export async function signInByPassword(context: APIContext, body: z.output<typeof signIn>): Promise<Me> {
  const address = context.clientAddress;
  const account = body.email.toLowerCase();
  const tries = [
    ['sign-in by address', address],
    ['sign-in by account and address', `${account} ${address}`],
    ['sign-in by account', account],
  ] as const;
  for (const [limit, key] of tries) await countTry(limit, key);
  const [found] = await database().select().from(user).where(byEmail(account));
  if (!(await passwordMatches(found?.password_hash, body.password)) || !found) {
    throw new Problem('WrongCredentials', { detail: 'Try again, or set a new password.' });
  }
  await Promise.all(tries.map(([limit, key]) => giveBack(limit, key)));
  await startSession(context, found.id);
  return asMe(found);
}

/** One click, while the demo is on. */
export async function signInToDemo(context: APIContext, role: DemoRole): Promise<Me> {
  if (!settings().demo) throw new Problem('DemoOff');
  const [found] = await database()
    .select()
    .from(user)
    .where(and(byEmail(demoPerson(role).email), eq(user.is_demo, true)));
  if (!found) throw new Problem('DemoOff');
  await startSession(context, found.id);
  return asMe(found);
}

/** Changes the name, or the password by the current one; a new password ends all other sessions. */
export async function changeMe(
  actor: Actor,
  currentSession: string | null,
  body: z.output<typeof patchMe>,
): Promise<Me> {
  requireSite(actor, 'account.manage');
  if (actor.user!.is_demo)
    throw new Problem('Forbidden', { detail: 'The demo’s people are shared by everyone who tries it.' });
  const own = eq(user.id, actor.user!.id);
  const changes: { name?: string; password_hash?: string } =
    body.name === undefined ? {} : { name: body.name };
  if (body.password !== undefined) {
    await countTry('sign-in by account', actor.user!.email.toLowerCase());
    const [found] = await database().select({ hash: user.password_hash }).from(user).where(own);
    if (!(await passwordMatches(found?.hash, body.current_password ?? '')))
      throw new Problem('WrongPassword');
    await giveBack('sign-in by account', actor.user!.email.toLowerCase());
    changes.password_hash = await hashPassword(body.password);
  }
  return database().transaction(async (tx) => {
    const [changed] =
      Object.keys(changes).length === 0
        ? await tx.select().from(user).where(own)
        : await tx.update(user).set(changes).where(own).returning();
    if (changes.password_hash) await revokeSessions(tx, changed!.id, currentSession);
    return asMe(changed!);
  });
}

/** With a mail server the links are for their readers alone: who may see the outbox may not take over accounts. */
const withoutTokens = (text: string): string => text.replace(/(\/reset\/)[\w-]+/g, '$1…');

/** The mails written last, newest first. */
export async function listOutbox(actor: Actor): Promise<OutboxMail[]> {
  requireSite(actor, 'admin.outbox');
  const mails = await database().select().from(mailOutbox).orderBy(desc(mailOutbox.created_at)).limit(200);
  return mails.map(({ id, to, subject, text, status, attempts, created_at, sent_at }) => ({
    id,
    to,
    subject,
    text: settings().SMTP_URL ? withoutTokens(text) : text,
    status,
    attempts,
    created_at: created_at.toISOString(),
    sent_at: sent_at?.toISOString() ?? null,
  }));
}
