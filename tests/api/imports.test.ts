/** Files in and out over HTTP, as the import desk and scripts send them. */
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createTestApp, type Answer, type TestApp, type TestUser } from '../support/app';

let app: TestApp;
let lead: TestUser;
const P = '/api/projects/two-blocks';
const demo = (name: string): string =>
  readFileSync(new URL(`../../src/db/seed/lantern-sea/${name}`, import.meta.url), 'utf8');

beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(async () => {
  await app.reset();
  lead = await app.signedUp('Lea Dorn');
  await app.call('POST', '/api/projects', { as: lead, body: { title: 'Two blocks', slug: 'two-blocks' } });
});
afterAll(() => app.close());

interface Send {
  readonly kind: string;
  readonly text: string;
  readonly name?: string;
  readonly as?: TestUser;
  readonly fields?: Record<string, string>;
}

function send({ kind, text, name = `${kind}.txt`, as = lead, fields = {} }: Send): Promise<Answer> {
  const form = new FormData();
  form.set('kind', kind);
  for (const [key, value] of Object.entries(fields)) form.set(key, value);
  form.set('file', new File([text], name));
  return app.call('POST', `${P}/imports`, { as, raw: form });
}

const ROTATIONS = 'block,relative_to,age_ma,pole_lat,pole_lon,angle_deg\n';

async function withBlocks(): Promise<void> {
  const answer = await send({ kind: 'blocks', text: demo('blocks.geojson') });
  expect(answer.json).toMatchObject({ accepted: 12, rejected: [], questions: [], written: true });
}

describe('a file with mistakes', () => {
  const text = `${ROTATIONS}sable,tarn,10,2.5,-27,4\nsable,tarn,20,128.4,-27,8\n`;

  it('writes nothing on a dry run, nor while rows are rejected', async () => {
    await withBlocks();
    const dry = await send({ kind: 'rotations', text, fields: { dry_run: 'true' } });
    expect(dry.status).toBe(200);
    expect(dry.json).toMatchObject({ accepted: 1, written: false });
    expect(dry.json.rejected[0]).toMatchObject({
      line: 3,
      column: 'pole_lat',
      read: '128.4',
      problem: 'latitude beyond 90°',
    });
    expect((await send({ kind: 'rotations', text })).json.written).toBe(false);
    expect((await app.call('GET', `${P}/rotations`, { as: lead })).json.items).toEqual([]);
  });

  it('writes the good rows when told to, and keeps the rejected ones to mend', async () => {
    await withBlocks();
    const { json } = await send({
      kind: 'rotations',
      text,
      name: 'poles.csv',
      fields: { skip_rejected: 'true' },
    });
    expect(json).toMatchObject({ accepted: 1, written: true });
    expect((await app.call('GET', `${P}/rotations`, { as: lead })).json.items).toHaveLength(1);
    const kept = await app.call('GET', `${P}/imports/${json.import_id}/rejected`, { as: lead });
    expect(kept.headers.get('content-disposition')).toContain('poles-rejected.csv');
    expect(kept.text).toContain('sable,tarn,20,128.4,-27,8,pole_lat: latitude beyond 90°,');
    const mended = await send({ kind: 'rotations', text: kept.text.replace('128.4', '12.84') });
    expect(mended.json).toMatchObject({ accepted: 1, rejected: [], written: true });
    expect((await app.call('GET', `${P}/rotations`, { as: lead })).json.items).toHaveLength(2);
    const original = await app.call('GET', `${P}/imports/${json.import_id}/file`, { as: lead });
    expect(original.text).toBe(text);
  });

  it('is one step, which undo takes back', async () => {
    await withBlocks();
    await send({ kind: 'rotations', text, fields: { skip_rejected: 'true' } });
    expect((await app.call('POST', `${P}/changes/undo`, { as: lead, revision: '*' })).status).toBe(200);
    expect((await app.call('GET', `${P}/rotations`, { as: lead })).json.items).toEqual([]);
    expect((await app.call('GET', `${P}/blocks`, { as: lead })).json.items).toHaveLength(12);
  });
});

