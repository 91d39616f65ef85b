import { createContext } from 'astro/middleware';
import { useDatabase, type Database } from '~/db/client';
import { session, user } from '~/db/schema';
import { NO_PASSWORD } from '~/features/accounts/password';
import { SESSION_COOKIE } from '~/features/accounts/session';
import { onRequest } from '~/middleware';
import { parseSettings, useSettings, type Settings } from '~/server/env';
import { forgetTries } from '~/server/rate-limit';
import { newSecret, sha256 } from '~/server/secrets';
import { readyAlready } from '~/server/start';
import { openTestDatabase } from './database';
import { API_FILES } from './routes';

export const ORIGIN = 'http://127.0.0.1:4321';

export interface TestUser {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  /** A Cookie header that is signed in. */
  readonly cookie: string;
}

export interface CallOptions {
  readonly as?: TestUser | undefined;
  /** Sent as JSON. */
  readonly body?: unknown;
  /** Sent as it is. */
  readonly raw?: BodyInit;
  readonly headers?: Readonly<Record<string, string>>;
  /** `If-Match`. */
  readonly revision?: number | '*';
}

export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  /** Cookies set, as `name=value`. */
  readonly cookies: readonly string[];
  readonly text: string;
  /** The parsed body; undefined for one that is not JSON. */
  readonly json: any;
}

export interface TestApp {
  readonly db: Database;
  readonly settings: Settings;
  call: (method: string, path: string, options?: CallOptions) => Promise<Answer>;
  /** The response itself, for streams. */
  respond: (method: string, path: string, options?: CallOptions) => Promise<Response>;
  signedUp: (name: string, site_role?: 'admin') => Promise<TestUser>;
  /** Empties database and limits. */
  reset: () => Promise<void>;
  close: () => Promise<void>;
}

/** The site's API over an empty database in memory: real middleware, real endpoints, requests as a browser sends them. */
export async function createTestApp(env: Record<string, string> = {}): Promise<TestApp> {
  const { db, truncate, close } = await openTestDatabase();
  const settings = parseSettings({ DATA_DIR: 'memory://', DRIFTWRIGHT_DEMO: 'off', ...env });
  useSettings(settings);
  useDatabase(db);
  readyAlready();

  const respond: TestApp['respond'] = async (method, path, options = {}) => {
    const request = requestOf(method, path, options);
    const { pathname } = new URL(request.url);
    const [file, params] = find(pathname);
    const context = createContext({ request, params, locals: {}, defaultLocale: 'en' } as Parameters<
      typeof createContext
    >[0]);
    // As the framework does: HEAD is answered by GET, and the pattern that matched is told.
    Object.defineProperty(context, 'routePattern', { value: file?.pattern ?? '/404' });
    const endpoint = file ? await file.load() : {};
    const handler = endpoint[method] ?? (method === 'HEAD' ? endpoint['GET'] : undefined) ?? endpoint['ALL'];
    const next = async () => (handler ? await handler(context) : new Response(null, { status: 404 }));
    const response = (await onRequest(context, next)) as Response;
    for (const cookie of context.cookies.headers()) response.headers.append('Set-Cookie', cookie);
    return response;
  };

  return {
    db,
    settings,
    respond,
    call: async (method, path, options) => answerOf(await respond(method, path, options)),
    signedUp: (name, site_role) => signUp(db, name, site_role),
    reset: async () => {
      await truncate();
      forgetTries();
    },
    close: async () => {
      useDatabase(undefined);
      await close();
    },
  };
}

function find(pathname: string) {
  for (const file of API_FILES) {
    const params = file.match(pathname);
    if (params) return [file, params] as const;
  }
  return [null, {}] as const;
}

function requestOf(method: string, path: string, { as, body, raw, headers, revision }: CallOptions): Request {
  const all = new Headers({
    'X-Forwarded-For': '192.0.2.7',
    Origin: ORIGIN,
    ...(as ? { Cookie: as.cookie } : {}),
  });
  if (method === 'GET') all.delete('Origin');
  if (body !== undefined) all.set('Content-Type', 'application/json');
  if (revision !== undefined) all.set('If-Match', revision === '*' ? '*' : `"${revision}"`);
  for (const [name, value] of Object.entries(headers ?? {})) {
    if (value === '') all.delete(name);
    else all.set(name, value);
  }
  const content = raw ?? (body === undefined ? null : JSON.stringify(body));
  return new Request(`${ORIGIN}${path}`, {
    method,
    headers: all,
    body: content,
    ...(content === null ? {} : { duplex: 'half' }),
  });
}

async function answerOf(response: Response): Promise<Answer> {
  const text = await response.text();
  const isJson = /\bjson\b/.test(response.headers.get('content-type') ?? '');
  const cookies = response.headers.getSetCookie().map((cookie) => cookie.split(';')[0]!);
  return {
    status: response.status,
    headers: response.headers,
    cookies,
    text,
    json: isJson && text ? JSON.parse(text) : undefined,
  };
}

async function signUp(db: Database, name: string, site_role?: 'admin'): Promise<TestUser> {
  const email = `${name.toLowerCase().replace(/\W+/g, '.')}@example.org`;
  const [row] = await db
    .insert(user)
    .values({ name, email, password_hash: NO_PASSWORD, site_role: site_role ?? null })
    .returning();
  const token = newSecret();
  const expiresAt = new Date(Date.now() + 86_400_000);
  await db.insert(session).values({ id: sha256(token), userId: row!.id, expiresAt });
  return { id: row!.id, name, email, cookie: `${SESSION_COOKIE}=${token}` };
}
