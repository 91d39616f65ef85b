/**
 * The worst error of each stated bound, measured over many random cases against 40-digit arithmetic (decimal.js) or a
 * way round that loses nothing. Measured above the bound, or so far below it that the bound says nothing, it fails.
 */
import { Decimal } from 'decimal.js';
import { describe, expect, it } from 'vitest';
import {
  ANGULAR_DISTANCE_ERROR_RAD,
  angularDistance,
  ARC_ERROR_RAD,
  AREA_ERROR_SR_PER_EDGE,
  azimuthAndDistance,
  BOUNDARY_TOLERANCE_RAD,
  checkCovariance,
  compileModel,
  contains,
  DEFINITENESS_TOLERANCE,
  HALF_TURN_MARGIN_DEG,
  IDENTITY_TOLERANCE_DEG,
  longitudeUndefined,
  POLE_TOLERANCE_RAD,
  PRESENT_TOLERANCE_DEG,
  ringArea,
  STILL_MM_YR,
  TIE_TOLERANCE_SR,
  destination,
  DESTINATION_ERROR_KM,
  densifyStraight,
  distanceToArc,
  EARTH_RADIUS_KM,
  exp,
  fromMatrix,
  fromPole,
  INTERPOLATE_ERROR_RAD,
  interpolate,
  interpolateArc,
  LAT_LON_ERROR_DEG,
  log,
  normalizeLongitude,
  LOG_EXP_ERROR_RAD,
  MATRIX_ERROR_RAD,
  multiply,
  POLE_ERROR_DEG,
  PRODUCT_ERROR_RAD,
  type Quaternion,
  rotate,
  ROTATE_ERROR_RAD,
  SPEED_ERROR_MM_YR,
  STRAIGHT_EDGE_STRAY_DEG,
  toDegrees,
  toLatLon,
  toMatrix,
  toPole,
  toVector,
  triangleArea,
  VECTOR_ERROR,
  type Vector3,
  velocityAt,
} from '../../src/kernel';
import { block, frame, row, turnBetween } from './support';

Decimal.set({ precision: 40 });
const PI = Decimal.acos(-1);
const D = (x: number): Decimal => new Decimal(x);
const radians = (degrees: number): Decimal => D(degrees).times(PI).div(180);

