import type { Vector3 } from '../rotations/types';
import { toLatLon, toVector } from './vector';

/** A closed ring of unit vectors, its first not repeated at the end; edges are great circles. */
export type Ring = readonly Vector3[];
/** An outer ring and the rings of its holes. */
export type Polygon = readonly Ring[];
/**
 * Which side of an outer ring is meant. A ring that halves the sphere has neither: its left side is meant
 * then.
 */
export type Inside = 'smaller' | 'larger';

/** Rings that part the sphere in two sides as equal as this, steradians, are taken as halving it. */
export const TIE_TOLERANCE_SR = 1e-9;

const same = (a: Vector3, b: Vector3): boolean => a[0] === b[0] && a[1] === b[1] && a[2] === b[2];

/**
 * Ring from [longitude, latitude] positions in degrees, closed or not. Longitudes may jump at the
 * antimeridian, run on past ±180°, or be given 0–360; repeated positions (every one along a pole included)
 * are read once. Inverse: {@link writeRing}.
 */
export function readRing(positions: readonly (readonly number[])[]): Vector3[] {
  const ring: Vector3[] = [];
  for (const [lon, lat] of positions) {
    const v = toVector(lat ?? NaN, lon ?? NaN);
    const last = ring.at(-1);
    if (!last || !same(last, v)) ring.push(v);
  }
  const [first, last] = [ring[0], ring.at(-1)];
  if (ring.length > 1 && first && last && same(first, last)) ring.pop();
  return ring;
}

/** Closed [longitude, latitude] positions of a ring, longitudes in (−180, 180]. Inverse: {@link readRing}. */
export function writeRing(ring: Ring): [lon: number, lat: number][] {
  const positions = ring.map((v): [number, number] => {
    const { lat, lon } = toLatLon(v);
    return [lon, lat];
  });
  const [first] = positions;
  return first ? [...positions, [first[0], first[1]]] : [];
}

/** Calls back with the two ends of every edge, the closing one included. */
export function eachEdge(ring: Ring, callback: (a: Vector3, b: Vector3) => void): void {
  let a = ring.at(-1);
  for (const b of ring) {
    if (a) callback(a, b);
    a = b;
  }
}
