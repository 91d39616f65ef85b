/**
 * Where rings of great circles cross themselves or one another. Edges are sorted into cells of space, so that an
 * outline of n short edges takes some n steps and not n².
 */
import { toVector } from '../../../kernel/sphere';
import type { Vector3 } from '../../../kernel/rotations/types';

type Positions = readonly (readonly number[])[];

/** Where two rings meet: the ring's place in the list and the index of its edge, from that position to the next. */
export interface Crossing {
  readonly first: { readonly ring: number; readonly edge: number };
  readonly second: { readonly ring: number; readonly edge: number };
}

interface Edge {
  readonly ring: number;
  readonly edge: number;
  readonly a: Vector3;
  readonly b: Vector3;
  /** a × b, not normalised. */
  readonly normal: Vector3;
  /** Ends of the edges before and after it along the ring. */
  readonly before: Vector3;
  readonly after: Vector3;
}

const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** Sines smaller than this, of a place from an edge's great circle, are rounding: the place lies on it. */
const TOUCH = 1e-13;
/** Radians; two ways from one place that differ by less run along one another. */
const ALONG = 1e-9;

/** @returns the first crossing found; null where all rings keep clear of themselves and one another, or only touch. */
export function findCrossing(rings: readonly Positions[]): Crossing | null {
  const edges = rings.flatMap(edgesOf);
  const cells = sortIntoCells(edges);
  for (const cell of cells.values()) {
    for (let i = 0; i < cell.length; i++) {
      for (let j = i + 1; j < cell.length; j++) {
        const [p, q] = [edges[cell[i]!]!, edges[cell[j]!]!];
        if (!properlyCross(p, q) && !crossAtVertex(p, q) && !crossAtVertex(q, p)) continue;
        const [first, second] = p.ring < q.ring || (p.ring === q.ring && p.edge < q.edge) ? [p, q] : [q, p];
        return { first, second };
      }
    }
  }
  return null;
}

const same = (a: Vector3, b: Vector3): boolean =>
  Math.abs(a[0] - b[0]) < TOUCH && Math.abs(a[1] - b[1]) < TOUCH && Math.abs(a[2] - b[2]) < TOUCH;

/** Edges of a closed ring; repeated positions make none. */
function edgesOf(positions: Positions, ring: number): Edge[] {
  const corners: { v: Vector3; index: number }[] = [];
  positions.forEach((p, index) => {
    const v = toVector(p[1]!, p[0]!);
    const last = corners.at(-1);
    if (!last || !same(last.v, v)) corners.push({ v, index });
  });
  if (corners.length > 1 && same(corners[0]!.v, corners.at(-1)!.v)) corners.pop();
  const n = corners.length;
  if (n < 3) return [];
  const at = (i: number): Vector3 => corners[(i + n) % n]!.v;
  return corners.map(({ index }, i) => ({
    ring,
    edge: index,
    a: at(i),
    b: at(i + 1),
    normal: cross(at(i), at(i + 1)),
    before: at(i - 1),
    after: at(i + 2),
  }));
}

/** Cells per unit length at the least and at the most. */
const FEWEST = 2;
const MOST = 1024;

/** Indices of the edges that come near each cell of a grid whose cells are about as wide as an edge is long. */
function sortIntoCells(edges: readonly Edge[]): Map<number, number[]> {
  const lengths = edges
    .map(({ a, b }) => Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]))
    .sort((x, y) => x - y);
  const usual = lengths[Math.floor(lengths.length / 2)] ?? 1;
  const perUnit = Math.min(MOST, Math.max(FEWEST, 1 / usual));
  const cells = new Map<number, number[]>();
  const side = 2 * MOST + 3;
  const place = (x: number): number => Math.floor(x * perUnit) + MOST + 1;
  edges.forEach((edge, index) => {
    for (const [from, to] of pieces(edge, 1 / perUnit)) {
      // An arc leaves the box of its ends by its sagitta at most.
      const bulge = (1 - dot(from, to)) / 4 + TOUCH;
      const low = from.map((x, i) => place(Math.min(x, to[i]!) - bulge));
      const high = from.map((x, i) => place(Math.max(x, to[i]!) + bulge));
      for (let x = low[0]!; x <= high[0]!; x++)
        for (let y = low[1]!; y <= high[1]!; y++)
          for (let z = low[2]!; z <= high[2]!; z++) {
            const key = (x * side + y) * side + z;
            const cell = cells.get(key);
            if (!cell) cells.set(key, [index]);
            else if (cell.at(-1) !== index) cell.push(index);
          }
    }
  });
  return cells;
}

