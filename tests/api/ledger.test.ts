import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { block, change, geometry, rotation as rotationTable, version } from '~/db/schema';
import { createTestApp, type TestApp, type TestUser } from '../support/app';
import {
  add,
  addRotations,
  createTeam,
  frame,
  revisionOf,
  rotation,
  square,
  terrane,
  type Team,
} from '../support/team';

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

const list = async (table: string, as: TestUser = team.researcher, query = '') =>
  (await app.call('GET', team.at(`${table}${query}`), { as })).json;

describe('rows', () => {
  it('come back as they were entered, in natural order, with the revision they were read at', async () => {
    await add(app, team, 'blocks', [terrane('sable'), frame('spin-axis')]);
    const rows = [
      {
        ...rotation(['sable', 'spin-axis', 20, -12.345678901234567, 359.5, -540.25]),
        covariance: [1.255e-4, 9.6682e-6, -2.595e-5, 1.2292e-4, -2.2718e-5, 9.2845e-5],
        cov_dof: 13,
        chron: 'C6',
        source: 'Merrow 2014',
        evidence: 'fitted',
        age_two_sigma_ma: 0.4,
      },
      rotation(['sable', 'spin-axis', 3.5, 1e-9, -180, 0]),
    ];
    const made = await add(app, team, 'rotations', rows);
    expect(made.status).toBe(201);
    expect(made.headers.get('ETag')).toBe('"2"');
    const { items, revision, next_cursor } = await list('rotations');
    expect([revision, next_cursor]).toEqual([2, null]);
    expect(items.map(({ age_ma }: { age_ma: number }) => age_ma)).toEqual([3.5, 20]);
    expect(items[1]).toMatchObject(rows[0]!);
    expect(items[0]).toMatchObject({
      ...rows[1]!,
      covariance: null,
      cov_dof: null,
      evidence: 'unconstrained',
      source: null,
    });
  });

  it('page by cursor without losing or repeating any, even when the row at the cursor goes', async () => {
    await addRotations(
      app,
      team,
      Array.from({ length: 23 }, (_, i) => ['sable', 'spin-axis', 97 - 4 * i, 40, -70, i] as const),
    );
    const seen: number[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page: { items: { age_ma: number; id: string }[]; next_cursor: string | null } = await list(
        'rotations',
        team.reviewer,
        `?limit=5${cursor && `&cursor=${cursor}`}`,
      );
      seen.push(...page.items.map(({ age_ma }) => age_ma));
      cursor = page.next_cursor;
      if (seen.length === 10) {
        const deleted = await app.call('DELETE', team.at(`rotations/${page.items[4]!.id}`), {
          as: team.lead,
          revision: '*',
        });
        expect(deleted.status).toBe(200);
      }
    }
    expect(seen).toEqual(Array.from({ length: 23 }, (_, i) => 9 + 4 * i));
    const wrong = await app.call('GET', team.at('rotations?cursor=abc'), { as: team.lead });
    expect([wrong.status, wrong.json.name]).toEqual([400, 'InvalidQuery']);
    expect((await app.call('GET', team.at('rotations?limit=501'), { as: team.lead })).status).toBe(400);
  });

  it('that are wrong are all named at their cell, and none is written', async () => {
    await add(app, team, 'blocks', [terrane('sable'), frame('spin-axis')]);
    const answer = await add(app, team, 'rotations', [
      rotation(['sable', 'spin-axis', 10, 128.4, 20, 5]),
      rotation(['sable', 'spin-axis', 20, 12, 20, 5]),
      { ...rotation(['sable', 'sable', -3, 12, 20, 5]), evidence: 'guessed' },
      { ...rotation(['sable', 'spin-axis', 40, 12, 20, 5]), angle: 3 },
      { ...rotation(['sable', 'spin-axis', 50, 12, 20, 5]), covariance: [1, 2, 0, 1, 0, 1] },
    ]);
    expect([answer.status, answer.json.name]).toEqual([422, 'InvalidRows']);
    const byPath = Object.fromEntries(
      answer.json.errors.map((error: { path: string; read: string }) => [error.path, error.read]),
    );
    expect(Object.keys(byPath).sort()).toEqual(['0.pole_lat', '2.age_ma', '2.evidence', '3', '4.covariance']);
    expect(byPath['0.pole_lat']).toBe('128.4');
    expect((await list('rotations')).items).toEqual([]);
    expect(await revisionOf(app, team)).toBe(1);
  });

  it('of a block that is not there, or twice at one age, are refused by name of the row', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 20, 12, 20, 5]]);
    const homeless = await add(app, team, 'rotations', rotation(['gannet', 'spin-axis', 20, 12, 20, 5]));
    expect([homeless.status, homeless.json.errors]).toMatchObject([422, [{ path: 'block', read: 'gannet' }]]);
    const twice = await add(app, team, 'rotations', [
      rotation(['sable', 'spin-axis', 30, 1, 2, 3]),
      rotation(['sable', 'spin-axis', 20, 1, 2, 3]),
    ]);
    expect([twice.status, twice.json.errors]).toMatchObject([422, [{ path: '1.age_ma', read: '20' }]]);
    const code = await add(app, team, 'blocks', [terrane('corrie'), terrane('sable')]);
    expect([code.status, code.json.name, code.json.errors]).toMatchObject([
      409,
      'Conflict',
      [{ path: '1', read: 'sable' }],
    ]);
    const answers = homeless.text + twice.text + code.text;
    expect(answers).not.toMatch(/constraint|violates|_unique|insert into|project_id/);
  });

  it('are no outlines of a frame, whichever comes first', async () => {
    await add(app, team, 'blocks', [frame('axis'), terrane('tarn')]);
    const drawn = await add(app, team, 'outlines', { block: 'axis', geometry: square(0, 0) });
    expect([drawn.status, drawn.json.errors]).toMatchObject([422, [{ path: 'block', read: 'axis', problem: 'a frame has no outline' }]]); // prettier-ignore
    expect((await add(app, team, 'outlines', { block: 'tarn', geometry: square(0, 0) })).status).toBe(201);
    const { id } = (await list('blocks')).items.find(({ code }: { code: string }) => code === 'tarn');
    const turned = await app.call('PATCH', team.at(`blocks/${id}`), { as: team.lead, body: { kind: 'frame' }, revision: '*' }); // prettier-ignore
    expect([turned.status, turned.json.errors]).toMatchObject([422, [{ path: 'kind', problem: 'a frame has no outline' }]]); // prettier-ignore
  });

  it('may refer to a frame that is still to come', async () => {
    await add(app, team, 'blocks', terrane('sable'));
    expect((await add(app, team, 'rotations', rotation(['sable', 'mantle', 20, 12, 20, 5]))).status).toBe(
      201,
    );
  });

  it('swap their ages in one edit', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 20, 12, 20, 5], ['sable', 'spin-axis', 30, 13, 21, 6]]); // prettier-ignore
    const [a, b] = (await list('rotations')).items;
    const edits = [
      { op: 'update', table: 'rotations', id: a.id, fields: { age_ma: 30 } },
      { op: 'update', table: 'rotations', id: b.id, fields: { age_ma: 20 } },
    ];
    const answer = await app.call('POST', team.at('edits'), {
      as: team.researcher,
      body: { edits },
      revision: '*',
    });
    expect(answer.status).toBe(200);
    expect((await list('rotations')).items.map((row: { pole_lat: number }) => row.pole_lat)).toEqual([
      13, 12,
    ]);
  });

  it('of another project cannot be changed through one’s own', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 20, 12, 20, 5]]);
    const [row] = (await list('rotations')).items;
    const other = await createTeam(app, 'other-sea');
    const patched = await app.call('PATCH', other.at(`rotations/${row.id}`), {
      as: other.lead,
      body: { age_ma: 21 },
      revision: '*',
    });
    expect(patched.status).toBe(404);
    const edits = [{ op: 'delete', table: 'rotations', id: row.id }];
    expect(
      (await app.call('POST', other.at('edits'), { as: other.lead, body: { edits }, revision: '*' })).status,
    ).toBe(404);
    expect(
      (
        await app.call('PATCH', team.at(`rotations/${row.id}`), {
          as: other.lead,
          body: { age_ma: 21 },
          revision: '*',
        })
      ).status,
    ).toBe(404);
    expect((await list('rotations')).items).toEqual([row]);
  });
});

