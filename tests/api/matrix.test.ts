/**
 * Who may call what: every endpoint of the site × every standing. The table is compared with the endpoints that exist,
 * so a new one fails here until it has its line.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closeWorkers } from '~/server/workers';
import { createTestApp, type TestApp, type TestUser } from '../support/app';
import { API_FILES, METHODS } from '../support/routes';
import { createTeam, frame, terrane, type Team } from '../support/team';

const STANDINGS = ['lead', 'researcher', 'reviewer', 'instructor', 'outsider', 'visitor', 'admin'] as const;
type Standing = (typeof STANDINGS)[number];
/** What each standing is answered, in the order of STANDINGS: `y` let through, otherwise the status. */
interface Line {
  readonly method: string;
  readonly pattern: string;
  readonly expected: readonly (string | number)[];
}

const P = '/api/projects/[slug]';
const Y = 'y';
const anyone = [Y, Y, Y, Y, Y, Y, Y];
const signedIn = [Y, Y, Y, Y, Y, 401, Y];
const team = [Y, Y, Y, Y, 404, 404, 404];
const builders = [Y, Y, 403, 403, 404, 404, 404];
const leads = [Y, 403, 403, 403, 404, 404, 404];

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
  ['PATCH', '/api/me', ...signedIn],
  ['GET', '/api/me/sessions', ...signedIn],
  ['DELETE', '/api/me/sessions', ...signedIn],
  ['DELETE', '/api/me/sessions/[id]', ...signedIn],
  ['GET', '/api/me/tokens', ...signedIn],
  ['POST', '/api/me/tokens', ...signedIn],
  ['DELETE', '/api/me/tokens', ...signedIn],
  ['DELETE', '/api/me/tokens/[id]', ...signedIn],
  ['GET', '/api/admin/outbox', 403, 403, 403, 403, 403, 401, Y],
  ['GET', '/api/geometry/[sha256]', ...anyone],
  ['GET', '/api/projects', ...anyone],
  ['POST', '/api/projects', ...signedIn],
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
  ['GET', `${P}/changes`, ...team],
  ['GET', `${P}/changes/[revision]`, ...team],
  ['POST', `${P}/changes/undo`, ...builders],
  ['POST', `${P}/changes/redo`, ...builders],
  ['GET', `${P}/events`, ...team],
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
  ['GET', `${P}/versions`, ...team],
  ['POST', `${P}/versions`, ...leads],
  ['GET', `${P}/versions/[number]`, ...team],
];

const MATRIX = LINES.map(([method, pattern, ...expected]): Line => ({ method, pattern, expected }));

let app: TestApp;
let people: Team;
beforeAll(async () => {
  app = await createTestApp();
});
afterAll(async () => {
  await closeWorkers();
  await app.close();
});

const GUARDED = new Set([401, 403, 404]);
const who = (standing: Standing): TestUser | undefined =>
  standing === 'visitor' ? undefined : people[standing];

/** Some row that is not there, so that what is let through changes nothing. */
const address = (pattern: string): string =>
  pattern
    .replace('[slug]', people.slug)
    .replace('slice.[format]', 'slice.geojson?age_ma=0')
    .replace('[name]', 'rotations.csv')
    .replace('[revision]', '1')
    .replace('[number]', '1')
    .replace('[sha256]', '0'.repeat(64))
    .replace('[id]', 'none');

it('has a line for every endpoint, and no line for what is gone', async () => {
  const found: string[] = [];
  for (const file of API_FILES) {
    const module = await file.load();
    for (const method of METHODS) if (module[method]) found.push(`${method} ${file.pattern}`);
  }
  expect(MATRIX.map(({ method, pattern }) => `${method} ${pattern}`).sort()).toEqual(found.sort());
});

describe.each(MATRIX)('$method $pattern', ({ method, pattern, expected }) => {
  it('lets through and refuses as the policy says', async () => {
    await app.reset();
    people = await createTeam(app);
    await app.call('POST', people.at('blocks'), {
      as: people.researcher,
      body: [frame('axis'), terrane('sable')],
      revision: '*',
    });
    for (const [i, standing] of STANDINGS.entries()) {
      const body = method === 'GET' || method === 'DELETE' ? {} : { body: {} };
      const response = await app.respond(method, address(pattern), {
        as: who(standing),
        revision: '*',
        ...body,
      });
      const { status } = response;
      await response.body?.cancel();
      const named = { standing, status };
      if (expected[i] !== 'y') expect(named).toEqual({ standing, status: expected[i] });
      else if (status === 404) {
        // Let through to look, and there is nothing of that name: the caller may see the project, or there is none in the address.
        const seen = pattern.startsWith(P)
          ? (await app.call('GET', people.at(), { as: who(standing) })).status
          : 200;
        expect({ ...named, seen }).toEqual({ ...named, seen: 200 });
      } else
        expect(GUARDED.has(status) ? named : 'let through').toBe(
          pattern.includes('/auth/') && status === 401 ? named : 'let through',
        );
      if (method === 'DELETE' && pattern === P && status === 204) people = await createTeam(app, 'again');
    }
  });
});