/** Mulberry32: the same cases every time. */
function randomFrom(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
const random = randomFrom(19880605);
const between = (low: number, high: number): number => low + (high - low) * random();
const pick = <T>(choices: readonly (() => T)[]): T => choices[Math.floor(random() * choices.length)]!();
const near = (): number => 10 ** between(-13, -1);

const latitude = (): number =>
  pick([() => between(-90, 90), () => 90 - near(), () => -90 + near(), () => near()]);
const longitude = (): number => pick([() => between(-180, 180), () => 180 - near(), () => near()]);
const angle = (): number =>
  pick([() => between(-180, 180), () => near(), () => 180 - near(), () => between(-30, 30)]);
const place = (): Vector3 => toVector(latitude(), longitude());
const turn = (): Quaternion => fromPole(latitude(), longitude(), angle());

/** The greatest of many errors. */
function worst(runs: number, error: () => number): number {
  let most = 0;
  for (let i = 0; i < runs; i++) most = Math.max(most, error());
  return most;
}

type V = readonly [Decimal, Decimal, Decimal];
type Q = readonly [Decimal, Decimal, Decimal, Decimal];
const exactly = <T extends readonly Decimal[]>(numbers: readonly number[]): T => numbers.map(D) as never;
const dot = (a: readonly Decimal[], b: readonly Decimal[]): Decimal =>
  a.reduce((sum, x, i) => sum.plus(x.times(b[i]!)), D(0));
const cross = (a: V, b: V): V => [
  a[1].times(b[2]).minus(a[2].times(b[1])),
  a[2].times(b[0]).minus(a[0].times(b[2])),
  a[0].times(b[1]).minus(a[1].times(b[0])),
];
const length = (a: readonly Decimal[]): Decimal => dot(a, a).sqrt();
const apart = (a: readonly Decimal[], b: readonly number[]): number =>
  length(a.map((x, i) => x.minus(b[i]!))).toNumber();
const vectorPart = ([, x, y, z]: Q): V => [x, y, z];
const product = (a: Q, b: Q): Q => {
  const [av, bv] = [vectorPart(a), vectorPart(b)];
  const c = cross(av, bv);
  const w = a[0].times(b[0]).minus(dot(av, bv));
  return [w, ...c.map((x, i) => x.plus(a[0].times(bv[i]!)).plus(b[0].times(av[i]!)))] as never;
};
const exactVector = (lat: number, lon: number): V => {
  const [p, l] = [radians(lat), radians(lon)];
  return [p.cos().times(l.cos()), p.cos().times(l.sin()), p.sin()];
};

const MEASURED: readonly (readonly [name: string, bound: number, runs: number, error: () => number])[] = [
  ['VECTOR_ERROR', VECTOR_ERROR, 2000, () => {
    const [lat, lon] = [latitude(), longitude()];
    const found = toVector(lat, lon);
    return Math.max(...exactVector(lat, lon).map((x, i) => x.minus(found[i]!).abs().toNumber()));
  }],
  ['LAT_LON_ERROR_DEG', LAT_LON_ERROR_DEG, 40_000, () => {
    const v = place();
    const { lat, lon } = toLatLon(v);
    return toDegrees(angularDistance(toVector(lat, lon), v));
  }],
  ['ANGULAR_DISTANCE_ERROR_RAD', ANGULAR_DISTANCE_ERROR_RAD, 3000, () => {
    const a = place();
    const b = pick([place, () => destination(a, between(0, 360), 10 ** between(-6, 4))]);
    const [x, y] = [exactly<V>(a), exactly<V>(b)];
    const [minus, plus] = [x.map((n, i) => n.minus(y[i]!)), x.map((n, i) => n.plus(y[i]!))];
    const exact = Decimal.atan2(length(minus), length(plus)).times(2);
    return exact.minus(angularDistance(a, b)).abs().toNumber();
  }],
  ['ARC_ERROR_RAD', ARC_ERROR_RAD, 1500, () => {
    const a = place();
    const degrees = pick([() => between(0.001, 179), () => 179 - near()]);
    const b = destination(a, between(0, 360), (EARTH_RADIUS_KM * Math.PI * degrees) / 180);
    const s = between(0, 1);
    const [x, y] = [exactly<V>(a), exactly<V>(b)];
    const whole = Decimal.atan2(length(cross(x, y)), dot(x, y));
    const exact = x.map((n, i) => n.times(whole.times(D(1).minus(s)).sin()).plus(y[i]!.times(whole.times(s).sin())));
    const size = length(exact);
    return apart(exact.map((n) => n.div(size)), interpolateArc(a, b, s));
  }],
  ['DESTINATION_ERROR_KM', DESTINATION_ERROR_KM, 40_000, () => {
    const a = place();
    const b = destination(a, between(0, 360), pick([() => between(0, 20_000), () => 20_000, near]));
    const { azimuth_deg, km } = azimuthAndDistance(a, b);
    return EARTH_RADIUS_KM * angularDistance(destination(a, azimuth_deg, km), b);
  }],
  ['AREA_ERROR_SR_PER_EDGE', AREA_ERROR_SR_PER_EDGE, 2000, () => {
    const o = place();
    const [a, b] = [destination(o, between(0, 360), between(1, 9000)), destination(o, between(0, 360), between(1, 9000))];
    const [x, y, z] = [exactly<V>(o), exactly<V>(a), exactly<V>(b)];
    const whole = dot(x, cross(y, z));
    const [lo, la, lb] = [length(x), length(y), length(z)];
    const below = lo.times(la).times(lb).plus(dot(x, y).times(lb)).plus(dot(y, z).times(lo)).plus(dot(z, x).times(la));
    return Decimal.atan2(whole, below).times(2).minus(triangleArea(o, a, b)).abs().toNumber() / 3;
  }],
  ['PRODUCT_ERROR_RAD', PRODUCT_ERROR_RAD, 5000, () => {
    const [a, b] = [turn(), turn()];
    return 2 * apart(product(exactly<Q>(a), exactly<Q>(b)), multiply(a, b));
  }],
  ['ROTATE_ERROR_RAD', ROTATE_ERROR_RAD, 5000, () => {
    const [q, p] = [turn(), place()];
    const [w, x, y, z] = exactly<Q>(q);
    const squared = dot([w, x, y, z], [w, x, y, z]);
    const inverse: Q = [w.div(squared), x.neg().div(squared), y.neg().div(squared), z.neg().div(squared)];
    const moved = product(product([w, x, y, z], [D(0), ...exactly<V>(p)]), inverse);
    return apart(moved.slice(1), rotate(q, p));
  }],
  ['LOG_EXP_ERROR_RAD', LOG_EXP_ERROR_RAD, 40_000, () => {
    const q = turn();
    return turnBetween(exp(log(q)), q);
  }],
  ['MATRIX_ERROR_RAD', MATRIX_ERROR_RAD, 40_000, () => {
    const q = turn();
    return turnBetween(fromMatrix(toMatrix(q)), q);
  }],
  ['POLE_ERROR_DEG', POLE_ERROR_DEG, 40_000, () => {
    const q = turn();
    const { pole_lat, pole_lon, angle_deg } = toPole(q);
    return toDegrees(turnBetween(fromPole(pole_lat, pole_lon, angle_deg), q));
  }],
  ['INTERPOLATE_ERROR_RAD', INTERPOLATE_ERROR_RAD, 1000, () => {
    const a = turn();
    const degrees = between(0.1, 179);
    const axis = place();
    const half = (degrees * Math.PI) / 360;
    const s = between(0, 1);
    const b = multiply([Math.cos(half), axis[0] * Math.sin(half), axis[1] * Math.sin(half), axis[2] * Math.sin(half)], a);
    const [qa, qb] = [exactly<Q>(a), exactly<Q>(b)];
    const stage = product(qb, [qa[0], qa[1].neg(), qa[2].neg(), qa[3].neg()]);
    const sine = length(stage.slice(1));
    const share = Decimal.atan2(sine, stage[0]).times(s);
    const part: Q = [share.cos(), ...stage.slice(1).map((x) => x.div(sine).times(share.sin()))] as never;
    const exact = product(part, qa);
    const size = length(exact);
    const found = interpolate(a, b, s);
    return 2 * apart(exact.map((x) => x.div(size)), found) * Math.cos(half);
  }],
  ['SPEED_ERROR_MM_YR', SPEED_ERROR_MM_YR, 5000, () => {
    const x = place();
    const [axis, rate] = [place(), (between(0, 10) * Math.PI) / 180];
    const omega: Vector3 = [axis[0] * rate, axis[1] * rate, axis[2] * rate];
    const exact = length(cross(exactly<V>(omega), exactly<V>(x))).times(EARTH_RADIUS_KM);
    return exact.minus(velocityAt(x, omega).speed_mm_yr).abs().toNumber();
  }],
  ['STRAIGHT_EDGE_STRAY_DEG', STRAIGHT_EDGE_STRAY_DEG, 400, () => {
    const [from, to] = [[longitude(), latitude()], [longitude(), latitude()]] as const;
    const dense = densifyStraight([from, to], 1);
    return Math.max(0, ...dense.slice(1).map(([lon, lat], i) => {
      const [lon0, lat0] = dense[i]!;
      const east = normalizeLongitude(lon - lon0);
      return Math.max(...[0.25, 0.5, 0.75].map((s) => toDegrees(
        distanceToArc(toVector(lat0 + s * (lat - lat0), lon0 + s * east), toVector(lat0, lon0), toVector(lat, lon)),
      )));
    }));
  }],
]; // prettier-ignore

describe('the stated error', () => {
  it.each(MEASURED)('%s = %d bounds what is measured', (_name, bound, runs, error) => {
    const measured = worst(runs, error);
    expect(measured).toBeLessThanOrEqual(bound);
    // The bound says something: a tenth of it would not hold.
    expect(measured).toBeGreaterThan(bound / 10);
  });
});

describe('a tolerance', () => {
  const SIDES = [0.5, 2] as const;
  const chosen = (answer: (times: number) => boolean): boolean[] => SIDES.map(answer);

  it('POLE_TOLERANCE_RAD: beside a pole a longitude means nothing', () => {
    const known = chosen((times) => toLatLon([0, times * POLE_TOLERANCE_RAD, 1]).lon === 90);
    expect(known).toEqual([false, true]);
    const lat = (times: number): number => -90 + toDegrees(times * POLE_TOLERANCE_RAD);
    expect(chosen((times) => longitudeUndefined(lat(times)))).toEqual([true, false]);
  });

  it('IDENTITY_TOLERANCE_DEG: the least turn that has a pole', () => {
    const named = chosen((times) => toPole(fromPole(10, 20, times * IDENTITY_TOLERANCE_DEG)).pole_lat !== 90);
    expect(named).toEqual([false, true]);
  });

  it('PRESENT_TOLERANCE_DEG: the least turn at 0 Ma that is a finding', () => {
    const found = chosen((times) => {
      const turned = row(['avon', 'spin', 0, 40, 20, times * PRESENT_TOLERANCE_DEG]);
      const { problems } = compileModel([block('avon'), frame('spin')], [turned]);
      return problems.some(({ name }) => name === 'NonIdentityAtPresent');
    });
    expect(found).toEqual([false, true]);
  });

  it('HALF_TURN_MARGIN_DEG: the stages that may turn either way round', () => {
    const found = chosen((times) => {
      const half = row(['avon', 'spin', 10, 40, 20, 180 - times * HALF_TURN_MARGIN_DEG]);
      const { problems } = compileModel([block('avon'), frame('spin')], [half]);
      return problems.some(({ name }) => name === 'NearHalfTurnStage');
    });
    expect(found).toEqual([true, false]);
  });

  it('STILL_MM_YR: the least motion that has an azimuth', () => {
    const moving = chosen(
      (times) => velocityAt([1, 0, 0], [0, 0, (times * STILL_MM_YR) / EARTH_RADIUS_KM]).azimuth_deg === 90,
    );
    expect(moving).toEqual([false, true]);
  });

  it('DEFINITENESS_TOLERANCE: what is rounding of printed digits, and what is no covariance', () => {
    const least = chosen(
      (times) => checkCovariance([1, 0, 0, 1, 0, -times * DEFINITENESS_TOLERANCE]) === null,
    );
    expect(least).toEqual([true, false]);
    const skew = chosen((times) => {
      const off = times * DEFINITENESS_TOLERANCE;
      return checkCovariance([1, off, 0, 0, 1, 0, 0, 0, 1]) === null;
    });
    expect(skew).toEqual([true, false]);
  });

  it('TIE_TOLERANCE_SR: rings that halve the sphere are read by their direction', () => {
    // A ring of many corners along a parallel takes 2π sin φ from the half of the sphere (Archimedes).
    const asLeft = chosen((times) => {
      const lat = -toDegrees((times * TIE_TOLERANCE_SR) / (2 * Math.PI));
      return ringArea(Array.from({ length: 720 }, (_, i) => toVector(lat, i / 2))) > 0;
    });
    expect(asLeft).toEqual([true, false]);
  });

  it('BOUNDARY_TOLERANCE_RAD: what lies on an outline', () => {
    const octant = [toVector(0, 0), toVector(0, 90), toVector(90, 0)];
    const on = chosen((times) => {
      const t = -times * BOUNDARY_TOLERANCE_RAD;
      return contains([octant], [Math.SQRT1_2, Math.SQRT1_2, t]);
    });
    expect(on).toEqual([true, false]);
  });
});
