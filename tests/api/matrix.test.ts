/**
 * Who may call what: every endpoint of the site × every standing. The table is compared with the endpoints that exist,
 * so a new one fails here until it has its line.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { project } from '~/db/schema';
import { closeWorkers } from '~/server/workers';
import { createTestApp, type TestApp, type TestUser } from '../support/app';
import { API_FILES, METHODS } from '../support/routes';
import { createTeam, frame, terrane, type Team } from '../support/team';

/** Who calls, and of which kind of project; a project is private where nothing else is said. */
const STANDINGS = [
  ...['lead', 'researcher', 'reviewer', 'instructor', 'outsider', 'visitor', 'admin'],
  ...['outsider, public project', 'visitor, public project', 'visitor, public draft'],
  ...['outsider, project by link', 'visitor, project by link'],
  ...['lead’s read token', 'reviewer’s read token', 'visitor’s read token, public project'],
] as const;
type Standing = (typeof STANDINGS)[number];
/** What each standing is answered, in the order of STANDINGS: `y` let through, otherwise the status. */
interface Line {
  readonly method: string;
  readonly pattern: string;
  readonly expected: readonly (string | number)[];
}

const P = '/api/projects/[slug]';
const Y = 'y';
// prettier-ignore
const [anyone, signedIn, writers, inPerson, admins, team, history, drafts, builders, leads] = [
  [Y, Y, Y, Y, Y, Y, Y,               Y, Y, Y,       Y, Y,     Y, Y, Y],
  [Y, Y, Y, Y, Y, 401, Y,             Y, 401, 401,   Y, 401,   Y, Y, Y],
  [Y, Y, Y, Y, Y, 401, Y,             Y, 401, 401,   Y, 401,   403, 403, 403],
  // What a token could do to the account that made it is done in person.
  [Y, Y, Y, Y, Y, 401, Y,             Y, 401, 401,   Y, 401,   403, 403, 403],
  [403, 403, 403, 403, 403, 401, Y,   403, 401, 401, 403, 401, 403, 403, 403],
  [Y, Y, Y, Y, 404, 404, 404,         Y, Y, Y,       404, 404, Y, Y, Y],
  [Y, Y, Y, Y, 404, 404, 404,         403, 403, 403, 404, 404, Y, Y, 403],
  [Y, Y, Y, Y, 404, 404, 404,         403, 403, Y,   404, 404, Y, Y, 403],
  [Y, Y, 403, 403, 404, 404, 404,     403, 403, 403, 404, 404, 403, 403, 403],
  [Y, 403, 403, 403, 404, 404, 404,   403, 403, 403, 404, 404, 403, 403, 403],
] as const;

