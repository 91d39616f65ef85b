import type { Vector3 } from '../rotations/types';
import { angularDistance } from './distance';
import { add, cross, dot, negate, normalizeVector, scale, subtract } from './vector';

/** Worst error of a place on an arc, radians, for arcs up to 179°; it grows as 1/(π − length) beyond. */
export const ARC_ERROR_RAD = 1e-13;

/**
 * Unit normal of the great circle from a to b, right-hand rule: (b + a) × (b − a), which keeps its digits for
 * short and nearly antipodal arcs (as (b + a) and (b − a) are exact there). Zero for equal or antipodal ends,
 * which have no one great circle.
 */
export const arcNormal = (a: Vector3, b: Vector3): Vector3 =>
  normalizeVector(cross(add(b, a), subtract(b, a)));

/**
 * The place a share s of the way from a (s = 0) to b (s = 1) along their great circle. Antipodal ends: any of
 * the great circles.
 */
export function interpolateArc(a: Vector3, b: Vector3, s: number): Vector3 {
  const angle = angularDistance(a, b);
  if (angle === 0) return a;
  const side = normalizeVector(cross(perpendicularTo(a, b), a));
  return normalizeVector(add(scale(a, Math.cos(s * angle)), scale(side, Math.sin(s * angle))));
}

function perpendicularTo(a: Vector3, b: Vector3): Vector3 {
  const normal = arcNormal(a, b);
  if (dot(normal, normal) > 0) return normal;
  return cross(a, Math.abs(a[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]);
}

/** The place of the arc a–b nearest to v; where all are equally near, a. */
export function nearestOnArc(v: Vector3, a: Vector3, b: Vector3): Vector3 {
  const normal = arcNormal(a, b);
  const foot = ontoCircle(normal, ontoCircle(normal, v));
  const within =
    dot(cross(normal, a), foot) >= 0 && dot(cross(b, normal), foot) >= 0 && dot(normal, normal) > 0;
  if (within) return foot;
  return angularDistance(v, b) < angularDistance(v, a) ? b : a;
}

/** Twice over it stays on the circle to rounding, however near v is to the circle's pole. */
const ontoCircle = (normal: Vector3, v: Vector3): Vector3 =>
  normalizeVector(subtract(v, scale(normal, dot(v, normal))));

/** Angle from v to the nearest place of the arc a–b, radians. */
export const distanceToArc = (v: Vector3, a: Vector3, b: Vector3): number =>
  angularDistance(v, nearestOnArc(v, a, b));

/** The antipode of a place; its own inverse. */
export const antipode = negate;
