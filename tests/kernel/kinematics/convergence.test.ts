import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angularVelocity,
  compileModel,
  CONVERGENCE_ERROR,
  convergenceAcross,
  convergencePath,
  type ConvergenceRequest,
  EARTH_RADIUS_KM,
  STILL_MM_YR,
  toRadians,
  toVector,
  velocityAcross,
  velocityAt,
} from '../../../src/kernel';
import { block, frame, longitude, model as anyModel, placed, row } from '../support';

const towards = (azimuth: number, speed = 60): [east: number, north: number] => [
  speed * Math.sin(toRadians(azimuth)),
  speed * Math.cos(toRadians(azimuth)),
];
const speed = fc.double({ min: -200, max: 200, noNaN: true });

describe('convergence across a margin', () => {
  it('of 60 mm/yr towards 045 across one that runs north closes and slips by 60/√2 each', () => {
    const { normal_mm_yr, tangential_mm_yr, obliquity_deg } = convergenceAcross(...towards(45), 0);
    expect(normal_mm_yr).toBeCloseTo(60 / Math.SQRT2, 12);
    expect(tangential_mm_yr).toBeCloseTo(60 / Math.SQRT2, 12);
    expect(obliquity_deg).toBeCloseTo(45, 12);
    const back = convergenceAcross(...towards(225), 0);
    expect(back.normal_mm_yr).toBeCloseTo(-60 / Math.SQRT2, 12);
    expect(back.tangential_mm_yr).toBeCloseTo(-60 / Math.SQRT2, 12);
    expect(back.obliquity_deg).toBeCloseTo(45, 12);
  });

  it.each([
    // Left of a margin that runs east lies the north: what goes south closes.
    { motion: 180, margin: 90, normal: 60, tangential: 0, obliquity: 0 },
    { motion: 0, margin: 90, normal: -60, tangential: 0, obliquity: 0 },
    { motion: 90, margin: 90, normal: 0, tangential: 60, obliquity: 90 },
    { motion: 270, margin: 90, normal: 0, tangential: -60, obliquity: 90 },
    { motion: 90, margin: 330, normal: 60 * Math.cos(toRadians(30)), tangential: -30, obliquity: 30 },
  ])('towards $motion across $margin', ({ motion, margin, normal, tangential, obliquity }) => {
    const found = convergenceAcross(...towards(motion), margin);
    expect(found.normal_mm_yr).toBeCloseTo(normal, 12);
    expect(found.tangential_mm_yr).toBeCloseTo(tangential, 12);
    expect(found.obliquity_deg).toBeCloseTo(obliquity, 12);
    expect(found.azimuth_deg).toBeCloseTo(motion, 12);
    expect(found.speed_mm_yr).toBeCloseTo(60, 12);
  });

  it('has neither azimuth nor obliquity where nothing moves', () => {
    const still = { azimuth_deg: null, obliquity_deg: null };
    expect(convergenceAcross(0, 0, 30)).toMatchObject({ normal_mm_yr: 0, speed_mm_yr: 0, ...still });
    expect(convergenceAcross(STILL_MM_YR / 2, 0, 30)).toMatchObject(still);
    expect(convergenceAcross(STILL_MM_YR * 2, 0, 30).obliquity_deg).toBeCloseTo(30, 9);
  });

  it('comes back to east and north within the stated error, and keeps the speed', () => {
    let worst = 0;
    fc.assert(
      fc.property(speed, speed, longitude, (east, north, margin) => {
        const { normal_mm_yr, tangential_mm_yr, speed_mm_yr } = convergenceAcross(east, north, margin);
        const back = velocityAcross(normal_mm_yr, tangential_mm_yr, margin);
        const miss = Math.hypot(back.east_mm_yr - east, back.north_mm_yr - north);
        if (speed_mm_yr > 1e-3) worst = Math.max(worst, miss / speed_mm_yr);
        expect(miss).toBeLessThanOrEqual(CONVERGENCE_ERROR * speed_mm_yr + 1e-300);
        expect(Math.abs(Math.hypot(normal_mm_yr, tangential_mm_yr) - speed_mm_yr)).toBeLessThanOrEqual(
          1e-15 * speed_mm_yr + 1e-300,
        );
      }),
      { numRuns: 5000 },
    );
    expect(worst).toBeGreaterThan(CONVERGENCE_ERROR / 10);
  });

  it('looks the same from the other block, across the margin turned round', () => {
    fc.assert(
      fc.property(speed, speed, longitude, (east, north, margin) => {
        const one = convergenceAcross(east, north, margin);
        const other = convergenceAcross(-east, -north, margin + 180);
        expect(other.normal_mm_yr).toBeCloseTo(one.normal_mm_yr, 9);
        expect(other.tangential_mm_yr).toBeCloseTo(one.tangential_mm_yr, 9);
      }),
    );
  });

  it('does not take an azimuth that is no number', () => {
    expect(() => convergenceAcross(1, 1, NaN)).toThrow(
      expect.objectContaining({ name: 'NonFinite', quantity: 'margin_azimuth_deg' }),
    );
  });
});