const tables = ['blocks', 'outlines', 'rotations', 'features', 'directions', 'sources'];
const LINES: readonly (readonly [method: string, pattern: string, ...expected: (string | number)[]])[] = [
  ['GET', '/api/health', ...anyone],
  ['GET', '/api/openapi.json', ...anyone],
  ['POST', '/api/theme', ...anyone],
  ['POST', '/api/auth/sign-up', ...anyone],
  ['POST', '/api/auth/sign-in', ...anyone],
  ['POST', '/api/auth/sign-out', ...anyone],
  ['POST', '/api/auth/demo', ...anyone],
  ['POST', '/api/auth/reset-request', ...anyone],
  ['POST', '/api/auth/reset', ...anyone],
  ['GET', '/api/me', ...signedIn],
  ['PATCH', '/api/me', ...inPerson],
  ['GET', '/api/me/sessions', ...inPerson],
  ['DELETE', '/api/me/sessions', ...inPerson],
  ['DELETE', '/api/me/sessions/[id]', ...inPerson],
  ['GET', '/api/me/tokens', ...inPerson],
  ['POST', '/api/me/tokens', ...inPerson],
  ['DELETE', '/api/me/tokens', ...inPerson],
  ['DELETE', '/api/me/tokens/[id]', ...inPerson],
  ['GET', '/api/admin/outbox', ...admins],
  ['GET', '/api/jobs/[id]', ...signedIn],
  ['DELETE', '/api/jobs/[id]', ...signedIn],
  ['GET', '/api/jobs/[id]/events', ...signedIn],
  ['GET', '/api/geometry/[sha256]', ...anyone],
  ['GET', '/api/projects', ...anyone],
  ['POST', '/api/projects', ...writers],
  ['GET', P, ...team],
  ['PATCH', P, ...leads],
  ['DELETE', P, ...leads],
  ['GET', `${P}/members`, ...team],
  ['POST', `${P}/members`, ...leads],
  ['PATCH', `${P}/members/[id]`, ...leads],
  ['DELETE', `${P}/members/[id]`, ...leads],
  ...tables.flatMap((table): [string, string, ...(string | number)[]][] => [
    ['GET', `${P}/${table}`, ...team],
    ['POST', `${P}/${table}`, ...builders],
    ['PATCH', `${P}/${table}/[id]`, ...builders],
    ['DELETE', `${P}/${table}/[id]`, ...builders],
  ]),
  ['POST', `${P}/edits`, ...builders],
  ['POST', `${P}/coasts`, ...builders],
  ['GET', `${P}/changes`, ...history],
  ['GET', `${P}/changes/[revision]`, ...history],
  ['POST', `${P}/changes/undo`, ...builders],
  ['POST', `${P}/changes/redo`, ...builders],
  ['GET', `${P}/events`, ...drafts],
  ['POST', `${P}/imports`, ...builders],
  ['GET', `${P}/imports/[id]/file`, ...builders],
  ['GET', `${P}/imports/[id]/rejected`, ...builders],
  ['GET', `${P}/exports/[name]`, ...team],
  ['GET', `${P}/slice.[format]`, ...team],
  ['GET', `${P}/motions`, ...team],
  ['GET', `${P}/quaternions`, ...team],
  ['GET', `${P}/rotation`, ...team],
  ['GET', `${P}/stage`, ...team],
  ['GET', `${P}/velocity`, ...team],
  ['GET', `${P}/positions`, ...team],
  ['POST', `${P}/reconstruct`, ...team],
  ['GET', `${P}/drift-path`, ...team],
  ['GET', `${P}/convergence`, ...team],
  ['GET', `${P}/separation`, ...team],
  ['GET', `${P}/flow-line`, ...team],
  ['GET', `${P}/versions`, ...team],
  ['POST', `${P}/versions`, ...leads],
  ['GET', `${P}/versions/[number]`, ...team],
];

const MATRIX = LINES.map(([method, pattern, ...expected]): Line => ({ method, pattern, expected }));

let app: TestApp;
let projects: Record<'private' | 'public' | 'draft' | 'link', Team>;
/** Whether calls may have changed what was set up. */
let changed = true;
let tokens: Partial<Record<Standing, string>>;

/** A project with a frame, a terrane and a version 1 released of them. */
async function makeProject(slug: string, settings: Partial<typeof project.$inferInsert>): Promise<Team> {
  const people = await createTeam(app, slug, settings);
  await app.call('POST', people.at('blocks'), {
    as: people.researcher,
    body: [frame('axis'), terrane('sable')],
    revision: '*',
  });
  const released = await app.call('POST', people.at('versions'), { as: people.lead, body: { title: 'One' } });
  expect(released.status).toBe(201);
  return people;
}

const readToken = async (as: TestUser): Promise<string> => {
  const made = await app.call('POST', '/api/me/tokens', {
    as,
    body: { name: 'script', scope: 'read', expires_in_days: 1 },
  });
  return (made.json as { token: string }).token;
};

async function setUp(): Promise<void> {
  await app.reset();
  projects = {
    private: await makeProject('tarn-sea', {}),
    public: await makeProject('open-sea', { visibility: 'public' }),
    draft: await makeProject('open-draft', { visibility: 'public', draft_public: true }),
    link: await makeProject('by-link', { visibility: 'link' }),
  };
  tokens = {
    'lead’s read token': await readToken(projects.private.lead),
    'reviewer’s read token': await readToken(projects.private.reviewer),
    'visitor’s read token, public project': await readToken(projects.public.outsider),
  };
}

beforeAll(async () => {
  app = await createTestApp();
});
afterAll(async () => {
  await closeWorkers();
  await app.close();
});

const GUARDED = new Set([401, 403, 404]);

function projectOf(standing: Standing): Team {
  if (standing.endsWith('public project')) return projects.public;
  if (standing.endsWith('public draft')) return projects.draft;
  return standing.endsWith('by link') ? projects.link : projects.private;
}

