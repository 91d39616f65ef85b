import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angularDistance,
  compileModel,
  distanceKm,
  EARTH_RADIUS_KM,
  flowLine,
  type FlowLinePoint,
  type FlowLineRequest,
  olderRidge,
  poseAt,
  rotate,
  toRadians,
  toVector,
  type Vector3,
  youngerRidge,
} from '../../../src/kernel';
import { block, frame, model as anyModel, place, placed, rotation, row } from '../support';

const KM_PER_DEGREE = toRadians(1) * EARTH_RADIUS_KM;
/** Sable opens from brant by 20° about 90° N in 20 Myr, then, further back, about another pole. */
const model = compileModel(
  [block('brant'), block('sable', { appears_ma: 45 }), frame('spin')],
  [
    row(['brant', 'spin', 60, 40, 10, 30]),
    row(['sable', 'brant', 20, 90, 0, 20]),
    row(['sable', 'brant', 50, 60, 30, 44]),
  ],
);
const request: FlowLineRequest = {
  block_a: 'brant',
  block_b: 'sable',
  lat: 0,
  lon: -12,
  older_ma: 20,
  younger_ma: 0,
  step_ma: 8,
};
const at = (point: FlowLinePoint | undefined, flank: 'a' | 'b'): Vector3 =>
  toVector(point?.[flank]?.lat ?? NaN, point?.[flank]?.lon ?? NaN);