const model = compileModel(
  [block('avon'), block('brant', { appears_ma: 50 }), block('corrie'), frame('spin')],
  [
    // Forward in time brant goes east past avon at 0.5°/Myr, and twice as fast before 20 Ma.
    row(['avon', 'spin', 100, 48, 61, 30]),
    row(['brant', 'avon', 20, 90, 0, -10]),
    row(['brant', 'avon', 60, 90, 0, -50]),
    row(['corrie', 'brant', 12, 10, 20, 5]),
  ],
);
const request: ConvergenceRequest = {
  block: 'brant',
  relative_to: 'avon',
  lat: 0,
  lon: 33,
  margin_azimuth_deg: 0,
  older_ma: 55,
  younger_ma: 0,
  step_ma: 15,
};

describe('convergence over a span of ages', () => {
  it('asks at steps, ends and rows, by the younger stage at a row, with a status', () => {
    const path = convergencePath(model, request);
    expect(path.map(({ age_ma, at_row }) => (at_row ? [age_ma] : age_ma))).toEqual([
      [0],
      15,
      [20],
      30,
      45,
      55,
    ]);
    const halfDegree = toRadians(0.5) * EARTH_RADIUS_KM;
    path.slice(0, 5).forEach(({ status, normal_mm_yr, tangential_mm_yr, obliquity_deg }, i) => {
      expect(status).toBe('placed');
      expect(normal_mm_yr).toBeCloseTo(i < 3 ? halfDegree : 2 * halfDegree, 9);
      expect(tangential_mm_yr).toBeCloseTo(0, 9);
      expect(obliquity_deg).toBeCloseTo(0, 9);
    });
    expect(path[5]).toEqual({
      age_ma: 55,
      status: 'older than block',
      at_row: false,
      normal_mm_yr: null,
      tangential_mm_yr: null,
      speed_mm_yr: null,
      azimuth_deg: null,
      obliquity_deg: null,
    });
  });

  it('says where rotations end', () => {
    const path = convergencePath(model, { ...request, block: 'corrie', older_ma: 15 });
    expect(path.map(({ status }) => status)).toEqual(['placed', 'placed', 'outside rotations']);
  });

  it('of a block against itself stands still', () => {
    const [point] = convergencePath(model, { ...request, block: 'avon', older_ma: 0 });
    expect(point).toMatchObject({ status: 'placed', speed_mm_yr: 0, obliquity_deg: null });
  });

  it('in the coordinates of a frame, is the difference of both blocks’ velocities there', () => {
    const at = { ...request, lat: -21, margin_azimuth_deg: 71, coordinates_of: 'spin' };
    const [point] = convergencePath(model, { ...at, older_ma: 33, younger_ma: 33 });
    const [b, a] = ['brant', 'avon'].map((code) =>
      velocityAt(toVector(-21, 33), placed(angularVelocity(model, code, 33, 'spin')).omega),
    );
    const apart = convergenceAcross(
      b!.east_mm_yr - a!.east_mm_yr,
      b!.north_mm_yr - a!.north_mm_yr,
      at.margin_azimuth_deg,
    );
    expect(point?.normal_mm_yr).toBeCloseTo(apart.normal_mm_yr, 9);
    expect(point?.tangential_mm_yr).toBeCloseTo(apart.tangential_mm_yr, 9);
    expect(point?.obliquity_deg).toBeCloseTo(apart.obliquity_deg ?? NaN, 9);
  });

  it('agrees with differences of velocities in a frame, through any circuit', () => {
    fc.assert(
      fc.property(anyModel, fc.double({ min: 0, max: 18, noNaN: true }), longitude, (any, age, margin) => {
        const point = convergencePath(any, {
          ...request,
          block: 'b5',
          relative_to: 'b6',
          coordinates_of: 'mantle',
          margin_azimuth_deg: margin,
          lat: 37,
          older_ma: age,
          younger_ma: age,
        }).at(-1);
        const [b, a] = ['b5', 'b6'].map((code) =>
          velocityAt(toVector(37, 33), placed(angularVelocity(any, code, age, 'mantle')).omega),
        );
        const apart = convergenceAcross(
          b!.east_mm_yr - a!.east_mm_yr,
          b!.north_mm_yr - a!.north_mm_yr,
          margin,
        );
        expect(Math.abs((point?.normal_mm_yr ?? NaN) - apart.normal_mm_yr)).toBeLessThan(1e-8);
        expect(Math.abs((point?.tangential_mm_yr ?? NaN) - apart.tangential_mm_yr)).toBeLessThan(1e-8);
      }),
    );
  });

  it('names what makes no sense', () => {
    const wrong: [Partial<ConvergenceRequest>, string, string][] = [
      [{ lat: 91 }, 'OutOfRange', 'lat'],
      [{ step_ma: 0 }, 'OutOfRange', 'step_ma'],
      [{ older_ma: -1 }, 'NegativeAge', 'older_ma'],
      [{ margin_azimuth_deg: Infinity }, 'NonFinite', 'margin_azimuth_deg'],
      [{ block: 'limbo' }, 'UnknownBlock', 'block'],
      [{ coordinates_of: 'limbo' }, 'UnknownBlock', 'relative_to'],
    ];
    for (const [change, name, quantity] of wrong)
      expect(() => convergencePath(model, { ...request, ...change })).toThrow(
        expect.objectContaining({ name, quantity }),
      );
  });
});
