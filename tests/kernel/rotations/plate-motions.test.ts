/**
 * The plates' published angular velocities through the kernel: relative and absolute motions at named places, against
 * rates published by others and against two calculations that share no code with it.
 */
import geodesic from 'geographiclib-geodesic';
import { Vector3 as Reference } from 'three';
import { describe, expect, it } from 'vitest';
import morvel from '../../cases/nnr-morvel56.json';
import {
  angularVelocity,
  compileModel,
  distanceKm,
  EARTH_RADIUS_KM,
  exp,
  inverse,
  norm,
  poseAt,
  rotate,
  scale,
  SPEED_ERROR_MM_YR,
  toDegrees,
  toVector,
  type Vector3,
  type Velocity,
  velocityAt,
} from '../../../src/kernel';
import { block, frame, placed, row, turnBetween } from '../support';

const NNR = 'no-net-rotation';
/** One row at 1 Ma for each plate: motion forward in time at ω °/Myr is a total rotation of −ω to 1 Ma. */
const plates = morvel.plates.map(({ plate }) => plate);
const model = compileModel(
  [...plates.map((plate) => block(plate)), frame(NNR)],
  morvel.plates.map(({ plate, lat, lon, deg_myr }) => row([plate, NNR, 1, lat, lon, -deg_myr])),
);
const omegaOf = (plate: string, seenFrom: string): Vector3 =>
  placed(angularVelocity(model, plate, 0, seenFrom)).omega;
const motion = (plate: string, seenFrom: string, lat: number, lon: number): Velocity =>
  velocityAt(toVector(lat, lon), omegaOf(plate, seenFrom));

/** Angle from one azimuth to another, −180 to 180. */
const turned = (a: number, b: number): number => ((((a - b + 180) % 360) + 360) % 360) - 180;

describe(`NNR-MORVEL56 (${morvel.source})`, () => {
  it.each(morvel.published_rates)(
    'gives the published motion of $plate against $seen_from at $place',
    ({ plate, seen_from, lat, lon, mm_yr, towards_deg, within_deg }) => {
      const { speed_mm_yr, azimuth_deg } = motion(plate, seen_from, lat, lon);
      expect(Math.abs(speed_mm_yr - mm_yr)).toBeLessThan(morvel.rounding.published_mm_yr);
      expect(Math.abs(turned(azimuth_deg!, towards_deg))).toBeLessThan(within_deg);
    },
  );

  it.each(morvel.relative_to_pacific)(
    'gives MORVEL’s published motion of $plate as seen from the Pacific',
    ({ plate, lat, lon, deg_myr }) => {
      const omega = omegaOf(plate, 'pacific');
      const km = distanceKm(toVector(lat, lon), scale(omega, 1 / norm(omega)));
      expect(km / 111.2).toBeLessThan(morvel.rounding.pole_deg);
      expect(Math.abs(toDegrees(norm(omega)) - deg_myr)).toBeLessThan(morvel.rounding.deg_myr);
    },
  );

  it.each(morvel.relative_to_pacific)(
    'gives its rates: $plate 90° from that pole moves ω·R along the equator of the pole',
    ({ plate, lat, lon, deg_myr }) => {
      const { speed_mm_yr, azimuth_deg } = motion(plate, 'pacific', lat - 90, lon);
      expect(Math.abs(speed_mm_yr - deg_myr * 111.195)).toBeLessThan(morvel.rounding.mm_yr);
      // The pole lies due north, so what turns anticlockwise round it goes east.
      expect(Math.abs(turned(azimuth_deg!, 90))).toBeLessThan(morvel.rounding.azimuth_deg);
    },
  );

  const places = [
    ['Hilo', 19.7, -155.1], ['Reykjavik', 64.1, -21.9], ['Cape Town', -33.9, 18.4], ['Wellington', -41.3, 174.8],
    ['Lima', -12, -77], ['McMurdo', -77.8, 166.7], ['on the antimeridian', 5, 180], ['close to the north pole', 89.9, 40],
  ] as const; // prettier-ignore
  const each = places.flatMap(([, lat, lon]) => plates.map((plate) => ({ plate, lat, lon })));

  it('moves each plate at each place by ω R sin δ at right angles to its pole (geographiclib on a sphere)', () => {
    const sphere = new geodesic.Geodesic.Geodesic(EARTH_RADIUS_KM * 1000, 0);
    for (const { plate, lat, lon } of each) {
      const pole = morvel.plates.find((p) => p.plate === plate)!;
      const toPole = sphere.Inverse(lat, lon, pole.lat, pole.lon);
      const { speed_mm_yr, azimuth_deg } = motion(plate, NNR, lat, lon);
      const expected =
        ((pole.deg_myr * Math.PI) / 180) * EARTH_RADIUS_KM * Math.sin((toPole.a12 * Math.PI) / 180);
      expect(Math.abs(speed_mm_yr - expected)).toBeLessThan(SPEED_ERROR_MM_YR);
      expect(Math.abs(turned(azimuth_deg!, toPole.azi1! + 90))).toBeLessThan(1e-9);
    }
  });

  it('moves each pair of plates by (ω₁ − ω₂) × r (three.js vectors, components by finite differences)', () => {
    const RAD = Math.PI / 180;
    const at = (lat: number, lon: number): Reference =>
      new Reference().setFromSphericalCoords(EARTH_RADIUS_KM, (90 - lat) * RAD, lon * RAD);
    const spin = (plate: string): Reference => {
      const { lat, lon, deg_myr } = morvel.plates.find((p) => p.plate === plate)!;
      return at(lat, lon).setLength(deg_myr * RAD);
    };
    const h = 1e-4;
    for (const { plate, lat, lon } of each) {
      const seenFrom = plates[(plates.indexOf(plate) + 4) % plates.length]!;
      const v = spin(plate).sub(spin(seenFrom)).cross(at(lat, lon));
      const east = at(lat, lon + h)
        .sub(at(lat, lon - h))
        .normalize();
      const north = at(lat + h, lon)
        .sub(at(lat - h, lon))
        .normalize();
      const found = motion(plate, seenFrom, lat, lon);
      // Differences over 2 × 10⁻⁴ ° of 64-bit numbers give directions to some 10⁻¹⁰.
      expect(Math.abs(found.east_mm_yr - v.dot(east))).toBeLessThan(1e-6);
      expect(Math.abs(found.north_mm_yr - v.dot(north))).toBeLessThan(1e-6);
    }
  });

  it('moves points along small circles of the poles: a million years carries a point as far as its speed says', () => {
    const p = toVector(20, -156);
    const omega = omegaOf('pacific', NNR);
    const moved = rotate(exp(omega), p);
    expect(
      turnBetween(exp(omega), inverse(placed(poseAt(model, 'pacific', 1, NNR)).quaternion)),
    ).toBeLessThan(1e-15);
    expect(Math.abs(distanceKm(p, moved) - velocityAt(p, omega).speed_mm_yr)).toBeLessThan(1e-3);
  });
});
