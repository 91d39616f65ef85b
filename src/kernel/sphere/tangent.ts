import type { Vector3 } from '../rotations/types';
import { longitudeUndefined } from './vector';

/**
 * Unit vectors to the east and the north at a unit vector. At a pole the meridian of longitude 0 stands for
 * north, so that a direction there is read as from a place just beside the pole on the Greenwich meridian.
 */
export function eastNorth(v: Vector3): { east: Vector3; north: Vector3 } {
  if (longitudeUndefined(v)) return { east: [0, 1, 0], north: v[2] > 0 ? [-1, 0, 0] : [1, 0, 0] };
  const cosLat = Math.hypot(v[0], v[1]);
  const cosLon = v[0] / cosLat;
  const sinLon = v[1] / cosLat;
  return { east: [-sinLon, cosLon, 0], north: [-v[2] * cosLon, -v[2] * sinLon, cosLat] };
}
