import { KernelError } from '../errors';
import type { Vector3 } from '../rotations/types';
import { normalizeLongitude, toDegrees } from './angles';
import { interpolateArc } from './arc';
import { angularDistance } from './distance';

function requireStep(max_deg: number): void {
  if (max_deg > 0) return;
  throw new KernelError('OutOfRange', {
    quantity: 'max_deg',
    value: max_deg,
    problem: 'the longest edge must be above 0°',
  });
}

/**
 * Adds places along great-circle edges until none is longer than max_deg; a ring's closing edge too unless
 * `closed` is false.
 */
export function densify(ring: readonly Vector3[], max_deg: number, { closed = true } = {}): Vector3[] {
  requireStep(max_deg);
  const dense: Vector3[] = [];
  ring.forEach((a, i) => {
    dense.push(a);
    const b = ring[i + 1] ?? (closed ? ring[0] : undefined);
    if (!b) return;
    const parts = Math.ceil(toDegrees(angularDistance(a, b)) / max_deg - 1e-9);
    for (let k = 1; k < parts; k++) dense.push(interpolateArc(a, b, k / parts));
  });
  return dense;
}

/**
 * Edges made no longer than 1° by {@link densifyStraight} stray at most this far from great circles; n times
 * as long, n² as far.
 */
export const STRAIGHT_EDGE_STRAY_DEG = 0.0044;

/**
 * Adds positions [longitude, latitude] along edges that are straight in longitude and latitude (RFC 7946), so
 * that the great circles between them follow those edges. Each edge goes the shorter way round the globe;
 * longitudes may then run on past ±180°.
 */
export function densifyStraight(
  positions: readonly (readonly number[])[],
  max_deg: number,
): [lon: number, lat: number][] {
  requireStep(max_deg);
  const dense: [number, number][] = [];
  positions.forEach(([lon = NaN, lat = NaN], i) => {
    dense.push([lon, lat]);
    const next = positions[i + 1];
    if (!next) return;
    const [nextLon = NaN, nextLat = NaN] = next;
    const east = normalizeLongitude(nextLon - lon);
    const north = nextLat - lat;
    const parts = Math.ceil(Math.max(Math.abs(east), Math.abs(north)) / max_deg - 1e-9);
    for (let k = 1; k < parts; k++) dense.push([lon + (east * k) / parts, lat + (north * k) / parts]);
  });
  return dense;
}