describe('flow lines', () => {
  it('leave a ridge by half of 20° in 20 Myr on each flank: full rate 111.195 mm/yr, half 55.598', () => {
    const line = flowLine(model, request);
    expect(line.map(({ age_ma, at_row }) => (at_row ? [age_ma] : age_ma))).toEqual([[0], 8, 16, [20]]);
    for (const { age_ma, a, b, full_rate_mm_yr } of line) {
      // Sable moves west, forward in time: its sea floor lies to the west, brant's to the east.
      expect(a?.lat).toBeCloseTo(0, 12);
      expect(a?.lon).toBeCloseTo(-12 + age_ma / 2, 12);
      expect(b?.lon).toBeCloseTo(-12 - age_ma / 2, 12);
      expect(full_rate_mm_yr).toBeCloseTo(111.19508, 5);
      expect(a?.rate_mm_yr).toBeCloseTo(55.59754, 5);
      expect(b?.rate_mm_yr).toBeCloseTo(55.59754, 5);
    }
    expect(distanceKm(at(line[3], 'a'), at(line[3], 'b')) / KM_PER_DEGREE).toBeCloseTo(20, 9);
  });

  it('part the opening as asked', () => {
    const line = flowLine(model, { ...request, fraction: 0.3 });
    expect(line[3]?.a?.lon).toBeCloseTo(-12 + 6, 12);
    expect(line[3]?.b?.lon).toBeCloseTo(-12 - 14, 12);
    expect(line[3]?.a?.rate_mm_yr).toBeCloseTo(0.3 * KM_PER_DEGREE, 9);
    expect(line[3]?.b?.rate_mm_yr).toBeCloseTo(0.7 * KM_PER_DEGREE, 9);
    const still = flowLine(model, { ...request, fraction: 0 });
    expect(still[3]?.a).toMatchObject({ lat: 0, lon: -12, rate_mm_yr: 0 });
    expect(still[3]?.b?.lon).toBeCloseTo(-32, 12);
  });

  it('end where the pair has no place, and say why from there on', () => {
    const line = flowLine(model, { ...request, older_ma: 56 });
    expect(line.map(({ age_ma }) => age_ma)).toEqual([0, 8, 16, 20, 24, 32, 40, 48, 50, 56]);
    expect(line.map(({ status }) => status).slice(6)).toEqual([
      'placed',
      'older than block',
      'older than block',
      'older than block',
    ]);
    expect(line.at(-1)).toMatchObject({ a: null, b: null, full_rate_mm_yr: null });
    const backwards = flowLine(model, { ...request, block_a: 'sable', block_b: 'brant', older_ma: 56 });
    expect(backwards.map(({ status }) => status)).toEqual(line.map(({ status }) => status));
  });

  it('start at an age, in the coordinates asked for', () => {
    const whole = flowLine(model, { ...request, older_ma: 40 });
    const start = whole.find(({ age_ma }) => age_ma === 16)!;
    const from = { ...request, older_ma: 40, younger_ma: 16, lat: start.a!.lat, lon: start.a!.lon };
    const later = flowLine(model, from);
    expect(distanceKm(at(later.at(-1), 'a'), at(whole.at(-1), 'a'))).toBeLessThan(1e-8);
    expect(distanceKm(at(later.at(-1), 'b'), at(whole.at(-1), 'b'))).toBeLessThan(1e-8);
    const onSable = { ...from, lat: start.b!.lat, lon: start.b!.lon, coordinates_of: 'sable' };
    expect(distanceKm(at(flowLine(model, onSable).at(-1), 'a'), at(whole.at(-1), 'a'))).toBeLessThan(1e-8);
    const inSpin = rotate(placed(poseAt(model, 'brant', 16, 'spin')).quaternion, at(start, 'a'));
    const [lon, lat] = [Math.atan2(inSpin[1], inSpin[0]), Math.asin(inSpin[2])].map(
      (x) => (x * 180) / Math.PI,
    );
    const seen = flowLine(model, { ...from, lat: lat!, lon: lon!, coordinates_of: 'spin' });
    expect(distanceKm(at(seen.at(-1), 'b'), at(whole.at(-1), 'b'))).toBeLessThan(1e-8);
  });

  it('are the same from either block, with the other share, through any circuit', () => {
    fc.assert(
      fc.property(anyModel, fc.double({ min: 0, max: 1, noNaN: true }), (any, fraction) => {
        const pair = { ...request, older_ma: 18, step_ma: 3, fraction };
        const one = flowLine(any, { ...pair, block_a: 'b6', block_b: 'b4' });
        const other = flowLine(any, { ...pair, block_a: 'b4', block_b: 'b6', fraction: 1 - fraction });
        one.forEach((point, i) => {
          expect(point.status).toBe('placed');
          expect(angularDistance(at(point, 'a'), at(other[i], 'b'))).toBeLessThan(1e-12);
          expect(angularDistance(at(point, 'b'), at(other[i], 'a'))).toBeLessThan(1e-12);
        });
      }),
    );
  });

  it('close up at their own age: the pair’s rotation brings both flanks together', () => {
    for (const point of flowLine(model, { ...request, older_ma: 44, fraction: 0.37 })) {
      const { quaternion } = placed(poseAt(model, 'sable', point.age_ma, 'brant'));
      expect(distanceKm(rotate(quaternion, at(point, 'b')), at(point, 'a'))).toBeLessThan(1e-8);
    }
  });

  it('lead back by the inverse step', () => {
    fc.assert(
      fc.property(place, rotation, rotation, fc.double({ min: 0, max: 1, noNaN: true }), (x, p, q, f) => {
        expect(angularDistance(youngerRidge(olderRidge(x, p, q, f), p, q, f), x)).toBeLessThan(1e-14);
      }),
    );
  });

  it('name what makes no sense', () => {
    const wrong: [Partial<FlowLineRequest>, string, string][] = [
      [{ fraction: 1.1 }, 'OutOfRange', 'fraction'],
      [{ fraction: NaN }, 'NonFinite', 'fraction'],
      [{ lat: -91 }, 'OutOfRange', 'lat'],
      [{ younger_ma: -1 }, 'NegativeAge', 'younger_ma'],
      [{ block_a: 'limbo' }, 'UnknownBlock', 'block_a'],
      [{ block_b: 'limbo' }, 'UnknownBlock', 'block_b'],
    ];
    for (const [change, name, quantity] of wrong)
      expect(() => flowLine(model, { ...request, ...change })).toThrow(
        expect.objectContaining({ name, quantity }),
      );
  });
});
