/**
 * Cuts a coastline by an outline: the parts of the lines that lie inside. Ends are found by bisection along each edge
 * that leaves the outline, to {@link CUT_ERROR_KM}. An edge with both ends outside is taken to stay outside.
 */
import {
  boundingCap,
  contains,
  dot,
  interpolateArc,
  toLatLon,
  toVector,
  type Inside,
  type Polygon,
} from '../../../kernel/sphere';
import type { Vector3 } from '../../../kernel/rotations/types';

/** Worst distance of a cut end from the outline, for edges up to 500 km. */
export const CUT_ERROR_KM = 0.001;
const HALVINGS = 30;

export type Line = readonly Vector3[];

/** Lines of [longitude, latitude] positions as unit vectors. */
export const coastVectors = (lines: readonly (readonly (readonly number[])[])[]): Line[] =>
  lines.map((line) => line.map(([lon, lat]) => toVector(lat!, lon!)));

/** @returns the inner parts as [longitude, latitude] positions; parts of one point are dropped. */
export function cutCoast(coast: readonly Line[], polygon: Polygon, inside: Inside): [number, number][][] {
  const cap = inside === 'smaller' ? boundingCap(polygon[0] ?? []) : null;
  const near = (v: Vector3): boolean =>
    cap === null || dot(v, cap.centre) >= Math.cos(Math.min(Math.PI, cap.radius + 0.05));
  const within = (v: Vector3): boolean => near(v) && contains(polygon, v, inside);
  const parts: Vector3[][] = [];
  for (const line of coast) {
    let part: Vector3[] | null = null;
    let previous: Vector3 | null = null;
    let wasIn = false;
    for (const v of line) {
      const isIn = within(v);
      if (previous && isIn !== wasIn) {
        const edge = boundary(wasIn ? previous : v, wasIn ? v : previous, within);
        if (wasIn) part?.push(edge);
        else parts.push((part = [edge]));
      }
      if (isIn) {
        if (!part) parts.push((part = []));
        part.push(v);
      } else part = null;
      previous = v;
      wasIn = isIn;
    }
  }
  return parts.filter((part) => part.length > 1).map((part) => part.map(position));
}

/** The point where the arc from inside to outside leaves, on the inner side. */
function boundary(from: Vector3, to: Vector3, within: (v: Vector3) => boolean): Vector3 {
  let [a, b] = [0, 1];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (a + b) / 2;
    if (within(interpolateArc(from, to, middle))) a = middle;
    else b = middle;
  }
  return interpolateArc(from, to, a);
}

function position(v: Vector3): [number, number] {
  const { lat, lon } = toLatLon(v);
  return [Math.round(lon * 1e5) / 1e5, Math.round(lat * 1e5) / 1e5];
}