describe('a block', () => {
  const blockId = async (code: string) =>
    (await list('blocks')).items.find((row: { code: string }) => row.code === code).id;

  beforeEach(async () => {
    await addRotations(app, team, [['sable', 'tarn', 20, 12, 20, 5], ['tarn', 'spin-axis', 30, 13, 21, 6]]); // prettier-ignore
    await add(app, team, 'outlines', { block: 'tarn', geometry: square(170, 10, 20) });
    await add(app, team, 'directions', { site: 'T1', lat: 12, lon: 175, block: 'tarn' });
  });

  it('renamed takes its rows and those that refer to it along, and undo brings all back', async () => {
    const before = await Promise.all(
      ['blocks', 'rotations', 'outlines', 'directions'].map((table) => list(table)),
    );
    const renamed = await app.call('PATCH', team.at(`blocks/${await blockId('tarn')}`), {
      as: team.researcher,
      body: { code: 'tarn-isle' },
      revision: '*',
    });
    expect(renamed.status).toBe(200);
    expect(
      (await list('rotations')).items.map((row: Record<string, unknown>) => [
        row['block'],
        row['relative_to'],
      ]),
    ).toEqual([
      ['sable', 'tarn-isle'],
      ['tarn-isle', 'spin-axis'],
    ]);
    expect((await list('outlines')).items).toMatchObject([{ block: 'tarn-isle' }]);
    expect((await list('directions')).items).toMatchObject([{ block: 'tarn-isle' }]);
    expect((await app.call('POST', team.at('changes/undo'), { as: team.researcher })).status).toBe(200);
    const after = await Promise.all(
      ['blocks', 'rotations', 'outlines', 'directions'].map((table) => list(table)),
    );
    expect(after.map(({ items }) => items)).toEqual(before.map(({ items }) => items));
    expect((await app.call('POST', team.at('changes/redo'), { as: team.researcher })).status).toBe(200);
    expect((await list('outlines')).items).toMatchObject([{ block: 'tarn-isle' }]);
  });

  it('deleted takes its rows along but leaves its directions, and undo brings all back', async () => {
    const before = await Promise.all(
      ['blocks', 'rotations', 'outlines', 'directions'].map((table) => list(table)),
    );
    const deleted = await app.call('DELETE', team.at(`blocks/${await blockId('tarn')}`), {
      as: team.researcher,
      revision: '*',
    });
    expect([deleted.status, deleted.json.deleted.length]).toEqual([200, 1]);
    expect((await list('rotations')).items).toMatchObject([{ block: 'sable', relative_to: 'tarn' }]);
    expect((await list('outlines')).items).toEqual([]);
    expect((await list('directions')).items).toMatchObject([{ site: 'T1', block: null }]);
    expect((await app.call('POST', team.at('changes/undo'), { as: team.researcher })).status).toBe(200);
    const after = await Promise.all(
      ['blocks', 'rotations', 'outlines', 'directions'].map((table) => list(table)),
    );
    expect(after.map(({ items }) => items)).toEqual(before.map(({ items }) => items));
  });
});

