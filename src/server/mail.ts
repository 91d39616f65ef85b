import { and, eq, lte, sql } from 'drizzle-orm';
import { createTransport, type Transporter } from 'nodemailer';
import { database, type Queryable } from '~/db/client';
import { mailOutbox } from '~/db/schema';
import { settings } from './env';
import { log } from './log';

export interface Mail {
  readonly to: string;
  readonly subject: string;
  /** Paragraphs; an address alone in one becomes a link in the HTML part. */
  readonly paragraphs: readonly string[];
}

const MAX_ATTEMPTS = 8;

/** Writes the mail in the transaction of its cause. Without a mail server it stays where the site admin reads it. */
export async function queueMail(tx: Queryable, { to, subject, paragraphs }: Mail): Promise<void> {
  await tx.insert(mailOutbox).values({
    to,
    subject,
    text: paragraphs.join('\n\n'),
    html: paragraphs.map(paragraph).join('\n'),
    status: settings().SMTP_URL ? 'queued' : 'kept',
  });
}

const ESCAPES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escape = (text: string) => text.replace(/[&<>"]/g, (character) => ESCAPES[character]!);
const paragraph = (text: string) =>
  /^https?:\/\/\S+$/.test(text)
    ? `<p><a href="${escape(text)}">${escape(text)}</a></p>`
    : `<p>${escape(text)}</p>`;

let transport: Transporter | undefined;

/**
 * Sends what is due, oldest first. A mail is claimed before it is handed over, with its next try a growing
 * while away, so that several processes never send it at once and a failure is tried again.
 * @returns how many were sent
 */
export async function sendDueMail(): Promise<number> {
  const { SMTP_URL, MAIL_FROM } = settings();
  if (!SMTP_URL) return 0;
  transport ??= createTransport(SMTP_URL);
  const db = database();
  const due = await db
    .select({ id: mailOutbox.id, attempts: mailOutbox.attempts })
    .from(mailOutbox)
    .where(and(eq(mailOutbox.status, 'queued'), lte(mailOutbox.next_attempt_at, new Date())))
    .orderBy(mailOutbox.created_at)
    .limit(20);
  let sent = 0;
  for (const { id, attempts } of due) {
    const [mail] = await db
      .update(mailOutbox)
      .set({
        attempts: attempts + 1,
        next_attempt_at: sql`now() + ${`${60 * 2 ** attempts} seconds`}::interval`,
      })
      .where(and(eq(mailOutbox.id, id), eq(mailOutbox.attempts, attempts), eq(mailOutbox.status, 'queued')))
      .returning();
    if (!mail) continue;
    try {
      const { to, subject, text, html } = mail;
      await transport.sendMail({ from: MAIL_FROM, to, subject, text, html });
      await db.update(mailOutbox).set({ status: 'sent', sent_at: new Date() }).where(eq(mailOutbox.id, id));
      sent++;
    } catch (err) {
      log.warn({ err, mail: id }, 'mail not sent');
      if (mail.attempts >= MAX_ATTEMPTS)
        await db.update(mailOutbox).set({ status: 'failed' }).where(eq(mailOutbox.id, id));
    }
  }
  return sent;
}

/** Looks for due mail every few seconds. @returns the function that ends it */
export function keepSendingMail(): () => void {
  if (!settings().SMTP_URL) return () => undefined;
  let busy = false;
  const timer = setInterval(() => {
    if (busy) return;
    busy = true;
    void sendDueMail()
      .catch((err: unknown) => log.error({ err }, 'outbox not read'))
      .finally(() => (busy = false));
  }, 5_000);
  timer.unref();
  return () => clearInterval(timer);
}
