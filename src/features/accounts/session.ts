import { DrizzlePostgreSQLAdapter } from '@lucia-auth/adapter-drizzle';
import type { APIContext } from 'astro';
import { and, eq, gt, lt, ne, or, isNull } from 'drizzle-orm';
import { Lucia, TimeSpan } from 'lucia';
import { database, type Database, type Queryable } from '~/db/client';
import { apiToken, session, user } from '~/db/schema';
import { VISITOR, type Actor, type ActorUser } from '~/server/actor';
import { settings } from '~/server/env';
import { isSecure } from '~/server/origin';
import { Problem } from '~/server/problem';
import { newSecret, sha256 } from '~/server/secrets';
import type { SessionEntry } from './contract';

export const SESSION_COOKIE = 'driftwright_session';
const LIFETIME_S = 30 * 24 * 60 * 60;

/** One for each open database. Lucia keeps ids as they are given, so it is given the token's hash. */
const lucias = new WeakMap<Database, ReturnType<typeof createLucia>>();

function createLucia(db: Database) {
  return new Lucia(new DrizzlePostgreSQLAdapter(db, session, user), {
    sessionExpiresIn: new TimeSpan(LIFETIME_S, 's'),
    getUserAttributes: ({ name, email, site_role, is_demo }) => ({ name, email, site_role, is_demo }),
  });
}

function lucia() {
  const db = database();
  const found = lucias.get(db) ?? createLucia(db);
  lucias.set(db, found);
  return found;
}

declare module 'lucia' {
  interface Register {
    Lucia: ReturnType<typeof createLucia>;
    DatabaseUserAttributes: Omit<ActorUser, 'id'>;
    DatabaseSessionAttributes: { user_agent?: string | null };
  }
}

type Identity = { actor: Actor; session: App.Locals['session'] };

/**
 * Who makes the request. A bearer token is taken alone: with a wrong one the cookie is not looked at.
 * @throws Problem `InvalidToken`
 */
export async function identify(context: APIContext): Promise<Identity> {
  const authorization = context.request.headers.get('authorization');
  const bearer = authorization && /^Bearer +(\S+)$/i.exec(authorization)?.[1];
  if (bearer) return { actor: await byToken(bearer), session: null };
  return bySession(context);
}

async function bySession(context: APIContext): Promise<Identity> {
  const nobody: Identity = { actor: VISITOR, session: null };
  const token = context.cookies.get(SESSION_COOKIE)?.value;
  if (!token) return nobody;
  const { session: found, user: owner } = await lucia().validateSession(sha256(token));
  if (!found || (owner.is_demo && !settings().demo)) {
    clearCookie(context);
    return nobody;
  }
  if (found.fresh) setCookie(context, token);
  return {
    actor: { user: owner, via: 'session', scope: 'write' },
    session: { id: found.id, expires_at: found.expiresAt },
  };
}

async function byToken(token: string): Promise<Actor> {
  const now = new Date();
  const [found] = await database()
    .select({ id: apiToken.id, scope: apiToken.scope, last_used_at: apiToken.last_used_at, user })
    .from(apiToken)
    .innerJoin(user, eq(user.id, apiToken.user_id))
    .where(and(eq(apiToken.hash, sha256(token)), gt(apiToken.expires_at, now)));
  if (!found || (found.user.is_demo && !settings().demo)) throw new Problem('InvalidToken');
  const aMinuteAgo = new Date(now.getTime() - 60_000);
  await database()
    .update(apiToken)
    .set({ last_used_at: now })
    .where(
      and(
        eq(apiToken.id, found.id),
        or(isNull(apiToken.last_used_at), lt(apiToken.last_used_at, aMinuteAgo)),
      ),
    );
  const { id, name, email, site_role, is_demo } = found.user;
  return { user: { id, name, email, site_role, is_demo }, via: 'token', scope: found.scope };
}

function setCookie(context: APIContext, token: string): void {
  context.cookies.set(SESSION_COOKIE, token, {
    httpOnly: true,
    sameSite: 'lax',
    secure: isSecure(context.request, settings()),
    path: '/',
    maxAge: LIFETIME_S,
  });
}

const clearCookie = (context: APIContext): void => context.cookies.delete(SESSION_COOKIE, { path: '/' });

/** Signs in: a new token in the cookie, its hash in the database, and the session of before ended. */
export async function startSession(context: APIContext, userId: string): Promise<void> {
  await endSession(context);
  const token = newSecret();
  const agent = context.request.headers.get('user-agent')?.slice(0, 200) ?? null;
  await lucia().createSession(userId, { user_agent: agent }, { sessionId: sha256(token) });
  setCookie(context, token);
}

export async function endSession(context: APIContext): Promise<void> {
  if (context.locals.session) await lucia().invalidateSession(context.locals.session.id);
  clearCookie(context);
}

export async function listSessions(actor: Actor, current: string | null): Promise<SessionEntry[]> {
  const rows = await database()
    .select()
    .from(session)
    .where(and(eq(session.userId, actor.user!.id), gt(session.expiresAt, new Date())))
    .orderBy(session.created_at);
  return rows.map(({ id, created_at, expiresAt, user_agent }) => ({
    id,
    created_at: created_at.toISOString(),
    expires_at: expiresAt.toISOString(),
    user_agent,
    current: id === current,
  }));
}

/** Whether a session that a long answer began with still stands; a visitor or a token has none to lose. */
export async function stillSignedIn(id: string | null): Promise<boolean> {
  if (id === null) return true;
  const [found] = await database()
    .select({ id: session.id })
    .from(session)
    .where(and(eq(session.id, id), gt(session.expiresAt, new Date())));
  return found !== undefined;
}

/** @throws Problem `NotFound` for a session of someone else */
export async function revokeSession(actor: Actor, id: string): Promise<void> {
  const gone = await database()
    .delete(session)
    .where(and(eq(session.id, id), eq(session.userId, actor.user!.id)))
    .returning({ id: session.id });
  if (gone.length === 0) throw new Problem('NotFound');
}

/** Ends every session of the user, but for the one named. */
export async function revokeSessions(db: Queryable, userId: string, but: string | null): Promise<void> {
  await db
    .delete(session)
    .where(and(eq(session.userId, userId), but === null ? undefined : ne(session.id, but)));
}