describe('the revision', () => {
  it('must be named, and a stale one is answered with what changed since', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9.64]]);
    const [row] = (await list('rotations')).items;
    const nameless = await app.call('PATCH', team.at(`rotations/${row.id}`), {
      as: team.researcher,
      body: { angle_deg: 9.9 },
    });
    expect([nameless.status, nameless.json.name]).toEqual([428, 'RevisionRequired']);
    const first = await app.call('PATCH', team.at(`rotations/${row.id}`), {
      as: team.researcher,
      body: { angle_deg: 9.9 },
      revision: 2,
    });
    expect([first.status, first.json.revision, first.headers.get('ETag')]).toEqual([200, 3, '"3"']);
    const stale = await app.call('PATCH', team.at(`rotations/${row.id}`), {
      as: team.lead,
      body: { angle_deg: 10.1 },
      revision: 2,
    });
    expect([stale.status, stale.json.name, stale.json.revision]).toEqual([412, 'StaleRevision', 3]);
    expect(stale.json.changes).toMatchObject([
      {
        revision: 3,
        actor: { id: team.researcher.id, name: team.researcher.name },
        label: 'rotation sable 66 Ma: angle_deg 9.64 → 9.9',
        changes: [
          { entity: 'rotations', entity_id: row.id, before: { angle_deg: 9.64 }, after: { angle_deg: 9.9 } },
        ],
      },
    ]);
    expect((await list('rotations')).items[0].angle_deg).toBe(9.9);
  });

  it('stays where an edit changes nothing', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9.64]]);
    const [row] = (await list('rotations')).items;
    const answer = await app.call('PATCH', team.at(`rotations/${row.id}`), {
      as: team.researcher,
      body: { angle_deg: 9.64 },
      revision: 2,
    });
    expect([answer.status, answer.json.revision]).toEqual([200, 2]);
  });

  it('is raised by one for each of many edits at once, none of which is lost', async () => {
    await add(app, team, 'blocks', [terrane('sable'), frame('spin-axis')]);
    const answers = await Promise.all(
      Array.from({ length: 12 }, (_, i) =>
        add(app, team, 'rotations', rotation(['sable', 'spin-axis', i + 1, 12, 20, i])),
      ),
    );
    expect(answers.map(({ status }) => status)).toEqual(Array(12).fill(201));
    expect(new Set(answers.map(({ json }) => json.revision)).size).toBe(12);
    expect((await list('rotations')).items).toHaveLength(12);
    expect(await revisionOf(app, team)).toBe(13);
  });
});

