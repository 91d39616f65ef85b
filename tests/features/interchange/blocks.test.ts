/** Outlines as people save them. RFC 7946 is the standard for positions, rings and their direction (section 3.1.6). */
import { describe, expect, it } from 'vitest';
import { readBlocks } from '~/features/interchange/rules/blocks';
import { readFeatures } from '~/features/interchange/rules/features';
import { selfCrossing } from '~/features/interchange/rules/rings';

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

describe('a ring that crosses itself on the sphere', () => {
  it('is found over the antimeridian and the pole, and a star-shaped one is not', () => {
    expect(selfCrossing([[175, 0], [-175, 10], [-175, 0], [175, 10], [175, 0]])).not.toBeNull();
    expect(selfCrossing([[0, 80], [180, 80], [90, 80], [-90, 80], [0, 80]])).not.toBeNull();
    const star = Array.from({ length: 720 }, (_, i) => [i / 2, -70 + (i % 2) * 12]);
    expect(selfCrossing([...star, star[0]!])).toBeNull();
  }); // prettier-ignore
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
});
