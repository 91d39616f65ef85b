import { sql } from 'drizzle-orm';
import { boolean, index, integer, pgTable, text, uniqueIndex } from 'drizzle-orm/pg-core';
import { id, moment, oneOf } from './columns';

export const user = pgTable(
  'user',
  {
    id: id(),
    name: text('name').notNull(),
    /** As typed; compared without regard to case by the unique index on lower(email). */
    email: text('email').notNull(),
    /** An argon2id hash in its own text format. */
    password_hash: text('password_hash').notNull(),
    site_role: text('site_role', { enum: ['admin'] }),
    is_demo: boolean('is_demo').notNull().default(false),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    uniqueIndex('user_email_unique').on(sql`lower(${table.email})`),
    oneOf('user_site_role', table.site_role, ['admin']),
  ],
);

/** The keys `userId` and `expiresAt` are those that Lucia's adapter asks for. The id is the token's SHA-256. */
export const session = pgTable(
  'session',
  {
    id: text('id').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    expiresAt: moment('expires_at').notNull(),
    created_at: moment('created_at').notNull().defaultNow(),
    user_agent: text('user_agent'),
  },
  (table) => [index('session_user').on(table.userId)],
);

export const apiToken = pgTable(
  'api_token',
  {
    id: id(),
    user_id: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    /** SHA-256 of the token; the token itself is shown once and kept nowhere. */
    hash: text('hash').notNull(),
    scope: text('scope', { enum: ['read', 'write'] }).notNull(),
    expires_at: moment('expires_at').notNull(),
    last_used_at: moment('last_used_at'),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    uniqueIndex('api_token_hash_unique').on(table.hash),
    index('api_token_user').on(table.user_id),
    oneOf('api_token_scope', table.scope, ['read', 'write']),
  ],
);

export const passwordReset = pgTable(
  'password_reset',
  {
    /** SHA-256 of the token in the mail. */
    hash: text('hash').primaryKey(),
    user_id: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    expires_at: moment('expires_at').notNull(),
    used_at: moment('used_at'),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [index('password_reset_user').on(table.user_id)],
);

/** Written in the transaction that causes the mail, sent afterwards: no mail without its cause, nor the reverse. */
export const mailOutbox = pgTable(
  'mail_outbox',
  {
    id: id(),
    to: text('to').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    html: text('html').notNull(),
    /** `kept`: no mail server is configured, the outbox page is where the mail is read. */
    status: text('status', { enum: ['kept', 'queued', 'sent', 'failed'] }).notNull(),
    attempts: integer('attempts').notNull().default(0),
    next_attempt_at: moment('next_attempt_at').notNull().defaultNow(),
    created_at: moment('created_at').notNull().defaultNow(),
    sent_at: moment('sent_at'),
  },
  (table) => [
    index('mail_outbox_created').on(table.created_at),
    index('mail_outbox_due').on(table.status, table.next_attempt_at),
    oneOf('mail_outbox_status', table.status, ['kept', 'queued', 'sent', 'failed']),
  ],
);