describe('an edit', () => {
  it('is one transaction: a wrong last row leaves nothing of it', async () => {
    const edits = [
      { op: 'create', table: 'blocks', fields: terrane('sable') },
      { op: 'create', table: 'outlines', fields: { block: 'sable', geometry: square(10, 10) } },
      { op: 'create', table: 'rotations', fields: rotation(['sable', 'spin-axis', 20, 12, 20, 5]) },
      { op: 'create', table: 'rotations', fields: rotation(['gannet', 'spin-axis', 20, 12, 20, 5]) },
    ];
    const answer = await app.call('POST', team.at('edits'), {
      as: team.researcher,
      body: { edits },
      revision: 0,
    });
    expect([answer.status, answer.json.errors[0].path]).toEqual([422, 'edits.3.fields.block']);
    expect(await app.db.select().from(block)).toEqual([]);
    expect(await app.db.select().from(geometry)).toEqual([]);
    expect(await app.db.select().from(change)).toEqual([]);
    expect(await revisionOf(app, team)).toBe(0);
  });

  it('sent again under its name because its answer was lost is made once', async () => {
    const id = crypto.randomUUID();
    const edits = [
      { op: 'create', table: 'blocks', id, fields: { code: 'tarn', name: 'Tarn', kind: 'terrane' } },
    ];
    const send = (key: string, as = team.researcher) =>
      app.call('POST', team.at('edits'), {
        as,
        body: { edits },
        revision: 0,
        headers: { 'Idempotency-Key': key },
      });
    const first = await send('one');
    expect(first.status, first.text).toBe(200);
    const again = await send('one');
    expect([again.status, again.json]).toEqual([200, first.json]);
    expect(await revisionOf(app, team)).toBe(1);
    expect((await send('two')).status).toBe(412);
    expect((await send('one', team.lead)).status).toBe(412);
    expect((await send('x'.repeat(65))).status).toBe(400);
  });

  it('of thousands of rows is taken back as it was made', async () => {
    await addRotations(app, team, [['sable', 'tarn', 10, 1, 2, 3]]);
    const ages = Array.from({ length: 1200 }, (_, i) => 11 + i / 100);
    await add(app, team, 'rotations', ages.map((age) => rotation(['sable', 'tarn', age, 1, 2, 3]))); // prettier-ignore
    const before = (await list('rotations', team.researcher, '?limit=500')).items;
    const rows = await app.db.select({ id: rotationTable.id }).from(rotationTable);
    const edits = rows.map(({ id }, i) => ({
      op: 'update',
      table: 'rotations',
      id,
      fields: { angle_deg: i % 90, note: `n ${i}` },
    }));
    const sent = await app.call('POST', team.at('edits'), {
      as: team.researcher,
      body: { edits },
      revision: '*',
    });
    expect([sent.status, sent.json.items?.length]).toEqual([200, 1201]);
    expect((await list('rotations', team.researcher, '?limit=500')).items).not.toEqual(before);
    expect((await app.call('POST', team.at('changes/undo'), { as: team.researcher })).status).toBe(200);
    expect((await list('rotations', team.researcher, '?limit=500')).items).toEqual(before);
  });

  it('of many tables is one step of undo, with the ids that it brought', async () => {
    const id = crypto.randomUUID();
    const edits = [
      { op: 'create', table: 'blocks', id, fields: terrane('sable') },
      { op: 'create', table: 'outlines', fields: { block: 'sable', geometry: square(10, 10) } },
    ];
    const made = await app.call('POST', team.at('edits'), {
      as: team.researcher,
      body: { edits, label: 'Drew Sable' },
      revision: 0,
    });
    expect([made.status, made.json.revision]).toEqual([200, 1]);
    expect(made.json.items.find((item: { table: string }) => item.table === 'blocks').row).toMatchObject({
      id,
      outlines: [{ vertices: 5 }],
    });
    const undone = await app.call('POST', team.at('changes/undo'), { as: team.researcher });
    expect([undone.status, undone.json.deleted.length]).toEqual([200, 2]);
    expect((await list('blocks')).items).toEqual([]);
  });
});

