/** Outlines as people save them. RFC 7946 is the standard for positions, rings and their direction (section 3.1.6). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readBlocks } from '~/features/interchange/rules/blocks';
import { readFeatures } from '~/features/interchange/rules/features';
import { findCrossing } from '~/features/interchange/rules/crossings';
import { planBlocks } from '~/features/interchange/rules/plan-blocks';
import { destination, toLatLon, toVector, type Vector3 } from '../../../src/kernel';

type Ring = number[][];
const square = (w: number, s: number, e: number, n: number): Ring => [[w, s], [e, s], [e, n], [w, n], [w, s]]; // prettier-ignore
const block = (code: string, ring: Ring | null, more: object = {}) => ({
  type: 'Feature',
  properties: { code, name: code, kind: ring ? 'terrane' : 'frame', ...more },
  geometry: ring && { type: 'Polygon', coordinates: [ring] },
});
const file = (...features: object[]): string =>
  `{"type":"FeatureCollection","features":[\n${features.map((f) => JSON.stringify(f)).join(',\n')}\n]}`;
const ids = (reading: ReturnType<typeof readBlocks>): string[] => reading.asking.questions().map((q) => q.id);

describe('blocks.geojson', () => {
  it('takes an anticlockwise outline and a frame as they stand', () => {
    const reading = readBlocks(file(block('sable', square(20, -35, 50, -20)), block('spin-axis', null)));
    expect(reading.rejected).toEqual([]);
    expect(ids(reading)).toEqual([]);
    expect(reading.candidates.map((c) => [c.line, c.fields.fields.code, c.fields.outlines.length])).toEqual([
      [2, 'sable', 1],
      [3, 'spin-axis', 0],
    ]);
  });

  it.each([
    ['over the antimeridian, jumping', [[170, -10], [-170, -10], [-170, 12], [170, 12], [170, -10]]],
    ['over the antimeridian, unwrapped', [[170, -10], [190, -10], [190, 12], [170, 12], [170, -10]]],
    ['round the south pole', [[0, -60], [-90, -62], [180, -60], [90, -64], [0, -60]]],
  ])('reads %s without a question about its side', (_, ring) => {
    const reading = readBlocks(file(block('x', ring)));
    expect(reading.rejected).toEqual([]);
    expect(ids(reading)).toEqual([]);
  }); // prettier-ignore

  it('takes none of the features of one code where one of them is rejected', () => {
    const text = file(
      block('birch', square(0, 0, 9, 9), { appears_ma: -5, outline_older_ma: 50 }),
      block('birch', square(20, 0, 29, 9), { outline_younger_ma: 50 }),
      block('alder', square(40, 0, 49, 9)),
    );
    const { candidates, rejected } = readBlocks(text);
    expect(candidates.map((c) => c.fields.fields.code)).toEqual(['alder']);
    expect(rejected.map((row) => [row.line, row.column])).toEqual(
      expect.arrayContaining([
        [2, 'appears_ma'],
        [3, 'code'],
      ]),
    );
  });

  it.each([
    ['there and back again', [[0, 0], [10, 0], [20, 0], [10, 0], [0, 0]], 'the ring encloses nothing'],
    ['a box of the plane round the pole', [[-180, 60], [180, 60], [180, 90], [-180, 90], [-180, 60]], 'the ring encloses nothing'],
    ['an edge half round the globe', [[0, 0], [180, 0], [90, 40], [0, 0]], 'an edge joins opposite points of the globe'],
  ])('rejects %s', (_, ring, problem) => {
    expect(readBlocks(file(block('x', ring))).rejected[0]).toMatchObject({ column: 'geometry', problem });
  }); // prettier-ignore

  it('asks about a clockwise ring, which by its direction covers most of the globe', () => {
    const text = file(block('sable', square(20, -35, 50, -20).reverse()));
    const open = readBlocks(text);
    expect(ids(open)).toEqual(['ring_winding']);
    expect(open.asking.questions()[0]!.examples[0]).toMatch(/line 2: sable, 9\d\.\d % of the globe/);
    const larger = readBlocks(text, { ring_winding: 'the larger side' });
    expect(larger.candidates[0]!.fields.outlines[0]!.inside).toBe('larger');
    expect(
      ids(readBlocks(file(block('sable', square(20, -35, 50, -20).reverse(), { inside: 'smaller' })))),
    ).toEqual([]);
  });

  it('offers to follow straight lines where long edges part from great circles, and adds points only when told', () => {
    const text = file(block('sable', square(20, 40, 110, 60)), block('dune', square(20, -1, 20.5, 1)));
    const usual = readBlocks(text);
    expect(ids(usual)).toEqual([]);
    // A great circle between (40, 20) and (40, 110): its middle is at atan(tan 40° / cos 45°) = 49.8794°, 9.8794° from
    // the parallel (spherical trigonometry, Napier's rule), which is 1,099 km; along 60° it is 7.79°.
    expect(usual.asking.settled()).toMatchObject([{ id: 'edges', chosen: 'along great circles' }]);
    expect(usual.asking.settled()[0]!.ask).toContain('1,099 km away (line 2)');
    expect(usual.candidates[0]!.fields.outlines[0]!.geometry.coordinates[0]).toHaveLength(5);
    const straight = readBlocks(text, { edges: 'straight in longitude and latitude' });
    const ring = straight.candidates[0]!.fields.outlines[0]!.geometry.coordinates[0] as Ring;
    expect(ring).toHaveLength(2 * 90 + 2 * 20 + 1);
    expect(ring.filter(([, lat]) => lat === 40)).toHaveLength(91 + 1); // the first corner closes the ring
    expect(ring).toEqual(expect.arrayContaining(square(20, 40, 110, 60)));
    expect(ring.every(([lon, lat]) => lon === 20 || lon === 110 || lat === 40 || lat === 60)).toBe(true);
  });

  it('keeps an answered question open to another answer', () => {
    const text = file(block('sable', square(20, -35, 50, -20).reverse()));
    const answered = readBlocks(text, { ring_winding: 'the larger side' });
    expect(ids(answered)).toEqual([]);
    expect(answered.asking.settled()).toContainEqual(
      expect.objectContaining({ id: 'ring_winding', chosen: 'the larger side' }),
    );
  });

  it('asks about exchanged latitude and longitude, and exchanges only when told', () => {
    const ring = square(-35, 120, -20, 150);
    expect(ids(readBlocks(file(block('x', ring))))).toContain('swapped_lat_lon');
    const { candidates } = readBlocks(file(block('x', ring)), {
      swapped_lat_lon: 'exchange them',
      ring_winding: 'the smaller side',
    });
    expect(candidates[0]!.fields.outlines[0]!.geometry.coordinates[0]).toContainEqual([120, -35]);
    const kept = readBlocks(file(block('x', ring)), { swapped_lat_lon: 'keep them' });
    expect(kept.rejected[0]!.problem).toBe('a position off the globe');
  });

  it.each([
    ['a bow tie', [[0, 0], [10, 10], [10, 0], [0, 10], [0, 0]], /crosses itself/],
    ['an open ring', [[0, 0], [10, 0], [10, 10], [0, 10]], /not closed/],
    ['three positions', [[0, 0], [10, 0], [0, 0]], /four positions/],
    ['a latitude of 95', [[0, 0], [10, 0], [10, 95], [0, 10], [0, 0]], /off the globe/],
  ])('rejects %s and says where', (_, ring, problem) => {
    const { candidates, rejected } = readBlocks(file(block('good', square(0, 0, 5, 5)), block('bad', ring)));
    expect(candidates.map((c) => c.fields.fields.code)).toEqual(['good']);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]).toMatchObject({ line: 3, column: 'geometry' });
    expect(rejected[0]!.problem).toMatch(problem);
  }); // prettier-ignore

  it('joins features of one code into outlines by age and refuses two at once', () => {
    const old = block('x', square(0, 0, 9, 9), { outline_older_ma: 80, outline_younger_ma: 40 });
    const young = block('x', square(0, 0, 12, 9), { outline_older_ma: 40, outline_younger_ma: null });
    expect(readBlocks(file(old, young)).candidates[0]!.fields.outlines).toHaveLength(2);
    const clash = readBlocks(file(old, block('x', square(0, 0, 7, 7), { outline_older_ma: 60 })));
    expect(clash.rejected[0]!.problem).toMatch(/second outline at the same ages as line 2/);
  });

  it('says where JSON breaks, and what a wrong code could be', () => {
    expect(readBlocks('{"type":"FeatureCollection",\n"features":[{]}').rejected[0]).toMatchObject({
      line: 2,
      problem: 'not JSON',
    });
    expect(readBlocks(file(block('Sable Terrane', square(0, 0, 5, 5)))).rejected[0]).toMatchObject({
      column: 'code',
      hint: 'Write sable-terrane?',
    });
  });

  it('refuses ages that run backwards', () => {
    const { rejected } = readBlocks(
      file(block('x', square(0, 0, 5, 5), { appears_ma: 10, disappears_ma: 50 })),
    );
    expect(rejected[0]!.problem).toBe('the block disappears before it appears');
  });
});

describe('rings that cross on the sphere', () => {
  const crossed = (...rings: number[][][]) => findCrossing(rings) !== null;

  it('are found over the antimeridian and the pole, and a star-shaped one is not', () => {
    expect(crossed([[175, 0], [-175, 10], [-175, 0], [175, 10], [175, 0]])).toBe(true);
    expect(crossed([[0, 80], [180, 80], [90, 80], [-90, 80], [0, 80]])).toBe(true);
    const star = Array.from({ length: 720 }, (_, i) => [i / 2, -70 + (i % 2) * 12]);
    expect(crossed([...star, star[0]!])).toBe(false);
  });

  it('are found where they meet at a vertex, and may touch there', () => {
    expect(crossed([[0, 0], [10, 10], [20, 20], [20, 0], [10, 10], [0, 20], [0, 0]])).toBe(true);
    expect(crossed([[0, 0], [10, 10], [20, 0], [20, 20], [10, 10], [0, 20], [0, 0]])).toBe(false);
    // A vertex on the equator, within an edge along it.
    expect(crossed([[0, 0], [20, 0], [20, 10], [10, 0], [5, -10], [0, 0]])).toBe(true);
    expect(crossed([[0, 0], [20, 0], [20, 10], [10, 0], [0, 10], [0, 0]])).toBe(false);
  });

  it('are found between rings', () => {
    expect(crossed(square(0, 0, 10, 10), square(5, 5, 15, 15))).toBe(true);
    expect(crossed(square(0, 0, 10, 10), square(10, 0, 20, 10))).toBe(false);
    expect(crossed(square(0, 0, 30, 10), square(10, -40, 20, 40))).toBe(true);
  });

  it('agree with trying every pair of edges', () => {
    const jitter = fc.array(fc.tuple(fc.double({ min: 0.55, max: 1, noNaN: true }), fc.double({ min: -1.5, max: 1.5, noNaN: true })), { minLength: 5, maxLength: 40 });
    const place = fc.tuple(fc.double({ min: -180, max: 180, noNaN: true }), fc.double({ min: -80, max: 80, noNaN: true }), fc.double({ min: 0.1, max: 60, noNaN: true }));
    let crossings = 0;
    fc.assert(
      fc.property(jitter, place, (radii, [lon, lat, size]) => {
        const ring = radii.map(([r, turn], i) => {
          const v = destination(toVector(lat, lon), ((i + turn) * 360) / radii.length, r * size * 111);
          const at = toLatLon(v);
          return [at.lon, at.lat];
        });
        const closed = [...ring, ring[0]!];
        const slow = everyPairCrosses(closed);
        if (slow) crossings++;
        expect(crossed(closed)).toBe(slow);
      }),
      { numRuns: 400 },
    );
    expect(crossings).toBeGreaterThan(20);
  });

  it('of a hundred thousand vertices are looked through without trying every pair', () => {
    const n = 100_000;
    const ring = Array.from({ length: n }, (_, i) => {
      const at = toLatLon(destination(toVector(40, 50), (i * 360) / n, 2000 + 30 * Math.sin(i) + 20 * Math.sin(i / 7)));
      return [at.lon, at.lat];
    });
    expect(crossed([...ring, ring[0]!])).toBe(false);
  });
}); // prettier-ignore

/** Signs of triple products alone, for edges that share no end. */
function everyPairCrosses(ring: readonly (readonly number[])[]): boolean {
  const v = ring.slice(0, -1).map(([lon, lat]) => toVector(lat!, lon!));
  const det = (a: Vector3, b: Vector3, c: Vector3): number =>
    a[0] * (b[1] * c[2] - b[2] * c[1]) -
    a[1] * (b[0] * c[2] - b[2] * c[0]) +
    a[2] * (b[0] * c[1] - b[1] * c[0]);
  const n = v.length;
  for (let i = 0; i < n; i++) {
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue;
      const [a, b, c, d] = [v[i]!, v[i + 1]!, v[j]!, v[(j + 1) % n]!];
      const [s1, s2, s3, s4] = [det(a, b, c), det(a, b, d), det(c, d, a), det(c, d, b)];
      if (s1 > 0 !== s2 > 0 && s3 > 0 !== s4 > 0 && s1 > 0 === s4 > 0) return true;
    }
  }
  return false;
}

