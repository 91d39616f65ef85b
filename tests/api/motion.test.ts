/**
 * The kernel's exact cases over HTTP. Each follows from the definition of a rotation about one pole or two at right angles
 * (Chang 1988 for the conventions); the sphere has R = 6371.0088 km (IUGG mean), so 1° is 111.195 km.
 */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { frameAt, matrixOf } from '~/features/motion/scene/frame';
import { turn } from '~/features/motion/globe/matrix';
import { createTestApp, type Answer, type TestApp } from '../support/app';
import { decodeModel } from '../../src/kernel';
import { add, addRotations, createTeam, square, type Team } from '../support/team';

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

type Rows = Parameters<typeof addRotations>[2];
const give = async (rows: Rows): Promise<void> => {
  const answer = await addRotations(app, team, rows);
  expect(answer.status, answer.text).toBeLessThan(300);
};
const get = (path: string): Promise<Answer> => app.call('GET', team.at(path), { as: team.reviewer });
const near = (value: number, expected: number, within: number): void =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(within);
const KM_PER_DEG = (6371.0088 * Math.PI) / 180;

describe('rotation', () => {
  it('between 90° about 90°N at 10 Ma and 90° about (0, 0) at 20 Ma is 70.529° about (45, 0) at 15 Ma', async () => {
    await give([['sable', 'spin-axis', 10, 90, 0, 90], ['sable', 'spin-axis', 20, 0, 0, 90]]); // prettier-ignore
    const { json } = await get('rotation?block=sable&age_ma=15&relative_to=spin-axis');
    near(json.pole_lat, 45, 1e-9);
    near(json.pole_lon, 0, 1e-9);
    near(json.angle_deg, 70.528779, 1e-6);
    expect(json).toMatchObject({
      version: 'draft',
      covariance: null,
      uncertainty: 'none of 1 links carries a covariance',
    });
    expect(json.chain[0]).toMatchObject({
      block: 'sable',
      relative_to: 'spin-axis',
      older_ma: 20,
      younger_ma: 10,
    });
  });

  it('of A by 90° about 90°N and B on A by 90° about (0, 0) is 120° about (35.264, 45)', async () => {
    await give([['a', 'axis', 10, 90, 0, 90], ['b', 'a', 10, 0, 0, 90]]); // prettier-ignore
    const { json } = await get('rotation?block=b&age_ma=10&relative_to=axis');
    near(json.pole_lat, 35.26439, 1e-5);
    near(json.pole_lon, 45, 1e-9);
    near(json.angle_deg, 120, 1e-9);
  });

  it('of 40° at 20 Ma about one pole is 10° at 5 Ma', async () => {
    await give([['sable', 'axis', 20, 25, 71, 40]]);
    near((await get('rotation?block=sable&age_ma=5&relative_to=axis')).json.angle_deg, 10, 1e-9);
  });

  it('of a block that goes from A to B and back to A takes the younger leg at each hand-over', async () => {
    await give([
      ['c', 'a', 10, 90, 0, 5], ['c', 'b', 10, 90, 0, 3], ['c', 'b', 20, 90, 0, 6], ['c', 'a', 20, 90, 0, 9], ['c', 'a', 30, 90, 0, 12],
      ['a', 'axis', 30, 90, 0, 0], ['b', 'axis', 30, 90, 0, 0],
    ]); // prettier-ignore
    const at = async (age: number): Promise<{ angle: number; reference: string }> => {
      const { json } = await get(`rotation?block=c&age_ma=${age}&relative_to=axis`);
      return { angle: json.angle_deg, reference: json.chain[0].relative_to };
    };
    // At a hand-over the younger leg applies.
    expect((await at(10)).reference).toBe('a');
    near((await at(10)).angle, 5, 1e-9);
    expect(await at(15)).toMatchObject({ reference: 'b' });
    near((await at(15)).angle, 4.5, 1e-9);
    expect((await at(20)).reference).toBe('b');
    near((await at(25)).angle, 10.5, 1e-9);
  });

  it('answers a question without sense by name, and an age without rotations by status', async () => {
    await give([['sable', 'axis', 20, 25, 71, 40]]);
    expect((await get('rotation?block=nobody&age_ma=5&relative_to=axis')).json.title).toBe('Unknown block');
    expect((await get('rotation?block=sable&age_ma=-5&relative_to=axis')).status).toBe(400);
    const older = await get('rotation?block=sable&age_ma=25&relative_to=axis');
    expect(older.status).toBe(200);
    expect(older.json).toMatchObject({ status: 'outside rotations', pole_lat: null, angle_deg: null });
  });
});