describe('values that the ledger would refuse', () => {
  it('are rejected with their lines, and the rest is taken', async () => {
    await withBlocks();
    const header =
      'block,relative_to,age_ma,pole_lat,pole_lon,angle_deg,chron,cov_xx,cov_xy,cov_xz,cov_yy,cov_yz,cov_zz\n';
    const long = 'C'.repeat(41);
    const text =
      `${header}sable,tarn,10,2.5,-27,4,C5,,,,,,\nsable,tarn,20,2.5,-27,8,${long},,,,,,\n` +
      `sable,tarn,30,2.5,-27,9,C7,1e9,0,0,1,0,1\nsable,tarn,40,2.5,-27,9,C\u0001,,,,,,\n`;
    const { json } = await send({ kind: 'rotations', text, fields: { skip_rejected: 'true' } });
    expect(json.written).toBe(true);
    expect(json.accepted).toBe(1);
    const found = json.rejected.map((r: { line: number; column: string | null; problem: string }) => [
      ...[r.line, r.column, r.problem],
    ]);
    expect(found).toEqual(
      expect.arrayContaining([
        [3, 'chron', 'more than 40 characters'],
        [4, 'covariance', 'beyond ±40 rad²'],
        [5, null, 'holds control characters or half a character'],
      ]),
    );
  });

  it('are never cut to fit', async () => {
    const name = 'N'.repeat(121);
    const feature = { type: 'Feature', properties: { code: 'n', name, kind: 'frame' }, geometry: null };
    const { json } = await send({
      kind: 'blocks',
      text: JSON.stringify({ type: 'FeatureCollection', features: [feature] }),
    });
    expect(json.rejected[0]).toMatchObject({ line: 1, column: 'name', problem: 'more than 120 characters' });
  });
});

describe('a GeoJSON file on one line', () => {
  it('names its features, counts each once, and keeps the rejected ones to mend', async () => {
    const frame = (code: string) => ({
      type: 'Feature',
      properties: { code, name: 'M', kind: 'frame' },
      geometry: null,
    });
    const bad = { ...frame('b'), properties: { code: 'B b', kind: 'sea', appears_ma: -3 } };
    const text = JSON.stringify({ type: 'FeatureCollection', features: [frame('a'), bad] });
    const { json } = await send({
      kind: 'blocks',
      text,
      name: 'all.json',
      fields: { skip_rejected: 'true' },
    });
    expect(json).toMatchObject({ accepted: 1, rejected_rows: 1, written: true });
    expect(json.rejected.length).toBeGreaterThan(1);
    expect(new Set(json.rejected.map((row: { entry: number }) => row.entry))).toEqual(new Set([2]));
    const kept = await app.call('GET', `${P}/imports/${json.import_id}/rejected`, { as: lead });
    expect(kept.headers.get('content-disposition')).toContain('all-rejected.geojson');
    expect(kept.json.features).toHaveLength(1);
    expect(kept.json.features[0].properties).toMatchObject({ code: 'B b', kind: 'sea' });
  });
});

describe('what is no table and no GeoJSON', () => {
  it.each([
    ['an empty file', ' \n'],
    ['a picture', '\u0089PNG\r\n\u001a\n\u0000\u0000'],
  ])('%s is refused as a whole', async (_, text) => {
    const answer = await send({ kind: 'rotations', text });
    expect([answer.status, answer.json.name]).toEqual([400, 'InvalidRequest']);
  });
});

