import { describe, expect, it } from 'vitest';
import {
  circuitRowAges,
  compileModel,
  distanceKm,
  driftPath,
  type DriftRequest,
  poseAt,
  rotate,
  toVector,
} from '../../../src/kernel';
import { block, frame, placed, row } from '../support';

const spin = frame('spin');
const some = [1e-4, 0, 0, 1e-4, 0, 1e-4] as const;
const model = compileModel(
  [block('avon'), block('brant'), block('corrie', { appears_ma: 47 }), spin],
  [
    row(['avon', 'spin', 12, 50, 60, 5], { covariance: some }),
    row(['avon', 'spin', 100, 48, 61, 30], { covariance: some }),
    row(['brant', 'spin', 33, 20, -50, 9]),
    row(['brant', 'spin', 70, 22, -48, 21]),
    row(['corrie', 'avon', 20, 12, 34, 6], { covariance: some }),
    row(['corrie', 'brant', 20, 15, 30, 7]),
    row(['corrie', 'brant', 60, 15, 30, 19]),
  ],
);
const request: DriftRequest = {
  block: 'corrie',
  lat: -31.5,
  lon: 143,
  older_ma: 52,
  younger_ma: 3,
  step_ma: 10,
  relative_to: 'spin',
};
const path = driftPath(model, request);

describe('drift paths', () => {
  it('ask at both ends, every step, and every row’s age of the circuit, marked apart', () => {
    expect(path.map(({ age_ma, at_row }) => (at_row ? [age_ma] : age_ma))).toEqual([
      3,
      [12],
      13,
      [20],
      23,
      [33],
      43,
      52,
    ]);
    expect(path.map(({ status }) => status)).toEqual([
      ...Array<string>(7).fill('placed'),
      'older than block',
    ]);
  });

  it('place the point as the pose does, with the speed of its younger stage', () => {
    for (const point of path.slice(0, 7)) {
      const { quaternion } = placed(poseAt(model, 'corrie', point.age_ma, 'spin'));
      const at = rotate(quaternion, toVector(request.lat, request.lon));
      expect(distanceKm(at, toVector(point.lat ?? NaN, point.lon ?? NaN))).toBeLessThan(1e-8);
      const younger = placed(poseAt(model, 'corrie', point.age_ma - 1e-4, 'spin')).quaternion;
      const km = distanceKm(at, rotate(younger, toVector(request.lat, request.lon)));
      expect(Math.abs((point.speed_mm_yr ?? NaN) - km / 1e-4)).toBeLessThan(0.01);
    }
  });

  it('give ellipses where rows carry covariances, “at least” where some do not, none where none does', () => {
    const at = (age: number) => path.find(({ age_ma }) => age_ma === age)?.ellipse_95;
    expect(at(3)?.at_least).toBe(false);
    expect(at(3)?.semi_major_km).toBeGreaterThan(0);
    expect(at(23)).toBeNull();
    expect(at(20)?.at_least).toBe(false);
    const mixed = driftPath(model, {
      ...request,
      relative_to: 'avon',
      older_ma: 23,
      younger_ma: 23,
      step_ma: 1,
    });
    expect(mixed[0]?.ellipse_95?.at_least).toBe(true);
  });

  it('have nulls with a status where there is no place', () => {
    expect(path[7]).toEqual({
      age_ma: 52,
      status: 'older than block',
      at_row: false,
      lat: null,
      lon: null,
      speed_mm_yr: null,
      azimuth_deg: null,
      ellipse_95: null,
    });
  });

  it('begin exactly where the point lies', () => {
    const [first] = driftPath(model, { ...request, younger_ma: 0, older_ma: 1, step_ma: 0.1 });
    expect(first).toMatchObject({
      age_ma: 0,
      at_row: true,
      ellipse_95: { semi_major_km: 0, at_least: false },
    });
    expect(distanceKm(toVector(first?.lat ?? NaN, first?.lon ?? NaN), toVector(-31.5, 143))).toBeLessThan(
      1e-9,
    );
    expect(
      driftPath(model, { ...request, younger_ma: 0, older_ma: 1, step_ma: 0.1 }).map(({ age_ma }) => age_ma),
    ).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1]);
  });

  it('may be one age long', () => {
    expect(driftPath(model, { ...request, older_ma: 8, younger_ma: 8 }).map(({ age_ma }) => age_ma)).toEqual([
      8,
    ]);
  });

  it('refuse what makes no path', () => {
    const wrong: [Partial<DriftRequest>, string, string][] = [
      [{ older_ma: 2 }, 'OutOfRange', 'older_ma'],
      [{ step_ma: 0 }, 'OutOfRange', 'step_ma'],
      [{ step_ma: 1e-5 }, 'OutOfRange', 'step_ma'],
      [{ step_ma: NaN }, 'NonFinite', 'step_ma'],
      [{ lat: 91 }, 'OutOfRange', 'lat'],
      [{ lon: Infinity }, 'NonFinite', 'lon'],
      [{ younger_ma: -1 }, 'NegativeAge', 'younger_ma'],
      [{ block: 'limbo' }, 'UnknownBlock', 'block'],
      [{ relative_to: 'limbo' }, 'UnknownBlock', 'relative_to'],
    ];
    for (const [change, name, quantity] of wrong) {
      expect(() => driftPath(model, { ...request, ...change })).toThrow(
        expect.objectContaining({ name, quantity }),
      );
    }
  });
});

describe('the rows’ ages of a circuit', () => {
  it('are those of the links in use, within the span, ends included', () => {
    expect(circuitRowAges(model, 'corrie', 70, 0, 'spin')).toEqual([0, 12, 20, 33, 60]);
    expect(circuitRowAges(model, 'corrie', 33, 12, 'spin')).toEqual([12, 20, 33]);
    expect(circuitRowAges(model, 'corrie', 70, 25, 'brant')).toEqual([60]);
    expect(circuitRowAges(model, 'avon', 70, 0, 'brant')).toEqual([0, 12, 33, 70]);
    expect(circuitRowAges(model, 'avon', 70, 0, 'avon')).toEqual([]);
  });
});