describe('a question', () => {
  beforeEach(() => give([['sable', 'axis', 20, 25, 71, 40]]));

  it('with a name that is not known, or one twice, is refused with those that are', async () => {
    const misspelt = await get('rotation?block=sable&age_ma=5&relativeto=sable');
    expect([misspelt.status, misspelt.json.errors[0].path]).toEqual([400, 'relativeto']);
    expect(misspelt.json.errors[0].problem).toContain('relative_to');
    const twice = await get('rotation?block=sable&age_ma=5&age_ma=6&relative_to=axis');
    expect([twice.status, twice.json.errors[0].read]).toEqual([400, '5, 6']);
  });

  it('over a window below zero is refused', async () => {
    const { status, json } = await get(
      'velocity?block=sable&lat=0&lon=0&age_ma=5&window_myr=-5&relative_to=axis',
    );
    expect(status).toBe(400);
    expect(json.detail).toContain('window_myr -5');
  });

  it('without a frame is answered in the project’s, else in the one that most blocks reach', async () => {
    expect((await get('rotation?block=sable&age_ma=5')).json.relative_to).toBe('axis');
    const settings = (held_still: string) =>
      app.call('PATCH', team.at(), { as: team.lead, body: { held_still } });
    expect((await settings('sable')).status).toBe(200);
    expect((await get('rotation?block=sable&age_ma=5')).json.relative_to).toBe('sable');
    const unknown = await settings('nobody');
    expect([unknown.status, unknown.json.errors[0].path]).toEqual([422, 'held_still']);
    const { items } = (await get('blocks')).json;
    const id = items.find(({ code }: { code: string }) => code === 'sable').id;
    await app.call('PATCH', team.at(`blocks/${id}`), {
      as: team.lead,
      body: { code: 'sable-isle' },
      revision: '*',
    });
    expect((await get('rotation?block=sable-isle&age_ma=5')).json.relative_to).toBe('sable-isle');
  });
});

describe('a loop', () => {
  it('leaves the blocks that it does not hold where they are', async () => {
    await give([
      ['a', 'b', 10, 90, 0, 5], ['b', 'a', 10, 90, 0, 3], ['c', 'axis', 10, 90, 0, 40],
    ]); // prettier-ignore
    for (const code of ['a', 'c'])
      await add(app, team, 'outlines', { block: code, geometry: square(170, 10) });
    const { status, json } = await get('quaternions?age_ma=5&relative_to=axis');
    expect(status).toBe(200);
    const statuses = Object.fromEntries(json.blocks.map((one: any) => [one.block, one.status]));
    expect(statuses).toEqual({ a: 'not connected', b: 'not connected', c: 'placed', axis: 'placed' });
    const placed = (await get('positions?age_ma=5&relative_to=axis')).json.features;
    expect(placed.map((one: any) => one.properties.block)).toEqual(['c']);
    expect((await get('slice.svg?age_ma=5&relative_to=axis')).status).toBe(200);
    expect((await get('rotation?block=a&age_ma=5&relative_to=axis')).status).toBe(409);
    expect((await get('quaternions?age_ma=5&relative_to=nobody')).status).toBe(404);
    expect((await get('quaternions?age_ma=-5&relative_to=axis')).status).toBe(400);
  });
});

describe('motions', () => {
  it('come as bytes to who asks for them, the same to the last bit', async () => {
    await give([
      ['sable', 'tarn', 20, 25.123456789, 71, 40], ['sable', 'axis', 20, 2, 7, 4], ['sable', 'axis', 60, 2, 8, 14], ['tarn', 'axis', 60, 1, 2, 3],
    ]); // prettier-ignore
    const plain = await get('motions');
    const bytes = await app.respond('GET', team.at('motions'), {
      as: team.reviewer,
      headers: { Accept: 'application/octet-stream, application/json;q=0.5' },
    });
    expect(bytes.headers.get('content-type')).toBe('application/octet-stream');
    expect(bytes.headers.get('vary')).toContain('Accept');
    expect(bytes.headers.get('etag')).toBe(plain.headers.get('etag'));
    expect(decodeModel(new Uint8Array(await bytes.arrayBuffer()))).toEqual(plain.json);
    expect(() => decodeModel(new Uint8Array(16))).toThrow(/DWM1/);
  });
});