function caller(standing: Standing): { as?: TestUser; headers?: Record<string, string> } {
  const token = tokens[standing];
  if (token) return { headers: { Authorization: `Bearer ${token}` } };
  const [who] = standing.split(',') as [keyof Team | 'visitor'];
  return who === 'visitor' ? {} : { as: projectOf(standing)[who] as TestUser };
}

/** Some row that is not there, so that what is let through changes nothing. */
const address = (pattern: string, { slug }: Team): string =>
  pattern
    .replace('[slug]', slug)
    .replace('slice.[format]', 'slice.geojson?age_ma=0')
    .replace('[name]', 'rotations.csv')
    .replace('[revision]', '1')
    .replace('[number]', '1')
    .replace('[sha256]', '0'.repeat(64))
    .replace('[id]', 'none');

async function statusOf(method: string, path: string, standing: Standing): Promise<number> {
  const body = method === 'GET' || method === 'DELETE' ? {} : { body: {} };
  const response = await app.respond(method, path, { ...caller(standing), revision: '*', ...body });
  await response.body?.cancel();
  return response.status;
}

it('has a line for every endpoint, and no line for what is gone', async () => {
  const found: string[] = [];
  for (const file of API_FILES) {
    const module = await file.load();
    for (const method of METHODS) if (module[method]) found.push(`${method} ${file.pattern}`);
  }
  expect(MATRIX.map(({ method, pattern }) => `${method} ${pattern}`).sort()).toEqual(found.sort());
  for (const { expected } of MATRIX) expect(expected).toHaveLength(STANDINGS.length);
});

describe.each(MATRIX)('$method $pattern', ({ method, pattern, expected }) => {
  it('lets through and refuses as the policy says', async () => {
    if (changed) await setUp();
    changed = method !== 'GET';
    for (const [i, standing] of STANDINGS.entries()) {
      const team_ = projectOf(standing);
      const status = await statusOf(method, address(pattern, team_), standing);
      const named = { standing, status };
      if (expected[i] !== 'y') expect(named).toEqual({ standing, status: expected[i] });
      else if (status === 404) {
        // Let through to look, and there is nothing of that name: the caller may see the project, or there is none in the address.
        const seen = pattern.startsWith(P) ? await statusOf('GET', team_.at(), standing) : 200;
        expect({ ...named, seen }).toEqual({ ...named, seen: 200 });
      } else
        expect(GUARDED.has(status) ? named : 'let through').toBe(
          pattern.includes('/auth/') && status === 401 ? named : 'let through',
        );
      // The account's tokens and sessions may have gone with it.
      if (method === 'DELETE' && status === 204) await setUp();
    }
  });
});

/** Reads that take `version`, with what else they need to answer 200. */
const READS = [
  ...tables,
  ...['exports/rotations.csv', 'motions', 'slice.geojson?age_ma=0', 'positions?age_ma=0&relative_to=axis'],
  ...['quaternions?age_ma=0&relative_to=axis', 'rotation?block=sable&age_ma=0&relative_to=axis'],
];
const STATES: readonly (readonly [Standing, draft: number, version: number, unnamed: number | 'draft'])[] = [
  ['lead', 200, 200, 'draft'],
  ['instructor', 200, 200, 'draft'],
  ['lead’s read token', 200, 200, 'draft'],
  ['visitor, public draft', 200, 200, 'draft'],
  ['outsider, public project', 403, 200, 1],
  ['visitor, public project', 403, 200, 1],
  ['visitor’s read token, public project', 403, 200, 1],
  ['visitor, project by link', 404, 404, 404],
  ['outsider, project by link', 404, 404, 404],
  ['outsider', 404, 404, 404],
];

describe('the draft and the released version', () => {
  beforeAll(setUp);
  it.each(STATES)('are read by: %s', async (standing, draft, version, unnamed) => {
    const team_ = projectOf(standing);
    for (const read of READS) {
      const at = (version_: string) =>
        team_.at(`${read}${read.includes('?') ? '&' : '?'}version=${version_}`);
      const found = {
        read,
        draft: await statusOf('GET', at('draft'), standing),
        version: await statusOf('GET', at('1'), standing),
      };
      expect(found).toEqual({ read, draft, version });
    }
    const answer = await app.call('GET', team_.at('motions'), caller(standing));
    expect(answer.status === 200 ? answer.json.version : answer.status).toBe(unnamed);
  });
});