describe('open questions', () => {
  it('hold the writing back until they are answered', async () => {
    await withBlocks();
    const text = 'block;relative_to;age_ma;pole_lat;pole_lon;angle_deg\nsable;mantle-2;10;2,5;-27;4\n';
    const asked = await send({ kind: 'rotations', text });
    expect(asked.json.written).toBe(false);
    expect(asked.json.questions.map((q: { id: string }) => q.id)).toEqual([
      'decimal_comma',
      'missing_reference',
    ]);
    const answers = Object.fromEntries(
      asked.json.questions.map((q: { id: string; choices: string[] }) => [q.id, q.choices[0]]),
    );
    const done = await send({ kind: 'rotations', text, fields: { answers: JSON.stringify(answers) } });
    expect(done.json).toMatchObject({ written: true, questions: [] });
    const rows = (await app.call('GET', `${P}/rotations`, { as: lead })).json.items;
    expect(rows[0]).toMatchObject({ pole_lat: 2.5, relative_to: 'mantle-2' });
    const frame = (await app.call('GET', `${P}/blocks`, { as: lead })).json.items.find(
      (b: { code: string }) => b.code === 'mantle-2',
    );
    expect(frame).toMatchObject({ kind: 'frame', outlines: [] });
  });
});

describe('round trip', () => {
  it('imports every file of the demo without a rejection, and exports it so that importing changes nothing', async () => {
    const kinds = {
      blocks: 'blocks.geojson',
      rotations: 'rotations.csv',
      features: 'features.geojson',
      directions: 'directions.csv',
    };
    const counts = { blocks: 12, rotations: 103, features: 10, directions: 22 };
    for (const [kind, name] of Object.entries(kinds)) {
      const { json } = await send({ kind, text: demo(name), name });
      expect(json).toMatchObject({
        accepted: counts[kind as keyof typeof counts],
        rejected: [],
        questions: [],
        written: true,
      });
    }
    const exported: Record<string, string> = {};
    for (const name of Object.values(kinds))
      exported[name] = (await app.call('GET', `${P}/exports/${name}`, { as: lead })).text;
    await app.call('POST', '/api/projects', { as: lead, body: { title: 'Copy', slug: 'copy' } });
    for (const [kind, name] of Object.entries(kinds)) {
      const again = await send({ kind, text: exported[name]!, name });
      expect(again.json.preview.every((row: { change: string }) => row.change === 'unchanged')).toBe(true);
      const form = new FormData();
      form.set('kind', kind);
      form.set('file', new File([exported[name]!], name));
      const copied = await app.call('POST', '/api/projects/copy/imports', { as: lead, raw: form });
      expect(copied.json.written).toBe(true);
      expect((await app.call('GET', `/api/projects/copy/exports/${name}`, { as: lead })).text).toBe(
        exported[name],
      );
    }
  });

  it('keeps holes, parts, the larger side, outlines by age and their sources', async () => {
    const ring = (lon: number, lat: number, side: number) => [
      [lon, lat], [lon + side, lat], [lon + side, lat + side], [lon, lat + side], [lon, lat],
    ]; // prettier-ignore
    const feature = (code: string, geometry: object, more: object = {}) => ({
      type: 'Feature',
      properties: { code, name: code, kind: 'terrane', ...more },
      geometry,
    });
    const hole = [...ring(4.5, 4.5, 3)].reverse();
    const features = [
      feature('holed', { type: 'Polygon', coordinates: [ring(0, 0, 20), hole] }, { outline_source: 'Pell 2019' }),
      feature('parts', { type: 'MultiPolygon', coordinates: [[ring(40, 0, 5)], [ring(50, 0, 5), [...ring(51, 1, 1)].reverse()]] }),
      feature('most', { type: 'Polygon', coordinates: [ring(0, -60, 30)] }, { inside: 'larger' }),
      feature('aged', { type: 'Polygon', coordinates: [ring(80, 0, 5)] }, { outline_older_ma: 90, outline_younger_ma: 40 }),
      feature('aged', { type: 'Polygon', coordinates: [ring(80, 0, 8)] }, { outline_older_ma: 40, outline_source: 'Own survey, "B"' }),
      feature('bare', { type: 'Polygon', coordinates: [ring(170, 70, 20)] }),
    ]; // prettier-ignore
    const text = JSON.stringify({ type: 'FeatureCollection', features });
    expect((await send({ kind: 'blocks', text })).json).toMatchObject({ written: true, rejected: [] });
    const out = async (slug: string) =>
      (await app.call('GET', `/api/projects/${slug}/exports/blocks.geojson`, { as: lead })).text;
    const first = await out(P.split('/').at(-1)!);
    const read = JSON.parse(first).features.map((one: any) => [
      one.properties.code, one.properties.inside, one.properties.outline_source ?? null, one.geometry,
    ]); // prettier-ignore
    for (const { properties, geometry } of features as any[])
      expect(read).toContainEqual([
        properties.code,
        properties.inside ?? 'smaller',
        properties.outline_source ?? null,
        geometry,
      ]);
    const again = await send({ kind: 'blocks', text: first });
    expect(again.json.preview.map((row: { change: string }) => row.change)).toEqual(
      Array(5).fill('unchanged'),
    );
    await app.call('POST', '/api/projects', { as: lead, body: { title: 'Copy', slug: 'copy' } });
    const form = new FormData();
    form.set('kind', 'blocks');
    form.set('file', new File([first], 'blocks.geojson'));
    expect((await app.call('POST', '/api/projects/copy/imports', { as: lead, raw: form })).json.written).toBe(
      true,
    );
    expect(await out('copy')).toBe(first);
  });

  it('keeps awkward numbers and text to the last digit', async () => {
    await withBlocks();
    const text = `${ROTATIONS.trim()},source,note\r\nsable,tarn,0.1,-0.30000000000000004,359.9999999999,1e-7,"Pell, ""A"" 2016","two\nlines"\r\n`;
    await send({ kind: 'rotations', text });
    const { text: out } = await app.call('GET', `${P}/exports/rotations.csv`, { as: lead });
    expect(out).toContain(
      'sable,tarn,0.1,-0.30000000000000004,359.9999999999,1e-7,,,unconstrained,,,,,,,,"Pell, ""A"" 2016","two\nlines"',
    );
  });
});

