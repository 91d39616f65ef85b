/** Shapes of accounts, sessions and tokens, shared by server and client. */
import { z } from 'zod';

export const MIN_PASSWORD = 10;

const name = z.string().trim().min(1, 'missing').max(120);
const email = z.email('not an e-mail address').max(254);
const password = z.string().min(MIN_PASSWORD, `at least ${MIN_PASSWORD} characters`).max(200);
/** The page that a posted form goes on to. */
const next = z.string().max(2000).optional();

export const signUp = z.object({ name, email: z.string().trim().pipe(email), password, next });
export const signIn = z.object({
  email: z.string().trim().min(1, 'missing').max(254),
  password: z.string().min(1, 'missing').max(200),
  next,
});
export const resetRequest = z.object({ email: z.string().trim().min(1, 'missing').max(254) });
export const reset = z.object({ token: z.string().min(1).max(200), password });

export const DEMO_ROLES = ['lead', 'researcher', 'reviewer', 'instructor', 'admin'] as const;
export type DemoRole = (typeof DEMO_ROLES)[number];
export const demoSignIn = z.object({ role: z.enum(DEMO_ROLES), next });

export const patchMe = z
  .object({ name, password, current_password: z.string().min(1).max(200) })
  .partial()
  .refine((body) => body.password === undefined || body.current_password !== undefined, {
    path: ['current_password'],
    message: 'needed to change the password',
  });

export const me = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  site_role: z.enum(['admin']).nullable(),
  is_demo: z.boolean(),
});
export type Me = z.infer<typeof me>;

export const sessionEntry = z.object({
  id: z.string(),
  created_at: z.iso.datetime(),
  expires_at: z.iso.datetime(),
  user_agent: z.string().nullable(),
  /** The session that asks. */
  current: z.boolean(),
});
export const sessions = z.object({ items: z.array(sessionEntry) });
export type SessionEntry = z.infer<typeof sessionEntry>;

export const createToken = z.object({
  name: z.string().trim().min(1).max(80),
  scope: z.enum(['read', 'write']).default('read'),
  expires_in_days: z.number().int().min(1).max(366).default(90),
});
export const tokenEntry = z.object({
  id: z.string(),
  name: z.string(),
  scope: z.enum(['read', 'write']),
  created_at: z.iso.datetime(),
  expires_at: z.iso.datetime(),
  last_used_at: z.iso.datetime().nullable(),
});
export const tokens = z.object({ items: z.array(tokenEntry) });
export type TokenEntry = z.infer<typeof tokenEntry>;
/** The only answer that ever holds the token itself. */
export const createdToken = tokenEntry.extend({ token: z.string() });

export const outboxMail = z.object({
  id: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  status: z.enum(['kept', 'queued', 'sent', 'failed']),
  attempts: z.number().int(),
  created_at: z.iso.datetime(),
  sent_at: z.iso.datetime().nullable(),
});
export const outbox = z.object({ items: z.array(outboxMail) });
export type OutboxMail = z.infer<typeof outboxMail>;