describe('what else an outline can hold', () => {
  const one = (geometry: object, properties: object = {}) =>
    file({ type: 'Feature', properties: { code: 'x', ...properties }, geometry });
  const polygon = (...coordinates: number[][][]) => ({ type: 'Polygon', coordinates });

  it('heights are left out: of 0 with a note, others when told', () => {
    const high = (z: number) => polygon(square(0, 0, 5, 5).map((p) => [...p, z]));
    const flat = readBlocks(one(high(0)));
    expect(flat.notes).toContain('Heights of 0 are left out.');
    expect(ids(flat)).toEqual([]);
    expect(flat.candidates[0]!.fields.outlines[0]!.geometry.coordinates[0]![0]).toHaveLength(2);
    expect(ids(readBlocks(one(high(120))))).toEqual(['heights']);
    const left = readBlocks(one(high(120)), { heights: 'leave them out' });
    expect(left.candidates[0]!.fields.outlines[0]!.geometry.coordinates[0]![0]).toHaveLength(2);
    const kept = planBlocks(readBlocks(one(high(120)), { heights: 'reject these features' }), []);
    expect(kept.rejected[0]!.problem).toBe('a position with a height');
  });

  it('a ring round a pole may run on through all longitudes', () => {
    // 512.2 − 152.2 is 360.00000000000006 in binary.
    for (const longitudes of [
      [-180, -90, 0, 90, 180],
      [152.2, 250, 350, 440, 512.2],
    ]) {
      const ring = longitudes.map((lon) => [lon, -60]);
      const plan = planBlocks(readBlocks(one(polygon(ring))), []);
      expect([plan.accepted, plan.rejected]).toEqual([1, []]);
    }
  });

  it('a hole lies within, and does not cross', () => {
    const outer = square(0, 0, 20, 20);
    expect(readBlocks(one(polygon(outer, square(5, 5, 9, 9)))).rejected).toEqual([]);
    const problem = (hole: number[][]) => readBlocks(one(polygon(outer, hole))).rejected[0]!.problem;
    expect(problem(square(30, 5, 34, 9))).toBe('a hole lies outside the outline that it is in');
    expect(problem(square(15, 5, 25, 9))).toMatch(/two rings of the outline cross: 1 and 2/);
  });

  it('the larger side of several parts is refused', () => {
    const parts = { type: 'MultiPolygon', coordinates: [[square(0, 0, 5, 5)], [square(40, 0, 45, 5)]] };
    expect(readBlocks(one(parts)).rejected).toEqual([]);
    expect(readBlocks(one(parts, { inside: 'larger' })).rejected[0]!.problem).toMatch(/whole globe/);
  });

  it.each(['66 30', '66 E', '12 S', "66° 30'"])('an age of %s is no age', (age) => {
    const { rejected } = readBlocks(one(polygon(square(0, 0, 5, 5)), { appears_ma: age }));
    expect(rejected).toMatchObject([{ column: 'appears_ma', read: age, problem: 'written as an angle' }]);
  });

  it('the line is that of the feature, whatever the collection is called', () => {
    const text = `{"type":"FeatureCollection","name":"features",\n"features":[\n{"type":"Feature","properties":{"code":"X!"},"geometry":null}]}`;
    expect(readBlocks(text).rejected[0]).toMatchObject({ line: 3, column: 'code' });
    expect(readBlocks('{"type":"FeatureCollection",\n"features": nul}').rejected[0]).toMatchObject({
      line: 2,
    });
    expect(readBlocks('{"type":"FeatureCollection",\n"features": [\n').rejected[0]).toMatchObject({
      line: 3,
    });
  });
});