describe('undo and redo', () => {
  const patch = async (as: TestUser, id: string, body: object) =>
    app.call('PATCH', team.at(`rotations/${id}`), { as, body, revision: '*' });
  const step = (as: TestUser, which: 'undo' | 'redo') =>
    app.call('POST', team.at(`changes/${which}`), { as });
  const angle = async () => (await list('rotations')).items[0].angle_deg;
  let id: string;

  beforeEach(async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9]]);
    id = (await list('rotations')).items[0].id;
  });

  it('walk back and forth through one’s own steps', async () => {
    await patch(team.lead, id, { angle_deg: 10 });
    await patch(team.lead, id, { angle_deg: 11 });
    await step(team.lead, 'undo');
    expect(await angle()).toBe(10);
    await step(team.lead, 'undo');
    expect(await angle()).toBe(9);
    const nothing = await step(team.lead, 'undo');
    expect([nothing.status, nothing.json.name]).toEqual([409, 'NothingToUndo']);
    await step(team.lead, 'redo');
    await step(team.lead, 'redo');
    expect(await angle()).toBe(11);
    expect((await step(team.lead, 'redo')).json.name).toBe('NothingToRedo');
    await step(team.lead, 'undo');
    await patch(team.lead, id, { angle_deg: 12 });
    expect((await step(team.lead, 'redo')).json.name).toBe('NothingToRedo');
    await step(team.lead, 'undo');
    expect(await angle()).toBe(10);
  });

  it('leave what another changed since, and say who changed what', async () => {
    await patch(team.lead, id, { angle_deg: 10 });
    await patch(team.researcher, id, { pole_lat: 13 });
    const refused = await step(team.lead, 'undo');
    expect([refused.status, refused.json.name]).toEqual([409, 'ChangedSince']);
    expect(refused.json.detail).toContain(team.researcher.name);
    expect(refused.json.detail).toContain('pole_lat 12 → 13');
    expect(await angle()).toBe(10);
    await step(team.researcher, 'undo');
    expect((await step(team.lead, 'undo')).status).toBe(200);
    expect(await angle()).toBe(9);
  });

  it('hold for the revision that is named', async () => {
    await patch(team.lead, id, { angle_deg: 10 });
    const at = async (revision: number) =>
      app.call('POST', team.at('changes/undo'), { as: team.lead, revision });
    const now = await revisionOf(app, team);
    expect((await at(now - 1)).status).toBe(412);
    expect(await angle()).toBe(10);
    expect((await at(now)).status).toBe(200);
    expect(await angle()).toBe(9);
  });

  it('pass over what others did to other rows', async () => {
    await patch(team.lead, id, { angle_deg: 10 });
    await add(app, team, 'rotations', rotation(['sable', 'spin-axis', 80, 12, 20, 5]));
    expect((await step(team.lead, 'undo')).status).toBe(200);
    expect(await angle()).toBe(9);
  });

  it('do not take a block from under rows that another has added', async () => {
    const made = await app.call('POST', team.at('blocks'), {
      as: team.lead,
      body: terrane('tarn'),
      revision: '*',
    });
    expect(made.status).toBe(201);
    await add(app, team, 'rotations', rotation(['tarn', 'spin-axis', 20, 1, 2, 3]));
    const refused = await step(team.lead, 'undo');
    expect([refused.status, refused.json.name]).toEqual([409, 'ChangedSince']);
    expect(refused.json.detail).toContain(team.researcher.name);
  });

  it('are in the log, which says what each would act on', async () => {
    await patch(team.lead, id, { angle_deg: 10 });
    await step(team.lead, 'undo');
    const log = (await app.call('GET', team.at('changes?limit=2'), { as: team.lead })).json;
    expect(log.items).toMatchObject([
      { revision: 4, action: 'undo', rows: 1, label: 'Undid: rotation sable 66 Ma: angle_deg 9 → 10' },
      { revision: 3, action: 'edit', rows: 1, actor: { name: team.lead.name } },
    ]);
    expect([log.undo, log.redo]).toEqual([null, 'rotation sable 66 Ma: angle_deg 9 → 10']);
    const next = (
      await app.call('GET', team.at(`changes?limit=2&cursor=${log.next_cursor}`), { as: team.lead })
    ).json;
    expect(next.items.map(({ revision }: { revision: number }) => revision)).toEqual([2, 1]);
    expect(next.next_cursor).toBeNull();
    const detail = (await app.call('GET', team.at('changes/3'), { as: team.lead })).json;
    expect(detail.changes).toMatchObject([{ before: { angle_deg: 9 }, after: { angle_deg: 10 } }]);
  });
});

