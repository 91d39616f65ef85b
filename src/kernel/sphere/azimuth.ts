import type { Vector3 } from '../rotations/types';
import { cosDegrees, EARTH_RADIUS_KM, sinDegrees, toDegrees } from './angles';
import { distanceKm } from './distance';
import { eastNorth } from './tangent';
import { dot, normalizeVector, subtract } from './vector';

/**
 * Worst error of a round trip destination → azimuth and distance, in km of position, for distances up to
 * 20,000 km.
 */
export const DESTINATION_ERROR_KM = 1e-8;

/**
 * Clockwise from north, degrees in [0, 360), of a tangent vector given by its components. 0 for the zero
 * vector.
 */
export function azimuthOf(east: number, north: number): number {
  const azimuth = toDegrees(Math.atan2(east, north));
  return azimuth < 0 ? (azimuth + 360) % 360 : azimuth;
}

/**
 * Azimuth at `from` of the great circle to `to`, degrees clockwise from north in [0, 360). It has no meaning,
 * and is 0, where the places coincide or are antipodal; at a pole see {@link eastNorth}.
 */
export function azimuthDeg(from: Vector3, to: Vector3): number {
  const { east, north } = eastNorth(from);
  const chord = subtract(to, from);
  return azimuthOf(dot(east, chord), dot(north, chord));
}

/**
 * The place at a distance in km along the great circle that leaves v at an azimuth. Inverse: {@link
 * azimuthAndDistance}.
 */
export function destination(v: Vector3, azimuth_deg: number, km: number): Vector3 {
  const { east, north } = eastNorth(v);
  const angle = km / EARTH_RADIUS_KM;
  const c = Math.cos(angle);
  const e = Math.sin(angle) * sinDegrees(azimuth_deg);
  const n = Math.sin(angle) * cosDegrees(azimuth_deg);
  return normalizeVector([
    v[0] * c + east[0] * e + north[0] * n,
    v[1] * c + east[1] * e + north[1] * n,
    v[2] * c + east[2] * e + north[2] * n,
  ]);
}

/** Azimuth and distance that lead from one place to another. Inverse: {@link destination}. */
export function azimuthAndDistance(from: Vector3, to: Vector3): { azimuth_deg: number; km: number } {
  return { azimuth_deg: azimuthDeg(from, to), km: distanceKm(from, to) };
}
