import fc from 'fast-check';
import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, it } from 'vitest';
import {
  ANGULAR_DISTANCE_ERROR_RAD,
  angularDistance,
  antipode,
  ARC_ERROR_RAD,
  azimuthAndDistance,
  azimuthDeg,
  destination,
  DESTINATION_ERROR_KM,
  distanceKm,
  distanceToArc,
  EARTH_RADIUS_KM,
  interpolateArc,
  nearestOnArc,
  toLatLon,
  toVector,
} from '../../../src/kernel';
import { latitude, longitude, place } from '../support';

/** Reference: geographiclib-geodesic (Karney 2013) on a sphere, f = 0. Its own accuracy is 15 nm. */
const sphere = new Geodesic.Geodesic(EARTH_RADIUS_KM * 1000, 0);
const REFERENCE_ERROR_KM = 3e-11;

describe('distances and azimuths against geographiclib with f = 0', () => {
  it('agree everywhere', () => {
    fc.assert(
      fc.property(latitude, longitude, latitude, longitude, (lat1, lon1, lat2, lon2) => {
        const [a, b] = [toVector(lat1, lon1), toVector(lat2, lon2)];
        const { s12 = NaN, azi1 = NaN } = sphere.Inverse(lat1, lon1, lat2, lon2);
        const km = distanceKm(a, b);
        expect(Math.abs(km - s12 / 1000)).toBeLessThan(
          REFERENCE_ERROR_KM + ANGULAR_DISTANCE_ERROR_RAD * EARTH_RADIUS_KM,
        );
        if (Math.sin(km / EARTH_RADIUS_KM) < 1e-3 || Math.abs(lat1) > 89.9) return;
        const off = ((azimuthDeg(a, b) - azi1 + 540) % 360) - 180;
        expect(Math.abs(off)).toBeLessThan(1e-10);
      }),
      { numRuns: 2000 },
    );
  });

  it('go where it goes', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -89, max: 89, noNaN: true }),
        longitude,
        fc.double({ min: 0, max: 360, noNaN: true }),
        fc.double({ min: 0, max: 20000, noNaN: true }),
        (lat, lon, azimuth, km) => {
          const { lat2 = NaN, lon2 = NaN } = sphere.Direct(lat, lon, azimuth, km * 1000);
          expect(distanceKm(destination(toVector(lat, lon), azimuth, km), toVector(lat2, lon2))).toBeLessThan(
            DESTINATION_ERROR_KM,
          );
        },
      ),
    );
  });
});

describe('distances', () => {
  it('keep their digits from 1e-15 rad to half a turn', () => {
    fc.assert(
      fc.property(longitude, fc.double({ min: -15, max: 0.4, noNaN: true }), (lon, exponent) => {
        const angle = 10 ** exponent;
        const a = toVector(0, lon);
        const b = [a[0] * Math.cos(angle), a[1] * Math.cos(angle), Math.sin(angle)] as const;
        expect(Math.abs(angularDistance(a, b) - angle)).toBeLessThan(
          Math.min(ANGULAR_DISTANCE_ERROR_RAD, 0.2 * angle),
        );
        expect(Math.abs(angularDistance(antipode(a), b) - (Math.PI - angle))).toBeLessThan(
          ANGULAR_DISTANCE_ERROR_RAD,
        );
      }),
    );
  });

  it('come back from azimuth and distance', () => {
    fc.assert(
      fc.property(
        place,
        fc.double({ min: 0, max: 360, noNaN: true }),
        fc.double({ min: 0, max: 20000, noNaN: true }),
        (v, azimuth, km) => {
          const to = destination(v, azimuth, km);
          const back = azimuthAndDistance(v, to);
          expect(Math.abs(back.km - km)).toBeLessThan(DESTINATION_ERROR_KM);
          expect(distanceKm(destination(v, back.azimuth_deg, back.km), to)).toBeLessThan(
            DESTINATION_ERROR_KM,
          );
          expect(back.azimuth_deg >= 0 && back.azimuth_deg < 360).toBe(true);
        },
      ),
    );
  });

  it('have azimuths of the compass, and none (0) without a direction', () => {
    const from = toVector(20, 40);
    expect(Math.abs(azimuthDeg(from, toVector(50, 40)))).toBeLessThan(1e-13);
    expect(Math.abs(azimuthDeg(toVector(0, 40), toVector(0, 41)) - 90)).toBeLessThan(1e-13);
    expect(Math.abs(azimuthDeg(from, toVector(-50, 40)) - 180)).toBeLessThan(1e-13);
    expect(azimuthDeg(from, from)).toBe(0);
    expect(toLatLon(destination(toVector(90, 77), 180, 1000)).lon).toBeCloseTo(0, 12);
  });
});

describe('arcs', () => {
  it('are walked at a constant rate, over antimeridian and poles', () => {
    fc.assert(
      fc.property(place, place, fc.double({ min: 0, max: 1, noNaN: true }), (a, b, s) => {
        const angle = angularDistance(a, b);
        fc.pre(Math.PI - angle > 0.02);
        const at = interpolateArc(a, b, s);
        expect(Math.abs(angularDistance(a, at) - s * angle)).toBeLessThan(ARC_ERROR_RAD);
        expect(Math.abs(angularDistance(at, b) - (1 - s) * angle)).toBeLessThan(ARC_ERROR_RAD);
        expect(distanceToArc(at, a, b)).toBeLessThan(ARC_ERROR_RAD);
      }),
    );
  });

  it('find their nearest place', () => {
    fc.assert(
      fc.property(place, place, place, (v, a, b) => {
        const angle = angularDistance(a, b);
        fc.pre(Math.PI - angle > 0.02 && angle > 1e-6);
        const nearest = distanceToArc(v, a, b);
        for (let i = 0; i <= 50; i++) {
          expect(angularDistance(v, interpolateArc(a, b, i / 50))).toBeGreaterThan(
            nearest - ARC_ERROR_RAD / angle,
          );
        }
      }),
    );
    expect(toLatLon(nearestOnArc(toVector(10, 7), toVector(0, -30), toVector(0, 30))).lon).toBeCloseTo(7, 12);
    expect(nearestOnArc(toVector(10, 70), toVector(0, -30), toVector(0, 30))).toEqual(toVector(0, 30));
    expect(nearestOnArc(toVector(10, 70), toVector(5, 5), toVector(5, 5))).toEqual(toVector(5, 5));
  });

  it('exist for antipodal ends, and have a middle at right angles', () => {
    fc.assert(
      fc.property(place, (a) => {
        const middle = interpolateArc(a, antipode(a), 0.5);
        expect(Math.abs(angularDistance(a, middle) - Math.PI / 2)).toBeLessThan(ARC_ERROR_RAD);
      }),
    );
    expect(interpolateArc(toVector(1, 2), toVector(1, 2), 0.3)).toEqual(toVector(1, 2));
  });
});
