import type { Vector3 } from '../rotations/types';
import { EARTH_RADIUS_KM } from './angles';

/**
 * Worst error of {@link angularDistance}, radians, for unit vectors; relative error is as small down to the
 * least distances.
 */
export const ANGULAR_DISTANCE_ERROR_RAD = 1e-15;

/**
 * Angle between two unit vectors, radians in [0, π]: 2 atan2(|a − b|, |a + b|) (Kahan 2006, How futile are
 * mindless assessments of roundoff, § 12). Accurate for coincident and for antipodal places alike.
 */
export function angularDistance(a: Vector3, b: Vector3): number {
  return (
    2 *
    Math.atan2(
      Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]),
      Math.hypot(a[0] + b[0], a[1] + b[1], a[2] + b[2]),
    )
  );
}

/** Great-circle distance in km on the sphere of {@link EARTH_RADIUS_KM}. */
export const distanceKm = (a: Vector3, b: Vector3): number => EARTH_RADIUS_KM * angularDistance(a, b);
