import type { Vector3 } from '../rotations/types';
import { cosDegrees, sinDegrees, toDegrees } from './angles';

/**
 * Nearer to a pole than this, radians (0.6 µm on the ground), a longitude means nothing: it is given as 0.
 */
export const POLE_TOLERANCE_RAD = 1e-13;
/** Worst error of {@link toVector} in each component. */
export const VECTOR_ERROR = 3e-16;
/**
 * Worst error of a round trip through {@link toLatLon}, degrees of great circle: rounding, and the pole
 * tolerance beside a pole.
 */
export const LAT_LON_ERROR_DEG = 6e-12;

export const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const norm = (a: Vector3): number => Math.sqrt(dot(a, a));
export const add = (a: Vector3, b: Vector3): Vector3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const subtract = (a: Vector3, b: Vector3): Vector3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: Vector3, factor: number): Vector3 => [a[0] * factor, a[1] * factor, a[2] * factor];
export const negate = (a: Vector3): Vector3 => [-a[0], -a[1], -a[2]];

export const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** Unit vector along a; the zero vector stays zero. */
export function normalizeVector(a: Vector3): Vector3 {
  const length = Math.hypot(a[0], a[1], a[2]);
  return length > 0 ? [a[0] / length, a[1] / length, a[2] / length] : a;
}

/**
 * Unit vector p(φ, λ) = (cos φ cos λ, cos φ sin λ, sin φ) of a place in degrees. Any longitude is read; at a
 * pole it has no effect. Inverse: {@link toLatLon}.
 */
export function toVector(lat_deg: number, lon_deg: number): Vector3 {
  const cosLat = cosDegrees(lat_deg);
  return [cosLat * cosDegrees(lon_deg), cosLat * sinDegrees(lon_deg), sinDegrees(lat_deg)];
}

/**
 * Latitude and longitude in degrees of a vector of any length above 0; longitude in (−180, 180], 0 at a pole
 * (see {@link longitudeUndefined}). Inverse: {@link toVector}.
 */
export function toLatLon(v: Vector3): { lat: number; lon: number } {
  if (longitudeUndefined(v)) return { lat: v[2] < 0 ? -90 : 90, lon: 0 };
  const lat = toDegrees(Math.atan2(v[2], Math.hypot(v[0], v[1])));
  const lon = toDegrees(Math.atan2(v[1], v[0]));
  return { lat: lat + 0, lon: lon <= -180 ? 180 : lon + 0 };
}

/** True within {@link POLE_TOLERANCE_RAD} of a pole, for a vector or a latitude in degrees. */
export function longitudeUndefined(place: Vector3 | number): boolean {
  if (typeof place === 'number') return Math.abs(place) >= 90 - toDegrees(POLE_TOLERANCE_RAD);
  return Math.hypot(place[0], place[1]) <= POLE_TOLERANCE_RAD * Math.abs(place[2]);
}