describe('geometries', () => {
  it('are stored once by the hash of their canonical form, as quantised bytes and as they came', async () => {
    await add(app, team, 'blocks', [terrane('sable'), terrane('tarn')]);
    const shape = square(170.123456789, 10.25, 20);
    await add(app, team, 'outlines', [
      { block: 'sable', geometry: shape },
      { block: 'tarn', geometry: { coordinates: shape.coordinates, type: shape.type } },
    ]);
    const rows = (await list('outlines')).items;
    expect(rows[0].sha256).toBe(rows[1].sha256);
    const geojson = await app.call('GET', `/api/geometry/${rows[0].sha256}?format=geojson`, {
      as: team.reviewer,
    });
    expect(geojson.headers.get('content-type')).toBe('application/geo+json');
    expect(geojson.json).toEqual(shape);
    const binary = await app.respond('GET', `/api/geometry/${rows[0].sha256}`, { as: team.reviewer });
    expect(binary.headers.get('content-type')).toBe('application/octet-stream');
    expect(binary.headers.get('cache-control')).toBe('private, max-age=31536000, immutable');
    expect((await binary.arrayBuffer()).byteLength).toBeLessThan(40);
    const again = await app.call('GET', `/api/geometry/${rows[0].sha256}`, {
      as: team.reviewer,
      headers: { 'If-None-Match': binary.headers.get('etag')! },
    });
    expect([again.status, again.text]).toEqual([304, '']);
  });

  it('are not there for who sees no project that uses them', async () => {
    await add(app, team, 'blocks', terrane('sable'));
    await add(app, team, 'outlines', { block: 'sable', geometry: square(10, 10) });
    const [{ sha256 }] = (await list('outlines')).items;
    const other = await createTeam(app, 'other-sea');
    expect((await app.call('GET', `/api/geometry/${sha256}`, { as: other.lead })).status).toBe(404);
    expect((await app.call('GET', `/api/geometry/${sha256}`)).status).toBe(404);
    await add(app, other, 'blocks', terrane('gannet'));
    const stolen = await add(app, other, 'outlines', { block: 'gannet', sha256 });
    expect([stolen.status, stolen.json.errors]).toMatchObject([422, [{ path: 'sha256' }]]);
  });

  it('that cannot be are refused with the place', async () => {
    await add(app, team, 'blocks', terrane('sable'));
    const open = { type: 'Polygon', coordinates: [[[0, 0], [5, 0], [5, 5], [0, 5]]] }; // prettier-ignore
    const swapped = { type: 'Polygon', coordinates: [[[10, 120], [5, 0], [5, 5], [10, 120]]] }; // prettier-ignore
    const line = { type: 'LineString', coordinates: [[0, 0], [5, 0]] }; // prettier-ignore
    const paths = [];
    for (const shape of [open, swapped, line]) {
      const answer = await add(app, team, 'outlines', { block: 'sable', geometry: shape });
      expect(answer.status).toBe(422);
      paths.push(answer.json.errors[0].path);
    }
    expect(paths).toEqual(['geometry.coordinates.0', 'geometry.coordinates.0.0', 'geometry.type']);
  });
});

