import type { Vector3 } from '../rotations/types';
import { EARTH_RADIUS_KM } from './angles';
import { eachEdge, type Inside, type Polygon, type Ring, TIE_TOLERANCE_SR } from './ring';
import { add, cross, dot, norm, subtract } from './vector';

/** Worst error of an area, steradians, for each edge of the ring. */
export const AREA_ERROR_SR_PER_EDGE = 2e-15;

const SPHERE_SR = 4 * Math.PI;

/**
 * Signed spherical excess of the triangle o, a, b, steradians in [−2π, 2π], positive anticlockwise: 2
 * atan2(o·(a × b), 1 + o·a + a·b + b·o) (Van Oosterom & Strackee 1983).
 */
export function triangleArea(o: Vector3, a: Vector3, b: Vector3): number {
  const volume = dot(o, cross(subtract(a, o), subtract(b, o)));
  return 2 * Math.atan2(volume, 1 + dot(o, a) + dot(a, b) + dot(b, o));
}

/**
 * Area of the smaller side of a ring, steradians in (0, 2π]: positive where the ring runs anticlockwise round
 * it, negative where clockwise. A ring that halves the sphere within {@link TIE_TOLERANCE_SR} is read as
 * anticlockwise round its left side. Poles, the antimeridian and edges that are passed both ways need no
 * care; fewer than three corners give 0.
 */
export function ringArea(ring: Ring): number {
  if (ring.length < 3) return 0;
  const origin = fanOrigin(ring);
  let sum = 0;
  eachEdge(ring, (a, b) => {
    if (a !== origin && b !== origin) sum += triangleArea(origin, a, b);
  });
  const left = sum - SPHERE_SR * Math.floor(sum / SPHERE_SR);
  return left > SPHERE_SR / 2 + TIE_TOLERANCE_SR ? left - SPHERE_SR : left;
}

/**
 * A corner antipodal to the origin of the fan leaves its two triangles undefined, and one near it costs
 * digits.
 */
const LEAST_CLEARANCE = 0.1;
const AXES: readonly Vector3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
  [-1, 0, 0],
  [0, -1, 0],
  [0, 0, -1],
];

/**
 * The first corner, near which small rings keep their digits, or whichever axis has its antipode farthest
 * from all corners.
 */
function fanOrigin(ring: Ring): Vector3 {
  const clearance = (o: Vector3): number => ring.reduce((least, v) => Math.min(least, norm(add(o, v))), 2);
  const [first = AXES[0] as Vector3] = ring;
  if (clearance(first) >= LEAST_CLEARANCE) return first;
  return AXES.reduce((best, axis) => (clearance(axis) > clearance(best) ? axis : best), first);
}

/** The ring, turned over where it does not run round its smaller side as wanted. */
export const woundRing = (ring: Ring, round: 'anticlockwise' | 'clockwise'): Ring =>
  ringArea(ring) > 0 === (round === 'anticlockwise') ? ring : ring.toReversed();

/** True for a ring whose two sides are equal within {@link TIE_TOLERANCE_SR}. */
export const halvesSphere = (signedArea: number): boolean =>
  Math.abs(signedArea - SPHERE_SR / 2) <= TIE_TOLERANCE_SR;

/** Area in km² of a polygon; holes are the smaller sides of their rings. */
export function areaKm2(polygon: Polygon, inside: Inside = 'smaller'): number {
  const [outer, ...holes] = polygon;
  if (!outer) return 0;
  const signed = ringArea(outer);
  const whole =
    inside === 'larger' && !halvesSphere(signed) ? SPHERE_SR - Math.abs(signed) : Math.abs(signed);
  const steradians = holes.reduce((rest, hole) => rest - Math.abs(ringArea(hole)), whole);
  return steradians * EARTH_RADIUS_KM ** 2;
}
