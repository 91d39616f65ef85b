/** What stands between the network and the features: origins, media types, sizes, headers. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createTestApp, ORIGIN, type TestApp } from '../support/app';
import { add, addRotations, createTeam, square, terrane, type Team } from '../support/team';

let app: TestApp;
let team: Team;
beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(async () => {
  await app.reset();
  team = await createTeam(app);
});
afterAll(() => app.close());

describe('another site', () => {
  const body = { title: 'Theirs', slug: 'theirs' };
  it.each([
    ['JSON', { body, headers: { Origin: 'https://elsewhere.example' } }],
    [
      'a form',
      {
        raw: 'title=Theirs&slug=theirs',
        headers: { Origin: 'https://elsewhere.example', 'Content-Type': 'application/x-www-form-urlencoded' },
      },
    ],
    [
      'text that is JSON',
      { raw: JSON.stringify(body), headers: { Origin: 'null', 'Content-Type': 'text/plain' } },
    ],
    ['no Origin but cross-site', { body, headers: { Origin: '', 'Sec-Fetch-Site': 'cross-site' } }],
  ])('may not post %s with the browser’s cookie', async (_, options) => {
    const answer = await app.call('POST', '/api/projects', { as: team.lead, ...options });
    expect(answer.status).toBe(403);
    expect(answer.json.title).toBe('The request comes from another site');
  });

  it('may not delete either, while this one may', async () => {
    expect(
      (
        await app.call('DELETE', team.at(), {
          as: team.lead,
          headers: { Origin: 'https://elsewhere.example' },
        })
      ).status,
    ).toBe(403);
    expect((await app.call('DELETE', team.at(), { as: team.lead, headers: { Origin: ORIGIN } })).status).toBe(
      204,
    );
  });
});

describe('text that no database, page or map can hold', () => {
  it.each([
    ['a NUL', 'a\u0000b'],
    ['a bell', 'a\u0007b'],
    ['half a character', 'a\ud800b'],
  ])('is refused by the field it stands in: %s', async (_, title) => {
    const answer = await app.call('POST', '/api/projects', { as: team.lead, body: { title, slug: 'odd' } });
    expect([answer.status, answer.json.name, answer.json.errors[0].path]).toEqual([
      422,
      'InvalidRows',
      'title',
    ]);
  });

  it.each(['imports/%00/file', 'members/%00', 'slice.svg?age_ma=0&title=%00', 'versions/99999999999'])(
    'is no server error in an address: %s',
    async (path) => {
      const answer = await app.call('GET', team.at(path), { as: team.lead });
      expect([400, 404, 405]).toContain(answer.status);
    },
  );

  it('nested a hundred thousand levels deep is refused', async () => {
    const answer = await app.call('POST', team.at('edits'), {
      as: team.lead,
      raw: `{"edits":${'['.repeat(100_000)}${']'.repeat(100_000)}}`,
      headers: { 'Content-Type': 'application/json' },
      revision: '*',
    });
    expect([answer.status, answer.json.name]).toEqual([400, 'InvalidRequest']);
  });
});

describe('what is kept for good', () => {
  it('is only what the address fixes wholly: a version, and the frame where there is one', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9]]);
    await app.call('POST', team.at('versions'), { as: team.lead, body: { title: 'First' } });
    const kept = async (path: string) =>
      (await app.call('GET', team.at(path), { as: team.instructor })).headers.get('cache-control');
    expect(await kept('exports/rotations.csv?version=1')).toContain('immutable');
    expect(await kept('exports/rotations.csv')).toBe('private, no-cache');
    expect(await kept('quaternions?version=1&age_ma=5&relative_to=spin-axis')).toContain('immutable');
    expect(await kept('quaternions?version=1&age_ma=5')).not.toContain('immutable');
    expect(await kept('slice.svg?version=1&age_ma=5&relative_to=spin-axis')).toContain('immutable');
    expect(await kept('slice.svg?version=1&age_ma=5')).toBe('private, no-cache');
    expect(await kept('slice.svg?age_ma=5&relative_to=spin-axis')).toBe('private, no-cache');
  });
});

describe('methods', () => {
  it('that an address does not take are named with those it takes', async () => {
    const answer = await app.call('PATCH', '/api/projects', { as: team.lead, body: {} });
    expect([answer.status, answer.json.name, answer.headers.get('allow')]).toEqual([
      ...[405, 'MethodNotAllowed', 'GET, HEAD, POST'],
    ]);
  });

  it('HEAD of a stream answers without opening one', async () => {
    const answer = await app.call('HEAD', team.at('events'), { as: team.lead });
    expect([answer.status, answer.headers.get('content-type'), answer.text]).toEqual([
      200,
      'text/event-stream',
      '',
    ]);
  });
});

describe('ids of rows', () => {
  it('that are taken are refused by name, never as an error of the server', async () => {
    const id = crypto.randomUUID();
    const make = (code: string) =>
      app.call('POST', team.at('edits'), {
        as: team.researcher,
        revision: '*',
        body: { edits: [{ op: 'create', table: 'blocks', id, fields: terrane(code) }] },
      });
    expect((await make('one')).status).toBe(200);
    const again = await make('two');
    expect([again.status, again.json.name]).toEqual([422, 'InvalidRows']);
  });
});

describe('uploads', () => {
  const raw = '--X\r\nContent-Disposition: form-data; name="file"; filename="a"\r\n\r\nabc';
  it.each([
    ['that end before their closing boundary', 'multipart/form-data; boundary=X'],
    ['without a boundary', 'multipart/form-data'],
  ])('%s are refused, and the server goes on', async (_, type) => {
    const answer = await app.call('POST', team.at('imports'), {
      as: team.lead,
      raw,
      headers: { 'Content-Type': type },
    });
    expect([answer.status, answer.json.name]).toEqual([400, 'InvalidRequest']);
    expect((await app.call('GET', '/api/health')).status).toBe(200);
  });
});

describe('outlines of one block', () => {
  const outline = (older: number | null, younger: number | null) => ({
    ...{ block: 'sable', outline_older_ma: older, outline_younger_ma: younger },
    geometry: square(20, 10),
  });
  it('follow one another without overlap, the younger end excluded', async () => {
    expect((await add(app, team, 'blocks', terrane('sable'))).status).toBeLessThan(300);
    expect((await add(app, team, 'outlines', outline(null, 50))).status).toBeLessThan(300);
    expect((await add(app, team, 'outlines', outline(50, null))).status).toBeLessThan(300);
    const refused = await add(app, team, 'outlines', outline(60, 40));
    expect([refused.status, refused.json.name]).toEqual([422, 'InvalidRows']);
    expect(refused.json.errors[0].problem).toBe('sable has another outline at some of these ages');
  });
});

describe('names of this server', () => {
  it('are its own only: another name that points here is refused (DNS rebinding)', async () => {
    const answer = await app.call('GET', '/api/me', { as: team.lead, headers: { Host: 'rebound.example' } });
    expect([answer.status, answer.json.name]).toEqual([421, 'UnknownHost']);
    for (const Host of ['127.0.0.1:4321', 'localhost:4321', '[::1]:4321'])
      expect((await app.call('GET', '/api/me', { as: team.lead, headers: { Host } })).status).toBe(200);
  });
});

describe('bodies', () => {
  it('over the limit are refused whatever length they state', async () => {
    const big = JSON.stringify({ title: 'x'.repeat(2_000_000), slug: 'big' });
    const answer = await app.call('POST', '/api/projects', {
      as: team.lead,
      raw: big,
      headers: { 'Content-Type': 'application/json' },
    });
    expect(answer.status).toBe(413);
    const stream = new ReadableStream({
      start(controller) {
        for (let i = 0; i < 40; i++) controller.enqueue(new Uint8Array(100_000).fill(32));
        controller.close();
      },
    });
    const streamed = await app.call('POST', '/api/projects', {
      as: team.lead,
      raw: stream as unknown as BodyInit,
      headers: { 'Content-Type': 'application/json' },
    });
    expect(streamed.status).toBe(413);
  });

  it('of another type, or not JSON, are named', async () => {
    const xml = await app.call('POST', '/api/projects', {
      as: team.lead,
      raw: '<x/>',
      headers: { 'Content-Type': 'application/xml' },
    });
    expect(xml.status).toBe(415);
    const broken = await app.call('POST', '/api/projects', {
      as: team.lead,
      raw: '{',
      headers: { 'Content-Type': 'application/json' },
    });
    expect(broken.status).toBe(400);
    for (const answer of [xml, broken])
      expect(answer.headers.get('content-type')).toContain('application/problem+json');
  });
});

describe('every answer', () => {
  it('carries the security headers, problems included', async () => {
    for (const path of ['/api/health', '/api/me', '/api/projects/none']) {
      const { headers } = await app.call('GET', path);
      expect(headers.get('x-content-type-options')).toBe('nosniff');
      expect(headers.get('x-frame-options')).toBe('DENY');
      expect(headers.get('referrer-policy')).toBeTruthy();
      expect(headers.get('content-security-policy')).toContain("frame-ancestors 'none'");
    }
  });

  it('never shows SQL, paths or stacks', async () => {
    for (const path of [
      `/api/projects/${encodeURIComponent("'; drop table user; --")}`,
      team.at('rotations?cursor=%00'),
      team.at('slice.svg?age_ma=NaN'),
      '/api/geometry/..%2f..%2fetc',
    ]) {
      const { text } = await app.call('GET', path, { as: team.lead });
      expect(text).not.toMatch(/select |insert |node_modules|at .*\.ts|postgres/i);
    }
  });
});