describe('events', () => {
  it('tell open pages of every change, uncompressed', async () => {
    const response = await app.respond('GET', team.at('events'), { as: team.reviewer });
    expect(response.headers.get('content-type')).toBe('text/event-stream');
    expect(response.headers.get('cache-control')).toContain('no-transform');
    const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
    let text = '';
    const until = async (part: string) => {
      while (!text.includes(part)) text += (await reader.read()).value ?? '';
    };
    await until('event: open');
    await add(app, team, 'blocks', terrane('sable'));
    await until('event: change');
    expect(text).toContain(`"label":"Added block sable","actor":{"id":"${team.researcher.id}"`);
    await reader.cancel();
  });

  it('end for who has left the team, at the next change', async () => {
    const response = await app.respond('GET', team.at('events'), { as: team.reviewer });
    const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
    await reader.read();
    const { status } = await app.call('DELETE', team.at(`members/${team.reviewer.id}`), { as: team.lead });
    expect(status).toBe(204);
    await add(app, team, 'blocks', terrane('sable'));
    let text = '';
    for (let part = await reader.read(); !part.done; part = await reader.read()) text += part.value;
    expect(text).not.toContain('event: change');
  });

  it('end for who has signed out', async () => {
    const response = await app.respond('GET', team.at('events'), { as: team.reviewer });
    const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
    await reader.read();
    await app.call('POST', '/api/auth/sign-out', { as: team.reviewer });
    await add(app, team, 'blocks', terrane('sable'));
    let text = '';
    for (let part = await reader.read(); !part.done; part = await reader.read()) text += part.value;
    expect(text).not.toContain('event: change');
  });
});

describe('versions', () => {
  beforeEach(() => addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9]]));
  const release = (title = 'First') =>
    app.call('POST', team.at('versions'), { as: team.lead, body: { title } });

  it('answer as they were frozen, immutably, whatever the draft does', async () => {
    const made = await release();
    expect([made.status, made.json.number, made.json.parent]).toEqual([201, 1, null]);
    const frozen = await app.call('GET', team.at('rotations?version=1'), { as: team.instructor });
    expect(frozen.headers.get('cache-control')).toBe('private, max-age=31536000, immutable');
    const [row] = (await list('rotations')).items;
    await app.call('PATCH', team.at(`rotations/${row.id}`), {
      as: team.lead,
      body: { angle_deg: 10 },
      revision: '*',
    });
    const later = await app.call('GET', team.at('rotations?version=1'), { as: team.instructor });
    expect(later.text).toBe(frozen.text);
    expect(later.headers.get('etag')).toBe(frozen.headers.get('etag'));
    expect(later.json.items[0]).toMatchObject({ angle_deg: 9 });
    expect((await app.call('GET', team.at(), { as: team.lead })).json).toMatchObject({
      latest_version: { number: 1 },
      changes_since_version: 1,
    });
    const cached = await app.call('GET', team.at('rotations?version=1'), {
      as: team.lead,
      headers: { 'If-None-Match': frozen.headers.get('etag')! },
    });
    expect(cached.status).toBe(304);
    expect((await app.call('GET', team.at('rotations?version=2'), { as: team.lead })).json.name).toBe(
      'UnknownVersion',
    );
  });

  it('are refused where nothing changed, and where a circuit has no meaning', async () => {
    await release();
    const same = await release('Second');
    expect([same.status, same.json.name]).toEqual([409, 'NothingChanged']);
    await add(app, team, 'rotations', rotation(['sable', 'gannet', 90, 12, 20, 9]));
    const dangling = await release('Second');
    expect([dangling.status, dangling.json.name]).toEqual([409, 'NotReleasable']);
    expect(dangling.json.errors[0]).toMatchObject({ read: 'gannet' });
  });

  it('never change and never go, whoever asks the database', async () => {
    await release();
    const change = (set: object) => app.db.update(version).set(set).then(() => 'changed', (error: { cause: { code: string } }) => error.cause.code); // prettier-ignore
    // PostgreSQL 15 manual, appendix A: class 23 is integrity constraint violation, 23000 its general code.
    expect(await change({ manifest: '{}' })).toBe('23000');
    expect(await change({ sha256: 'f'.repeat(64) })).toBe('23000');
    expect(await change({ title: 'Mended title' })).toBe('changed');
    await expect(app.db.delete(version)).rejects.toThrow();
    const refused = await app.call('DELETE', team.at(), { as: team.lead });
    expect([refused.status, refused.json.name]).toEqual([409, 'ProjectHasVersions']);
  });

  it('of equal content have equal hashes, whatever the order of entry; one digit changes them', async () => {
    const rows = [['sable', 'spin-axis', 66, 12, 20, 9], ['tarn', 'sable', 40, 1, 2, 3], ['tarn', 'sable', 20, 4, 5, 6]] as const; // prettier-ignore
    const hash = async (slug: string, order: readonly (typeof rows)[number][]) => {
      const other = await createTeam(app, slug);
      await addRotations(app, other, order);
      const made = await app.call('POST', other.at('versions'), { as: other.lead, body: { title: slug } });
      return made.json.sha256 as string;
    };
    const first = await hash('sea-a', rows);
    expect(await hash('sea-b', rows.toReversed())).toBe(first);
    expect(await hash('sea-c', [rows[0], rows[1], ['tarn', 'sable', 20, 4, 5, 6.0000001]] as never)).not.toBe(
      first,
    );
  });
});

