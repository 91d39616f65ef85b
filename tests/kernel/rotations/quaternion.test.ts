import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angleOf,
  angularDistance,
  between,
  exp,
  fromMatrix,
  fromPole,
  IDENTITY,
  inverse,
  log,
  LOG_EXP_ERROR_RAD,
  MATRIX_ERROR_RAD,
  multiply,
  normalize,
  otherPole,
  POLE_ERROR_DEG,
  PRODUCT_ERROR_RAD,
  rotate,
  ROTATE_ERROR_RAD,
  sameRotation,
  toDegrees,
  toMatrix,
  toPole,
  unrotate,
} from '../../../src/kernel';
import { angle, latitude, longitude, place, rotation, turnBetween } from '../support';

describe('quaternions', () => {
  it('go back where they came from', () => {
    fc.assert(
      fc.property(rotation, rotation, place, (a, b, p) => {
        expect(turnBetween(multiply(multiply(a, b), inverse(b)), a)).toBeLessThan(3 * PRODUCT_ERROR_RAD);
        expect(turnBetween(multiply(between(a, b), a), b)).toBeLessThan(3 * PRODUCT_ERROR_RAD);
        expect(angularDistance(unrotate(a, rotate(a, p)), p)).toBeLessThan(2 * ROTATE_ERROR_RAD);
        expect(angularDistance(rotate(multiply(a, b), p), rotate(a, rotate(b, p)))).toBeLessThan(
          4 * ROTATE_ERROR_RAD,
        );
      }),
    );
  });

  it('take and give rotation vectors', () => {
    fc.assert(
      fc.property(rotation, (q) => {
        expect(turnBetween(exp(log(q)), q)).toBeLessThan(LOG_EXP_ERROR_RAD);
        expect(Math.hypot(...log(q))).toBeLessThan(Math.PI + LOG_EXP_ERROR_RAD);
        expect(Math.abs(Math.hypot(...log(q)) - angleOf(q))).toBeLessThan(LOG_EXP_ERROR_RAD);
      }),
    );
  });

  it('keep the digits of small angles', () => {
    for (const size of [1e-3, 1e-8, 1e-12, 1e-200]) {
      const u = [0.48 * size, -0.6 * size, 0.64 * size] as const;
      const back = log(exp(u));
      u.forEach((x, i) => expect(Math.abs((back[i] ?? NaN) - x)).toBeLessThan(1e-15 * size));
    }
    expect(log(IDENTITY)).toEqual([0, 0, 0]);
  });

  it('read q and −q alike, an exact half-turn too', () => {
    const half = [0, 0.48, -0.6, 0.64] as const;
    expect(log([-0, -0.48, 0.6, -0.64])).toEqual(log(half));
    expect(log(half)[2]).toBeGreaterThan(0);
    expect(log([-0.6, 0, -0.8, 0])[1]).toBe(log([0.6, 0, 0.8, 0])[1]);
    expect(log([0.6, 0, 0.8, 0])[1]).toBeCloseTo(2 * Math.asin(0.8), 14);
  });

  it('take and give matrices', () => {
    fc.assert(
      fc.property(rotation, place, (q, p) => {
        const m = toMatrix(q);
        expect(turnBetween(fromMatrix(m), q)).toBeLessThan(MATRIX_ERROR_RAD);
        const moved = [0, 3, 6].map(
          (i) => (m[i] ?? NaN) * p[0] + (m[i + 1] ?? NaN) * p[1] + (m[i + 2] ?? NaN) * p[2],
        );
        expect(
          angularDistance([moved[0] ?? NaN, moved[1] ?? NaN, moved[2] ?? NaN], rotate(q, p)),
        ).toBeLessThan(MATRIX_ERROR_RAD);
      }),
    );
  });

  it('are brought back to unit length, but never from nothing', () => {
    expect(Math.abs(Math.hypot(...normalize([0.3, -4, 2, 0.1])) - 1)).toBeLessThan(1e-15);
    expect(() => normalize([0, 0, 0, 0])).toThrow(RangeError);
  });
});

describe('Euler poles', () => {
  it('come back as the same rotation', () => {
    fc.assert(
      fc.property(latitude, longitude, angle, (lat, lon, degrees) => {
        const q = fromPole(lat, lon, degrees);
        const { pole_lat, pole_lon, angle_deg } = toPole(q);
        expect(toDegrees(turnBetween(fromPole(pole_lat, pole_lon, angle_deg), q))).toBeLessThan(
          POLE_ERROR_DEG,
        );
        expect(angle_deg).toBeGreaterThanOrEqual(0);
        expect(angle_deg).toBeLessThanOrEqual(180);
        expect(pole_lon).toBeGreaterThan(-180);
        expect(pole_lon).toBeLessThanOrEqual(180);
      }),
    );
  });

  it('come back as they were written, when that form is asked for', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -89, max: 89, noNaN: true }),
        fc.double({ min: -179, max: 179, noNaN: true }),
        fc.double({ min: -500, max: 500, noNaN: true }).filter((a) => Math.abs(a % 360) > 0.1),
        (pole_lat, pole_lon, angle_deg) => {
          const near = { pole_lat, pole_lon, angle_deg };
          const pole = toPole(fromPole(pole_lat, pole_lon, angle_deg), near);
          expect(Math.abs(pole.pole_lat - pole_lat)).toBeLessThan(1e-10);
          expect(Math.abs(pole.pole_lon - pole_lon)).toBeLessThan(1e-9);
          expect(Math.abs(pole.angle_deg - angle_deg)).toBeLessThan(1e-10);
        },
      ),
    );
  });

  it('name the identity, and its pole as written before', () => {
    expect(toPole(IDENTITY)).toEqual({ pole_lat: 90, pole_lon: 0, angle_deg: 0 });
    expect(toPole(fromPole(12, 34, 0))).toEqual({ pole_lat: 90, pole_lon: 0, angle_deg: 0 });
    const near = { pole_lat: -23, pole_lon: 101, angle_deg: 0.2 };
    expect(toPole(IDENTITY, near)).toEqual({ ...near, angle_deg: 0 });
  });

  it('are the same rotation about the other pole and after whole turns', () => {
    const pole = { pole_lat: -41.2, pole_lon: 96.5, angle_deg: 23.7 };
    const other = otherPole(pole);
    expect(other).toEqual({ pole_lat: 41.2, pole_lon: -83.5, angle_deg: -23.7 });
    expect(otherPole(other)).toEqual(pole);
    const q = fromPole(pole.pole_lat, pole.pole_lon, pole.angle_deg);
    expect(sameRotation(q, fromPole(other.pole_lat, other.pole_lon, other.angle_deg))).toBe(true);
    expect(sameRotation(q, fromPole(pole.pole_lat, pole.pole_lon, pole.angle_deg - 360))).toBe(true);
    expect(sameRotation(q, fromPole(pole.pole_lat, pole.pole_lon, pole.angle_deg + 1e-6))).toBe(false);
    expect(otherPole({ pole_lat: 90, pole_lon: 0, angle_deg: 5 })).toEqual({
      pole_lat: -90,
      pole_lon: 0,
      angle_deg: -5,
    });
  });
});