describe('limits and rights', () => {
  it('takes no import from who may not change the draft, and none from strangers', async () => {
    const stranger = await app.signedUp('Olaf Brandt');
    expect((await send({ kind: 'blocks', text: '{}', as: stranger })).status).toBe(404);
    const reviewer = await app.signedUp('Rhea Voss');
    await app.call('POST', `${P}/members`, { as: lead, body: { email: reviewer.email, role: 'reviewer' } });
    expect((await send({ kind: 'blocks', text: '{}', as: reviewer })).status).toBe(403);
  });

  it('answers 415 without multipart, 422 without a known kind or a file', async () => {
    expect((await app.call('POST', `${P}/imports`, { as: lead, body: {} })).status).toBe(415);
    expect((await send({ kind: 'spreadsheet', text: 'a' })).status).toBe(422);
    const form = new FormData();
    form.set('kind', 'blocks');
    expect((await app.call('POST', `${P}/imports`, { as: lead, raw: form })).status).toBe(422);
  });

  it('answers 413 for a file over the limit', async () => {
    const form = new FormData();
    form.set('kind', 'rotations');
    form.set('file', new File([new Uint8Array(65 * 1024 * 1024)], 'big.csv'));
    expect((await app.call('POST', `${P}/imports`, { as: lead, raw: form })).status).toBe(413);
  });

  it('refuses an import on a stale revision when it names one', async () => {
    await withBlocks();
    const form = new FormData();
    form.set('kind', 'rotations');
    form.set('file', new File([`${ROTATIONS}sable,tarn,10,2.5,-27,4\n`], 'r.csv'));
    const stale = await app.call('POST', `${P}/imports`, {
      as: lead,
      raw: form,
      headers: { 'If-Match': '"0"' },
    });
    expect(stale.status).toBe(412);
  });
});