describe('the database itself refuses', () => {
  const attempt = async (values: Partial<typeof rotationTable.$inferInsert>) => {
    const row = { project_id: team.id, ...rotation(['sable', 'spin-axis', 5, 1, 2, 3]), ...values };
    const error = await app.db.insert(rotationTable).values(row).then(() => null, (failed: { cause: { constraint: string } }) => failed.cause.constraint); // prettier-ignore
    return error;
  };

  it('what no row may hold', async () => {
    await addRotations(app, team, [['sable', 'spin-axis', 66, 12, 20, 9]]);
    expect(await attempt({ age_ma: -1 })).toBe('rotation_age');
    expect(await attempt({ age_ma: NaN })).toBe('rotation_age');
    expect(await attempt({ pole_lat: 90.001 })).toBe('rotation_pole_lat');
    expect(await attempt({ relative_to: 'sable' })).toBe('rotation_other');
    expect(await attempt({ block: 'gannet' })).toBe('rotation_block');
    expect(await attempt({ age_ma: 66 })).toBe('rotation_row_unique');
    expect(await attempt({ cov_xx: 1 })).toBe('rotation_covariance_whole');
    expect(await attempt({ cov_xx: -1, cov_xy: 0, cov_xz: 0, cov_yy: 1, cov_yz: 0, cov_zz: 1 })).toBe(
      'rotation_covariance_diagonal',
    );
    expect(await attempt({})).toBeNull();
    await expect(
      app.db.insert(block).values({
        project_id: team.id,
        ...terrane('corrie'),
        kind: 'terrane',
        appears_ma: 10,
        disappears_ma: 20,
      }),
    ).rejects.toThrow();
    await expect(app.db.execute(sql`update project set revision = -1`)).rejects.toThrow();
  });

  it('any change of a stored geometry, and its going while something is drawn with it', async () => {
    await add(app, team, 'blocks', terrane('sable'));
    await add(app, team, 'outlines', { block: 'sable', geometry: square(10, 10) });
    const stored = await app.db.select().from(geometry);
    expect(stored).toHaveLength(1);
    const { sha256 } = stored[0]!;
    const refusal = (query: PromiseLike<unknown>) => query.then(() => 'changed', (error: { cause: { code: string; constraint: string } }) => `${error.cause.code} ${error.cause.constraint}`); // prettier-ignore
    // PostgreSQL 15 manual, appendix A: 23000 integrity constraint violation, 23503 foreign key violation.
    const own = eq(geometry.sha256, sha256);
    for (const set of [
      { vertices: stored[0]!.vertices + 1 },
      { sha256: 'f'.repeat(64) },
      { geojson: { type: 'Point', coordinates: [0, 0] } as never },
    ])
      expect(await refusal(app.db.update(geometry).set(set).where(own))).toBe('23000 geometry_immutable');
    const kept = '23503 block_outline_sha256_geometry_sha256_fk';
    expect(await refusal(app.db.delete(geometry).where(own))).toBe(kept);
    expect(await app.db.select().from(geometry)).toEqual(stored);

    const [{ id }] = (await list('outlines')).items;
    const released = await app.call('POST', team.at('versions'), { as: team.lead, body: { title: 'First' } });
    expect(released.status).toBe(201);
    await app.call('DELETE', team.at(`outlines/${id}`), { as: team.lead, revision: '*' });
    expect(await refusal(app.db.delete(geometry).where(own))).toBe(
      '23503 version_geometry_sha256_geometry_sha256_fk',
    );
    expect(await app.db.select().from(geometry)).toEqual(stored);
  });
});