describe('motion', () => {
  it('10° at 10 Ma and 25° at 20 Ma about 90°N: a forward stage of −15° and 166.8 mm/yr due west at the equator', async () => {
    await give([['sable', 'axis', 10, 90, 0, 10], ['sable', 'axis', 20, 90, 0, 25]]); // prettier-ignore
    const stage = (await get('stage?block=sable&older_ma=20&younger_ma=10&relative_to=axis&in=reference'))
      .json;
    // −15° about 90°N is 15° about 90°S.
    near(Math.sign(stage.pole_lat) * stage.angle_deg, -15, 1e-9);
    near(Math.abs(stage.pole_lat), 90, 1e-9);
    const { json } = await get('velocity?block=sable&lat=0&lon=0&age_ma=15&relative_to=axis');
    near(json.speed_mm_yr, 1.5 * KM_PER_DEG, 1e-6);
    near(json.speed_mm_yr, 166.8, 0.05);
    near(json.azimuth_deg, 270, 1e-9);
    near(json.east_mm_yr, -166.8, 0.05);
    near(json.north_mm_yr, 0, 1e-9);
    expect(json).toMatchObject({ older_ma: 20, younger_ma: 10 });
  });

  it('+1°/Myr forward about 90°N: 111.2 mm/yr at the equator, 55.6 at 60°, due east', async () => {
    await give([['sable', 'axis', 100, 90, 0, -100]]);
    const equator = (await get('velocity?block=sable&lat=0&lon=0&age_ma=50&relative_to=axis')).json;
    near(equator.speed_mm_yr, KM_PER_DEG, 1e-6);
    near(equator.azimuth_deg, 90, 1e-9);
    near(
      (await get('velocity?block=sable&lat=60&lon=10&age_ma=50&relative_to=axis')).json.speed_mm_yr,
      KM_PER_DEG / 2,
      1e-6,
    );
  });

  it('a drift path goes through the steps and the ages of rows, each with its place, speed and kind', async () => {
    await give([['sable', 'axis', 25, 90, 0, 25], ['sable', 'axis', 40, 90, 0, 55]]); // prettier-ignore
    const { json } = await get(
      'drift-path?block=sable&lat=10&lon=170&older_ma=45&younger_ma=0&step_ma=10&relative_to=axis',
    );
    expect(json.points.map((p: { age_ma: number }) => p.age_ma)).toEqual([0, 10, 20, 25, 30, 40, 45]);
    const at = (age: number) => json.points.find((p: { age_ma: number }) => p.age_ma === age);
    expect([25, 40].every((age) => at(age).at_row)).toBe(true);
    expect(at(10).at_row).toBe(false);
    // (10, 170) turned 25° about the north pole passes the antimeridian.
    near(at(25).lon, -165, 1e-9);
    near(at(25).lat, 10, 1e-9);
    near(at(20).speed_mm_yr, KM_PER_DEG * Math.cos(Math.PI / 18), 1e-6);
    near(at(30).speed_mm_yr, 2 * KM_PER_DEG * Math.cos(Math.PI / 18), 1e-6);
    expect(at(45)).toMatchObject({ lat: null, lon: null, status: 'outside rotations', ellipse_95: null });
    const csv = await get(
      'drift-path?block=sable&lat=10&lon=170&older_ma=40&younger_ma=0&step_ma=10&relative_to=axis&format=csv',
    );
    expect(csv.headers.get('content-type')).toContain('text/csv');
    const geojson = await get(
      'drift-path?block=sable&lat=10&lon=170&older_ma=40&younger_ma=0&step_ma=10&relative_to=axis&format=geojson',
    );
    expect(geojson.json.type).toBe('FeatureCollection');
  });

  it('a circuit of two 4°/Myr links agrees by hand and through motions, quaternions and rotation to 10⁻⁹ degrees', async () => {
    await give([['a', 'axis', 10, 90, 0, 40], ['b', 'a', 10, 0, 0, 40]]); // prettier-ignore
    const { json } = await get('rotation?block=b&age_ma=5&relative_to=axis');
    // By hand: 20° about z times 20° about x; w = cos²10°, so the angle is 2 acos(cos²10°).
    const c = Math.cos(Math.PI / 18);
    const s = Math.sin(Math.PI / 18);
    const hand = [c * c, c * s, s * s, c * s];
    near(json.angle_deg, (2 * Math.acos(c * c) * 180) / Math.PI, 1e-9);
    const rows = (await get('quaternions?age_ma=5&relative_to=axis')).json;
    const q = (rows.blocks ?? rows.items).find(
      (row: { block?: string; code?: string }) => (row.block ?? row.code) === 'b',
    ).quaternion;
    // q and −q are one rotation; the order of the two links is in the sign of the third component.
    const sign = Math.sign(q[0]);
    hand.forEach((component, i) => near(sign * q[i], component, 1e-11));
    const motions = (await get('motions')).json;
    expect(
      motions.blocks.find((block: { code: string }) => block.code === 'b').legs[0].stages[0],
    ).toMatchObject({ younger_ma: 0, older_ma: 10 });

    // What the globe draws from: one matrix a block at the age, here Rz(20°) Rx(20°) written out.
    const frame = frameAt(motions, 5, 'axis');
    const pose = matrixOf(frame, 'b')!;
    const [C, S] = [Math.cos(Math.PI / 9), Math.sin(Math.PI / 9)];
    const columns = [[C, S, 0], [-S * C, C * C, S], [S * S, -C * S, C]]; // prettier-ignore
    ([[1, 0, 0], [0, 1, 0], [0, 0, 1]] as const).forEach((axis, i) =>
      turn(pose, [...axis]).forEach((x, k) => near(x, columns[i]![k]!, (1e-9 * Math.PI) / 180)),
    ); // prettier-ignore
  });
});
