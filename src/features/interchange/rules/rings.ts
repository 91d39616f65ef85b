/**
 * Checks rings of [longitude, latitude] before they become outlines: enough points, closed, in range, not crossing
 * themselves. Edges are great circles. Longitudes may run past 180° or jump there; vectors do not see it.
 */
import { readRing, ringArea, toVector } from '../../../kernel/sphere';
import type { Vector3 } from '../../../kernel/rotations/types';

export type Ring = readonly (readonly number[])[];

export interface RingFault {
  readonly read: string;
  readonly problem: string;
  readonly hint: string;
}

const point = (p: readonly number[]): string => `[${p[0]}, ${p[1]}]`;

export function ringFault(ring: unknown): RingFault | null {
  if (!Array.isArray(ring))
    return {
      read: String(ring),
      problem: 'a ring is not a list of positions',
      hint: 'Save the file as GeoJSON again.',
    };
  const bad = ring.findIndex((p) => !isPosition(p));
  if (bad >= 0) {
    return {
      read: JSON.stringify(ring[bad]),
      problem: `position ${bad + 1} is not two numbers`,
      hint: 'Write [longitude, latitude].',
    };
  }
  const positions = ring as Ring;
  const first = positions[0];
  const last = positions[positions.length - 1];
  if (!first || !last || positions.length < 4) {
    return {
      read: `${positions.length} positions`,
      problem: 'a ring needs four positions or more',
      hint: 'Give at least three corners and repeat the first.',
    };
  }
  const beyond = positions.find((p) => Math.abs(p[1]!) > 90 || Math.abs(p[0]!) > 540);
  if (beyond) {
    return {
      read: point(beyond),
      problem: 'a position off the globe',
      hint: 'Positions are [longitude, latitude]: latitude within 90°.',
    };
  }
  if (!same(first, last)) {
    return {
      read: `${point(first)} … ${point(last)}`,
      problem: 'the ring is not closed',
      hint: 'Repeat the first position at the end.',
    };
  }
  const crossing = selfCrossing(positions);
  if (!crossing) return degenerateFault(positions);
  const [i, j] = crossing;
  return {
    read: point(positions[i]!),
    problem: `the ring crosses itself: edge ${i + 1} meets edge ${j + 1} near ${point(positions[j]!)}`,
    hint: 'Move or remove a vertex there, or split the outline into parts.',
  };
}

/** sr; some 40 m² on the Earth. */
const NOTHING_SR = 1e-12;
/** Cosine of nearly half a turn. */
const OPPOSITE = -1 + 1e-12;

/** Rings of great circles that enclose nothing, or whose edges could run anywhere. */
function degenerateFault(positions: Ring): RingFault | null {
  const vectors = positions.map((p) => toVector(p[1]!, p[0]!));
  const opposite = vectors.findIndex((v, i) => i > 0 && dot(v, vectors[i - 1]!) < OPPOSITE);
  if (opposite > 0)
    return {
      read: `${point(positions[opposite - 1]!)} to ${point(positions[opposite]!)}`,
      problem: 'an edge joins opposite points of the globe',
      hint: 'Add a vertex between them, to say which way it goes.',
    };
  if (Math.abs(ringArea(readRing(positions))) > NOTHING_SR) return null;
  return {
    read: `${positions.length} positions`,
    problem: 'the ring encloses nothing',
    hint: 'Edges are great circles: round a pole, give a vertex every 90° of longitude or less.',
  };
}

const isPosition = (p: unknown): boolean =>
  Array.isArray(p) && p.length >= 2 && Number.isFinite(p[0]) && Number.isFinite(p[1]);

/** The same place on the globe: longitudes a whole turn apart, or any longitude at a pole. */
function same(a: readonly number[], b: readonly number[]): boolean {
  if (a[1] !== b[1]) return false;
  return Math.abs(a[1]!) === 90 || (a[0]! - b[0]!) % 360 === 0;
}

const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
/** Sines smaller than this are rounding: touching, or one edge along another. */
const TOUCH = 1e-13;

interface Edge {
  readonly index: number;
  readonly a: Vector3;
  readonly b: Vector3;
  readonly normal: Vector3;
  readonly low: number;
  readonly high: number;
}

/** @returns indices of the first two edges that properly cross, or null. Sorted by height above the equator's plane. */
export function selfCrossing(ring: Ring): readonly [number, number] | null {
  const vectors = ring.map((p) => toVector(p[1]!, p[0]!));
  const edges: Edge[] = [];
  for (let i = 0; i + 1 < vectors.length; i++) {
    const a = vectors[i]!;
    const b = vectors[i + 1]!;
    const normal = cross(a, b);
    const size = Math.hypot(...normal);
    if (size < TOUCH) continue;
    const rise = Math.hypot(normal[0], normal[1]) / size;
    const top = peak(a, b, normal) ? rise : Math.max(a[2], b[2]);
    const bottom = peak(a, b, [-normal[0], -normal[1], -normal[2]]) ? -rise : Math.min(a[2], b[2]);
    edges.push({ index: i, a, b, normal, low: bottom, high: top });
  }
  edges.sort((p, q) => p.low - q.low);
  for (let i = 0; i < edges.length; i++) {
    const p = edges[i]!;
    for (let j = i + 1; j < edges.length && edges[j]!.low <= p.high; j++) {
      const q = edges[j]!;
      if (properlyCross(p, q)) return p.index < q.index ? [p.index, q.index] : [q.index, p.index];
    }
  }
  return null;
}

/** Whether the arc from a to b passes the highest point of its great circle (normal pointing as a × b). */
function peak(a: Vector3, b: Vector3, normal: Vector3): boolean {
  const top: Vector3 = [-normal[0] * normal[2], -normal[1] * normal[2], normal[0] ** 2 + normal[1] ** 2];
  return dot(cross(normal, a), top) > 0 && dot(cross(b, normal), top) > 0;
}

function properlyCross(p: Edge, q: Edge): boolean {
  const c = dot(p.normal, q.a);
  const d = dot(p.normal, q.b);
  const e = dot(q.normal, p.a);
  const f = dot(q.normal, p.b);
  if (Math.abs(c) < TOUCH || Math.abs(d) < TOUCH || Math.abs(e) < TOUCH || Math.abs(f) < TOUCH) return false;
  if (c > 0 === d > 0 || e > 0 === f > 0) return false;
  return c > 0 === f > 0;
}