/** An edge as arcs no longer than `most`. */
function* pieces({ a, b }: Edge, most: number): Generator<readonly [Vector3, Vector3]> {
  const chord = Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2]);
  const angle = 2 * Math.asin(Math.min(1, chord / 2));
  const count = Math.max(1, Math.ceil(angle / most));
  const sine = Math.sin(angle);
  const at = (i: number): Vector3 => {
    if (i === 0 || sine < TOUCH) return i === 0 ? a : b;
    if (i === count) return b;
    const [u, v] = [Math.sin((1 - i / count) * angle) / sine, Math.sin((i / count) * angle) / sine];
    return [a[0] * u + b[0] * v, a[1] * u + b[1] * v, a[2] * u + b[2] * v];
  };
  for (let i = 0; i < count; i++) yield [at(i), at(i + 1)];
}

/** Both edges pass through a point within the other. */
function properlyCross(p: Edge, q: Edge): boolean {
  const c = dot(p.normal, q.a);
  const d = dot(p.normal, q.b);
  const e = dot(q.normal, p.a);
  const f = dot(q.normal, p.b);
  if (Math.abs(c) < TOUCH || Math.abs(d) < TOUCH || Math.abs(e) < TOUCH || Math.abs(f) < TOUCH) return false;
  if (c > 0 === d > 0 || e > 0 === f > 0) return false;
  return c > 0 === f > 0;
}

/** The ring of q passes through p's line at q's first end, which is p's own first end or lies within p. */
function crossAtVertex(p: Edge, q: Edge): boolean {
  if (p.ring === q.ring && p.edge === q.edge) return false;
  const at = q.a;
  if (same(at, p.a)) return passesThrough(at, [p.before, p.b], [q.before, q.b]);
  if (same(at, p.b) || !within(p, at)) return false;
  return passesThrough(at, [p.a, p.b], [q.before, q.b]);
}

function within({ a, b, normal }: Edge, v: Vector3): boolean {
  return (
    Math.abs(dot(normal, v)) < TOUCH && dot(cross(normal, a), v) > TOUCH && dot(cross(b, normal), v) > TOUCH
  );
}

/** Two lines through one place change sides there. Lines that run along one another only touch. */
function passesThrough(
  at: Vector3,
  [from, to]: readonly [Vector3, Vector3],
  others: readonly [Vector3, Vector3],
): boolean {
  const start = bearing(at, from);
  const turn = (v: Vector3): number => (bearing(at, v) - start + 4 * Math.PI) % (2 * Math.PI);
  const opening = turn(to);
  const sides = others.map((other) => {
    const angle = turn(other);
    const along = [0, opening, 2 * Math.PI].some((way) => Math.abs(angle - way) < ALONG);
    return along ? null : angle < opening;
  });
  return sides[0] !== null && sides[1] !== null && sides[0] !== sides[1];
}

/** Direction of v as seen from a place, radians, from an arbitrary but fixed zero. */
function bearing(at: Vector3, v: Vector3): number {
  const side: Vector3 = Math.abs(at[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const east = cross(side, at);
  const north = cross(at, east);
  return Math.atan2(dot(v, east), dot(v, north));
}
