import { describe, expect, it } from 'vitest';
import {
  compileModel,
  type ContactRequest,
  type DatedOutline,
  distanceKm,
  EARTH_RADIUS_KM,
  firstContact,
  type Outline,
  overlap,
  placedAt,
  poseAt,
  ROOT_TOLERANCE_MYR,
  rotate,
  separation,
  separationPath,
  type SeparationRequest,
  toDegrees,
  toRadians,
  toVector,
} from '../../../src/kernel';
import { block, frame, placed, row } from '../support';
import { box, outline, ring } from './outlines';

const KM_PER_DEGREE = toRadians(1) * EARTH_RADIUS_KM;
const always = (o: Outline): DatedOutline[] => [{ outline: o, appears_ma: null, disappears_ma: null }];

/** The northern edge of avon is the equator; brant’s southern tip stands on it from 40 Ma on, 10° north of it at 60 Ma. */
const avon = box(-10, -20, 10, 0);
const brant = outline([ring([0, 0], [5, 15], [-5, 15])]);
const closing = compileModel(
  [block('avon'), block('brant'), block('corrie', { appears_ma: 30 }), frame('spin')],
  [
    row(['avon', 'spin', 80, 48, 61, 30]),
    row(['brant', 'avon', 40, 0, 90, 0]),
    row(['brant', 'avon', 60, 0, 90, -10]),
    row(['corrie', 'avon', 50, 0, 90, -10]),
  ],
);
const request: ContactRequest = {
  block_a: 'avon',
  block_b: 'brant',
  outlines_a: always(avon),
  outlines_b: always(brant),
  older_ma: 60,
  younger_ma: 0,
  step_ma: 7,
  tolerance_km: 0,
};

describe('first contact', () => {
  it('of a gap of 10° at 60 Ma that closes by 0.5°/Myr is at 40 Ma, from either block', () => {
    for (const swap of [false, true]) {
      const found = firstContact(closing, swap ? swapped(request) : request);
      expect(found).toMatchObject({ status: 'contact', by: 'motion' });
      if (found.status !== 'contact') return;
      expect(Math.abs(found.age_ma - 40)).toBeLessThan(ROOT_TOLERANCE_MYR);
      expect(found.older_ma - found.younger_ma).toBeLessThanOrEqual(ROOT_TOLERANCE_MYR);
    }
  });

  it('with a tolerance is as much earlier, within the stated width', () => {
    const found = firstContact(closing, { ...request, tolerance_km: KM_PER_DEGREE });
    expect(found).toMatchObject({ status: 'contact', by: 'motion' });
    if (found.status !== 'contact') return;
    expect(found.older_ma).toBeGreaterThanOrEqual(42);
    expect(found.younger_ma).toBeLessThanOrEqual(42);
    expect(found.older_ma - found.younger_ma).toBeLessThanOrEqual(ROOT_TOLERANCE_MYR);
  });

  it('is the start where they begin in contact, and where one comes into being upon the other', () => {
    expect(firstContact(closing, { ...request, older_ma: 33 })).toEqual({
      status: 'contact',
      age_ma: 33,
      older_ma: 33,
      younger_ma: 33,
      by: 'first place',
    });
    const upon = { ...request, block_b: 'corrie', outlines_b: always(box(-1, -9, 1, -8)) };
    expect(firstContact(closing, upon)).toMatchObject({ age_ma: 30, by: 'first place' });
    expect(firstContact(closing, { ...upon, younger_ma: 30 })).toMatchObject({
      age_ma: 30,
      by: 'first place',
    });
    const later = [{ outline: box(-1, -9, 1, -8), appears_ma: 12, disappears_ma: null }];
    expect(firstContact(closing, { ...upon, outlines_b: later })).toMatchObject({
      age_ma: 12,
      by: 'first place',
    });
  });

  it('says by a jump where an outline grows into the other', () => {
    const grows = [
      { outline: brant, appears_ma: null, disappears_ma: 50 },
      { outline: outline([ring([0, -20], [5, 15], [-5, 15])]), appears_ma: 50, disappears_ma: null },
    ];
    expect(firstContact(closing, { ...request, outlines_b: grows })).toEqual({
      status: 'contact',
      age_ma: 50,
      older_ma: 50,
      younger_ma: 50,
      by: 'jump',
    });
  });

  it('is none where they stay apart, with the least distance, and where they are never placed', () => {
    const north = { ...request, outlines_b: always(outline([ring([0, 3], [5, 15], [-5, 15])])) };
    const found = firstContact(closing, north);
    expect(found.status).toBe('apart');
    if (found.status === 'apart') {
      expect(found.least_km).toBeCloseTo(3 * KM_PER_DEGREE, 6);
      expect(found.least_ma).toBeLessThan(40 + 1e-6);
    }
    expect(firstContact(closing, { ...request, older_ma: 90, younger_ma: 70 })).toEqual({
      status: 'not placed',
    });
    expect(firstContact(closing, { ...request, outlines_a: [] })).toEqual({ status: 'not placed' });
  });

  it('does not miss a pass between two samples', () => {
    // Brant’s tip goes by 0.5° north of avon’s at 1°/Myr, within 0.54° for 0.4 Myr about 30 Ma.
    const passing = compileModel(
      [block('avon', { kind: 'frame' }), block('brant')],
      [row(['brant', 'avon', 60, 90, 0, -60])],
    );
    const by: ContactRequest = {
      ...request,
      outlines_a: always(outline([ring([0, 0], [-1, -5], [1, -5])])),
      outlines_b: always(outline([ring([30, 0.5], [31, 5], [29, 5])])),
      step_ma: 60,
      tolerance_km: 60,
    };
    const reach = 60 / EARTH_RADIUS_KM;
    const before = toDegrees(Math.acos(Math.cos(reach) / Math.cos(toRadians(0.5))));
    const found = firstContact(passing, by);
    expect(found.status === 'contact' && found.age_ma).toBeCloseTo(30 + before, 5);
    expect(firstContact(passing, { ...by, tolerance_km: 55 }).status).toBe('apart');
  });

  it('names what makes no sense', () => {
    const wrong: [Partial<ContactRequest>, string, string][] = [
      [{ tolerance_km: -1 }, 'OutOfRange', 'tolerance_km'],
      [{ tolerance_km: NaN }, 'NonFinite', 'tolerance_km'],
      [{ step_ma: 0 }, 'OutOfRange', 'step_ma'],
      [{ younger_ma: 61 }, 'OutOfRange', 'older_ma'],
      [{ block_a: 'limbo' }, 'UnknownBlock', 'block_a'],
      [{ block_b: 'limbo' }, 'UnknownBlock', 'block_b'],
    ];
    for (const [change, name, quantity] of wrong)
      expect(() => firstContact(closing, { ...request, ...change })).toThrow(
        expect.objectContaining({ name, quantity }),
      );
  });
});

