import { setTimeout as delay } from 'node:timers/promises';
import type { APIContext } from 'astro';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { database } from '~/db/client';
import { apiToken, passwordReset, user } from '~/db/schema';
import { paths } from '~/paths';
import { settings } from '~/server/env';
import { queueMail } from '~/server/mail';
import { publicOrigin } from '~/server/origin';
import { Problem } from '~/server/problem';
import { countTry } from '~/server/rate-limit';
import { newSecret, sha256 } from '~/server/secrets';
import { hashPassword } from './password';
import { byEmail } from './server';
import { revokeSessions } from './session';

const VALID_MS = 60 * 60 * 1000;
/** Longer than the work takes, so that the time of the answer does not tell whether there is an account. */
const ANSWER_MS = 150;

/** Writes the mail with the link, where there is such an account; says the same either way. */
export async function requestReset(context: APIContext, email: string): Promise<void> {
  await countTry('reset by address', context.clientAddress);
  await countTry('reset by account', email.toLowerCase());
  await Promise.all([writeResetMail(email), delay(ANSWER_MS)]);
}

async function writeResetMail(email: string): Promise<void> {
  const token = newSecret();
  await database().transaction(async (tx) => {
    const [found] = await tx
      .select({ id: user.id, name: user.name, email: user.email })
      .from(user)
      .where(and(byEmail(email), eq(user.is_demo, false)));
    if (!found) return;
    const expires_at = new Date(Date.now() + VALID_MS);
    await tx.insert(passwordReset).values({ hash: sha256(token), user_id: found.id, expires_at });
    await queueMail(tx, {
      to: found.email,
      subject: 'Set a new password for Driftwright',
      paragraphs: [
        `${found.name}, a new password was asked for this account. Set it here within one hour:`,
        `${publicOrigin(settings())}${paths.reset(token)}`,
        'If you did not ask, leave this mail alone: nothing has changed.',
      ],
    });
  });
}

const unusedBy = (token: string) =>
  and(
    eq(passwordReset.hash, sha256(token)),
    isNull(passwordReset.used_at),
    gt(passwordReset.expires_at, new Date()),
  );

/** Whether a link may still set a password, so that nobody types one in vain. */
export async function isUsable(token: string): Promise<boolean> {
  const found = await database()
    .select({ at: passwordReset.expires_at })
    .from(passwordReset)
    .where(unusedBy(token));
  return found.length > 0;
}

/** Single use; ends every session and every token of the account, whoever holds them. @throws Problem `ResetLinkSpent` */
export async function resetPassword(context: APIContext, token: string, password: string): Promise<void> {
  await countTry('reset by address', context.clientAddress);
  const password_hash = await hashPassword(password);
  const now = new Date();
  await database().transaction(async (tx) => {
    const [spent] = await tx.update(passwordReset).set({ used_at: now }).where(unusedBy(token)).returning();
    if (!spent) throw new Problem('ResetLinkSpent', { detail: 'Ask for a new link.' });
    const { user_id } = spent;
    await tx
      .update(passwordReset)
      .set({ used_at: now })
      .where(and(eq(passwordReset.user_id, user_id), isNull(passwordReset.used_at)));
    await tx.update(user).set({ password_hash }).where(eq(user.id, user_id));
    await revokeSessions(tx, user_id, null);
    await tx.delete(apiToken).where(eq(apiToken.user_id, user_id));
  });
}
