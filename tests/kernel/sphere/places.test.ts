import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  acos,
  angularDistance,
  asin,
  cosDegrees,
  dot,
  eastNorth,
  cross,
  LAT_LON_ERROR_DEG,
  longitudeUndefined,
  norm,
  normalizeLongitude,
  sinDegrees,
  toDegrees,
  toLatLon,
  toRadians,
  toVector,
  VECTOR_ERROR,
} from '../../../src/kernel';
import { latitude, longitude, place } from '../support';

describe('angles', () => {
  it('clamp what rounding carried past ±1', () => {
    expect([asin(1 + 1e-15), asin(-1 - 1e-15), acos(1 + 1e-15), acos(-1.0000001)]).toEqual([
      Math.PI / 2,
      -Math.PI / 2,
      0,
      Math.PI,
    ]);
    expect(asin(0.3)).toBe(Math.asin(0.3));
    expect(acos(-0.3)).toBe(Math.acos(-0.3));
  });

  it('bring longitudes into (−180, 180] without rounding', () => {
    const read = [180, -180, 190.25, -190.25, 540, 360, 719.5, -0.125, -360.5];
    expect(read.map(normalizeLongitude)).toEqual([180, 180, -169.75, 169.75, 180, 0, -0.5, -0.125, -0.5]);
  });

  it('give exact sines and cosines at quarter turns and after whole turns', () => {
    for (const turns of [-720, -360, 0, 360, 3600]) {
      expect([0, 90, 180, 270].map((d) => sinDegrees(d + turns) + 0)).toEqual([0, 1, 0, -1]);
      expect([0, 90, 180, 270].map((d) => cosDegrees(d + turns) + 0)).toEqual([1, 0, -1, 0]);
    }
    fc.assert(
      fc.property(fc.double({ min: -200, max: 200, noNaN: true }), (d) => {
        expect(Math.abs(sinDegrees(d) - Math.sin(toRadians(d)))).toBeLessThan(1e-15);
        expect(Math.abs(cosDegrees(d) - Math.cos(toRadians(d)))).toBeLessThan(1e-15);
        expect(Math.abs(toDegrees(toRadians(d)) - d)).toBeLessThan(1e-13);
      }),
    );
  });
});

describe('places', () => {
  it('have the vectors of the convention p(φ, λ)', () => {
    const cases = [
      [0, 0, [1, 0, 0]],
      [0, 90, [0, 1, 0]],
      [90, 123, [0, 0, 1]],
      [-90, -7, [0, 0, -1]],
      [30, 180, [-Math.sqrt(3) / 2, 0, 0.5]],
      [-45, -60, [Math.SQRT1_2 / 2, (-Math.SQRT1_2 * Math.sqrt(3)) / 2, -Math.SQRT1_2]],
    ] as const;
    for (const [lat, lon, expected] of cases) {
      toVector(lat, lon).forEach((x, i) =>
        expect(Math.abs(x - (expected[i] ?? NaN))).toBeLessThan(VECTOR_ERROR),
      );
    }
  });

  it('come back from their vectors', () => {
    fc.assert(
      fc.property(latitude, longitude, (lat, lon) => {
        const v = toVector(lat, lon);
        const back = toLatLon(v);
        expect(Math.abs(norm(v) - 1)).toBeLessThan(2 * VECTOR_ERROR);
        expect(toDegrees(angularDistance(toVector(back.lat, back.lon), v))).toBeLessThan(LAT_LON_ERROR_DEG);
        expect(back.lon > -180 && back.lon <= 180 && Math.abs(back.lat) <= 90).toBe(true);
      }),
    );
  });

  it('have longitude 0 at a pole, said to be undefined, and only there', () => {
    expect(toLatLon([1e-16, -1e-16, 1])).toEqual({ lat: 90, lon: 0 });
    expect(toLatLon([0, 0, -2])).toEqual({ lat: -90, lon: 0 });
    expect([[0, 0, 1] as const, 90, -90].map(longitudeUndefined)).toEqual([true, true, true]);
    expect([toVector(89.9999999, 5), 89.9999999, 0].map(longitudeUndefined)).toEqual([false, false, false]);
    expect(toLatLon([-1, -1e-17, 0])).toEqual({ lat: 0, lon: 180 });
  });

  it('have an east and a north at right angles to themselves, right-handed', () => {
    fc.assert(
      fc.property(place, (v) => {
        const { east, north } = eastNorth(v);
        for (const [a, b] of [
          [east, north],
          [east, v],
          [north, v],
        ] as const)
          expect(Math.abs(dot(a, b))).toBeLessThan(1e-13);
        expect(dot(cross(east, north), v)).toBeGreaterThan(1 - 1e-13);
        expect(north[2]).toBeGreaterThanOrEqual(0);
      }),
    );
  });
});