function swapped<T extends ContactRequest>(r: T): T {
  return {
    ...r,
    block_a: r.block_b,
    block_b: r.block_a,
    outlines_a: r.outlines_b,
    outlines_b: r.outlines_a,
  };
}

describe('separation over a span of ages', () => {
  const { tolerance_km: _tolerance, ...span } = request;
  const asked: SeparationRequest = { ...span, older_ma: 70, step_ma: 25 };

  it('asks at steps, ends and rows, with a status, and gives the nearest places', () => {
    const path = separationPath(closing, asked);
    expect(path.map(({ age_ma, at_row }) => (at_row ? [age_ma] : age_ma))).toEqual([
      [0],
      25,
      [40],
      50,
      [60],
      70,
    ]);
    expect(path.map(({ distance_km }) => distance_km && Math.round(distance_km / KM_PER_DEGREE))).toEqual([
      0,
      0,
      0,
      5,
      10,
      null,
    ]);
    expect(path.at(-1)).toEqual({
      age_ma: 70,
      status: 'outside rotations',
      at_row: false,
      distance_km: null,
      overlap_km2: null,
      overlap_percent: null,
      nearest_a: null,
      nearest_b: null,
    });
    const { nearest_a, nearest_b, overlap_km2, overlap_percent } = path[3]!;
    expect(distanceKm(toVector(nearest_a!.lat, nearest_a!.lon), toVector(0, 0))).toBeLessThan(1e-8);
    expect(distanceKm(toVector(nearest_b!.lat, nearest_b!.lon), toVector(5, 0))).toBeLessThan(1e-8);
    expect([overlap_km2, overlap_percent]).toEqual([0, 0]);
  });

  it('gives the nearest places in a frame, the same distance apart', () => {
    const [here] = separationPath(closing, { ...asked, older_ma: 50, younger_ma: 50 });
    const [there] = separationPath(closing, {
      ...asked,
      older_ma: 50,
      younger_ma: 50,
      coordinates_of: 'spin',
    });
    const q = placed(poseAt(closing, 'avon', 50, 'spin')).quaternion;
    for (const side of ['nearest_a', 'nearest_b'] as const) {
      const moved = rotate(q, toVector(here![side]!.lat, here![side]!.lon));
      expect(distanceKm(moved, toVector(there![side]!.lat, there![side]!.lon))).toBeLessThan(1e-8);
    }
    expect(there?.distance_km).toBe(here?.distance_km);
  });

  it('gives what the two share, and says where one has no outline', () => {
    const within = always(box(-1, -9, 1, -8));
    const [point] = separationPath(closing, { ...asked, outlines_b: within, older_ma: 30, younger_ma: 30 });
    const both = overlap(placedAt(avon), placedAt(within[0]!.outline));
    expect(point?.overlap_km2).toBeCloseTo(both.km2, 6);
    expect(point?.overlap_percent).toBeCloseTo(100, 9);
    expect(point?.distance_km).toBe(separation(placedAt(avon), placedAt(within[0]!.outline))?.km);
    const late = [{ outline: brant, appears_ma: 20, disappears_ma: null }];
    const path = separationPath(closing, { ...asked, outlines_b: late, older_ma: 40, step_ma: 40 });
    expect(path.map(({ status }) => status)).toEqual(['placed', 'no outline']);
    const young = separationPath(closing, { ...asked, block_b: 'corrie', older_ma: 40, step_ma: 40 });
    expect(young.map(({ status }) => status)).toEqual(['placed', 'older than block']);
  });
});
