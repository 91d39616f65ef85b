/** Motion between two blocks over HTTP. The figures follow from the definition of a rotation about one pole. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createTestApp, type Answer, type TestApp } from '../support/app';
import { closeWorkers } from '~/server/workers';
import { add, addRotations, createTeam, type Team } from '../support/team';

let app: TestApp;
let team: Team;
beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(async () => {
  await app.reset();
  team = await createTeam(app);
});
afterAll(async () => {
  await closeWorkers();
  await app.close();
});

const get = (path: string): Promise<Answer> => app.call('GET', team.at(path), { as: team.reviewer });
const KM_PER_DEG = (6371.0088 * Math.PI) / 180;

describe('convergence', () => {
  // B turns by 1° per Myr about 90°N as seen from A: forward in time due east at the equator where angles fall with age.
  beforeEach(() => addRotations(app, team, [['b', 'a', 20, 90, 0, -20], ['a', 'axis', 20, 0, 0, 0]])); // prettier-ignore

  it('is closing, slip and obliquity across a margin, by the signs of the definition', async () => {
    const at = async (azimuth: number) =>
      (
        await get(
          `convergence?block=b&relative_to=a&lat=0&lon=10&margin_azimuth=${azimuth}&older_ma=20&step_ma=10`,
        )
      ).json;
    const north = await at(0);
    expect(north).toMatchObject({ block: 'b', relative_to: 'a', coordinates_of: 'a', version: 'draft' });
    expect(north.points.map(({ age_ma, at_row }: any) => [age_ma, at_row])).toEqual([[0, true], [10, false], [20, true]]); // prettier-ignore
    for (const point of north.points) {
      expect(point.normal_mm_yr).toBeCloseTo(KM_PER_DEG, 6);
      expect(point.tangential_mm_yr).toBeCloseTo(0, 6);
      expect(point.obliquity_deg).toBeCloseTo(0, 6);
      expect(point.azimuth_deg).toBeCloseTo(90, 6);
    }
    const oblique = (await at(45)).points[1];
    expect(oblique.normal_mm_yr).toBeCloseTo(KM_PER_DEG / Math.SQRT2, 6);
    expect(oblique.tangential_mm_yr).toBeCloseTo(KM_PER_DEG / Math.SQRT2, 6);
    expect(oblique.obliquity_deg).toBeCloseTo(45, 6);
    expect((await at(180)).points[1].normal_mm_yr).toBeCloseTo(-KM_PER_DEG, 6);
  });

  it('comes as a table, and says by status where there is none', async () => {
    const asked = 'convergence?block=b&relative_to=a&lat=0&lon=10&margin_azimuth=0&older_ma=30&step_ma=30';
    const { text, headers } = await get(`${asked}&format=csv`);
    expect(headers.get('content-type')).toContain('text/csv');
    const [head, ...rows] = text
      .trim()
      .split('\r\n')
      .map((line) => line.split(','));
    expect(head!.slice(0, 8)).toEqual(['block', 'relative_to', 'coordinates_of', 'version', 'lat', 'lon', 'margin_azimuth', 'age_ma']); // prettier-ignore
    expect(rows.map((row) => [row[7], row.at(-1)])).toEqual([['0', 'placed'], ['20', 'placed'], ['30', 'outside rotations']]); // prettier-ignore
    expect((await get(asked.replace('lat=0', 'lat=95'))).status).toBe(400);
    expect((await get(asked.replace('block=b', 'block=nobody'))).status).toBe(404);
  });
});

describe('separation', () => {
  // The southern tip of b lies 10° of meridian north of the equator, a's edge, at 60 Ma and comes south by 0.5° per Myr:
  // the two meet at 40 Ma.
  beforeEach(async () => {
    await addRotations(app, team, [['b', 'a', 60, 0, 90, -30], ['a', 'axis', 60, 90, 0, 0]]); // prettier-ignore
    const south = [
      [-5, -30],
      [5, -30],
      [5, 0],
      [-5, 0],
      [-5, -30],
    ];
    const north = [
      [0, -20],
      [5, 10],
      [-5, 10],
      [0, -20],
    ];
    await add(app, team, 'outlines', { block: 'a', geometry: { type: 'Polygon', coordinates: [south] } });
    await add(app, team, 'outlines', { block: 'b', geometry: { type: 'Polygon', coordinates: [north] } });
  });

  it('falls to nothing at first contact, and overlaps from there', async () => {
    const { status, json } = await get('separation?block_a=a&block_b=b&older_ma=60&step_ma=10');
    expect(status).toBe(200);
    const at = (age: number) => json.points.find((point: any) => point.age_ma === age);
    expect(at(60).distance_km).toBeCloseTo(10 * KM_PER_DEG, 3);
    expect(at(60)).toMatchObject({ overlap_km2: 0, overlap_percent: 0, status: 'placed' });
    expect(at(50).distance_km).toBeCloseTo(5 * KM_PER_DEG, 3);
    expect(at(20).distance_km).toBe(0);
    expect(at(20).overlap_percent).toBeGreaterThan(5);
    expect(at(20).nearest_a.lat).toBeCloseTo(at(20).nearest_b.lat, 9);
    expect(at(60).nearest_a).toMatchObject({ lat: expect.closeTo(0, 6), lon: expect.closeTo(0, 6) });
    expect(json.first_contact).toMatchObject({ status: 'contact', by: 'motion' });
    expect(json.first_contact_ma).toBeCloseTo(40, 2);
    const near = (await get('separation?block_a=a&block_b=b&older_ma=60&step_ma=10&tolerance_km=100')).json;
    expect(near.first_contact_ma).toBeCloseTo(40 + 100 / KM_PER_DEG / 0.5, 2);
  });

  it('comes as a table, and refuses what has no answer', async () => {
    const { text } = await get('separation?block_a=a&block_b=b&older_ma=80&step_ma=40&format=csv');
    const [head, ...rows] = text
      .trim()
      .split('\r\n')
      .map((line) => line.split(','));
    expect(rows.map((row) => [row[head!.indexOf('age_ma')], row.at(-1)])).toEqual([
      ['0', 'placed'], ['40', 'placed'], ['60', 'placed'], ['80', 'outside rotations'],
    ]); // prettier-ignore
    expect((await get('separation?block_a=a&block_b=nobody&older_ma=60')).status).toBe(404);
    expect((await get('separation?block_a=a&block_b=b&older_ma=60&step_ma=0.001')).status).toBe(400);
    expect((await get('separation?block_a=a&block_b=b&older_ma=60&tolerance_km=-1')).status).toBe(400);
    await addRotations(app, team, [['a', 'b', 30, 0, 0, 5]]);
    const looped = await get('separation?block_a=a&block_b=b&older_ma=60');
    expect([looped.status, [...looped.json.loop].sort()]).toEqual([409, ['a', 'b']]);
  });
});

describe('a flow line', () => {
  // The pair opens by 20° in 20 Myr about 90°N: 111.2 mm/yr at the equator, half of it on each flank.
  beforeEach(() => addRotations(app, team, [['b', 'a', 20, 90, 0, -20], ['a', 'axis', 20, 0, 0, 0]])); // prettier-ignore

  it('leaves the ridge on both flanks, by halves unless told otherwise', async () => {
    const asked = 'flow-line?block_a=a&block_b=b&lat=0&lon=10&older_ma=20&step_ma=10';
    const { json } = await get(asked);
    const oldest = json.points.at(-1);
    expect(json.fraction).toBe(0.5);
    expect(oldest.full_rate_mm_yr).toBeCloseTo(KM_PER_DEG, 6);
    expect(oldest.a.rate_mm_yr).toBeCloseTo(KM_PER_DEG / 2, 6);
    // a lies west of the ridge, b east: floor of 20 Ma is 10° from the ridge on each.
    expect(oldest.a).toMatchObject({ lat: expect.closeTo(0, 9), lon: expect.closeTo(0, 9) });
    expect(oldest.b).toMatchObject({ lat: expect.closeTo(0, 9), lon: expect.closeTo(20, 9) });
    const uneven = (await get(`${asked}&fraction=0.25`)).json.points.at(-1);
    expect([uneven.a.lon, uneven.b.lon]).toEqual([expect.closeTo(5, 9), expect.closeTo(25, 9)]);
    const { text } = await get(`${asked}&format=csv`);
    expect(text.split('\r\n')[0]).toMatch(
      /^block_a,block_b,coordinates_of,lat,lon,fraction,version,age_ma,a_lat/,
    );
    expect((await get(`${asked}&fraction=1.5`)).status).toBe(400);
  });
});