describe('features.geojson', () => {
  it('is carried by a block of the project', () => {
    const line = { type: 'LineString', coordinates: [[0, 1], [2, 3]] }; // prettier-ignore
    const feature = (props: object) => ({ type: 'Feature', properties: props, geometry: line });
    const text = file(
      feature({ block: 'sable', kind: 'layer', name: 'coast' }),
      feature({ block: 'nobody', kind: 'layer' }),
      feature({ block: 'sable', kind: 'beach' }),
    );
    const { candidates, rejected } = readFeatures(text, new Set(['sable']));
    expect(candidates).toHaveLength(1);
    expect(rejected.map((r) => [r.line, r.column])).toEqual([
      [3, 'block'],
      [4, 'kind'],
    ]);
  });

  it('names the properties that it does not read', () => {
    const point = { type: 'Feature', properties: { block: 'sable', kind: 'rock', colour: 'red' }, geometry: { type: 'Point', coordinates: [1, 2, 0] } }; // prettier-ignore
    const { notes, candidates } = readFeatures(file(point), new Set(['sable']));
    expect(notes).toEqual(['Heights of 0 are left out.', 'Properties not read: colour.']);
    expect(candidates[0]!.fields.geometry).toEqual({ type: 'Point', coordinates: [1, 2] });
  });
});
