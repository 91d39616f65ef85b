import { IDENTITY, inverse, multiply, rotate, unrotate } from '../rotations/quaternion';
import type { Quaternion, Vector3 } from '../rotations/types';
import { EARTH_RADIUS_KM } from '../sphere/angles';
import { arcNormal, nearestOnArc } from '../sphere/arc';
import { BOUNDARY_TOLERANCE_RAD } from '../sphere/contains';
import { angularDistance } from '../sphere/distance';
import { cross, dot, negate, norm, normalizeVector, subtract } from '../sphere/vector';
import { edgeEnd, type EdgeTree, edgeTree, gap, type Run, splitPair, turnTree, wholeRun } from './edge-tree';
import { type Outline, outlineHolds } from './outline';

/** Worst error of a separation of up to 179°, km. */
export const SEPARATION_ERROR_KM = 2e-11;

/** An outline where it lies: turned from present coordinates into those of a frame that both of a pair share. */
export interface PlacedOutline {
  readonly outline: Outline;
  readonly quaternion: Quaternion;
}

export interface Separation {
  /** 0 where the two overlap, and where they come within {@link BOUNDARY_TOLERANCE_RAD} of each other. */
  readonly km: number;
  /** The nearest place of each, unit vectors in the shared frame; one that both cover where they overlap. */
  readonly on_a: Vector3;
  readonly on_b: Vector3;
}

interface Nearest {
  readonly chord: number;
  readonly a: Vector3;
  readonly b: Vector3;
}

/** An outline where it lies at present. Inverse: {@link turnedBack}. */
export const placedAt = (outline: Outline, quaternion: Quaternion = IDENTITY): PlacedOutline => ({
  outline,
  quaternion,
});

/** A place of the shared frame in an outline’s present coordinates. */
export const turnedBack = ({ quaternion }: PlacedOutline, place: Vector3): Vector3 =>
  unrotate(quaternion, place);

/**
 * Least great-circle distance between two outlines, arcs and not corners alone; null where one has no edges.
 * Both trees are searched at once, nearest balls first, leaving out pairs that cannot come nearer than the
 * best found.
 */
export function separation(a: PlacedOutline, b: PlacedOutline): Separation | null {
  const between = multiply(inverse(a.quaternion), b.quaternion);
  const [treeA, treeB] = [edgeTree(a.outline), turnTree(edgeTree(b.outline), between)];
  if (!treeA.count || !treeB.count) return null;
  const within = cornerWithin(a.outline, b.outline, between);
  const found = within ?? nearestEdges(treeA, treeB);
  const angle = angularDistance(found.a, found.b);
  return {
    km: angle <= BOUNDARY_TOLERANCE_RAD ? 0 : angle * EARTH_RADIUS_KM,
    on_a: rotate(a.quaternion, found.a),
    on_b: rotate(a.quaternion, found.b),
  };
}

/** A corner of one outline that the other holds: with edges that do not cross, one of each ring tells. */
function cornerWithin(a: Outline, b: Outline, between: Quaternion): Nearest | null {
  for (const v of ringCorners(b)) {
    const here = rotate(between, v);
    if (outlineHolds(a, here)) return { chord: 0, a: here, b: here };
  }
  for (const v of ringCorners(a)) if (outlineHolds(b, unrotate(between, v))) return { chord: 0, a: v, b: v };
  return null;
}

const ringCorners = (outline: Outline): Vector3[] =>
  outline.flatMap(({ polygon }) => polygon.flatMap(([first, , third]) => (first && third ? [first] : [])));

function nearestEdges(a: EdgeTree, b: EdgeTree): Nearest {
  let best: Nearest = { chord: Infinity, a: edgeEnd(a, 0, 0), b: edgeEnd(b, 0, 0) };
  const search = (runA: Run, runB: Run): void => {
    const pairs = splitPair(a, runA, b, runB);
    if (!pairs) {
      const found = nearestOfEdges(a, runA.low, b, runB.low);
      if (found.chord < best.chord) best = found;
      return;
    }
    const gaps = pairs.map(([x, y]) => gap(a, x.node, b, y.node));
    const order = gaps[0]! <= gaps[1]! ? [0, 1] : [1, 0];
    for (const i of order) if (best.chord > 0 && gaps[i]! < best.chord) search(...pairs[i]!);
  };
  search(wholeRun(a), wholeRun(b));
  return best;
}

function nearestOfEdges(a: EdgeTree, edgeA: number, b: EdgeTree, edgeB: number): Nearest {
  return nearestOfArcs(
    [edgeEnd(a, edgeA, 0), edgeEnd(a, edgeA, 1)],
    [edgeEnd(b, edgeB, 0), edgeEnd(b, edgeB, 1)],
  );
}

type Arc = readonly [Vector3, Vector3];

/**
 * The nearest places of two arcs: where they cross, else an end of one and its nearest place on the other, as
 * two great circles have no other least distance than 0.
 */
function nearestOfArcs(p: Arc, q: Arc): Nearest {
  const at = arcsCross(p, q);
  if (at) return { chord: 0, a: at, b: at };
  const ends = [
    ...q.map((v) => pair(nearestOnArc(v, ...p), v)),
    ...p.map((v) => pair(v, nearestOnArc(v, ...q))),
  ];
  return ends.reduce((least, next) => (next.chord < least.chord ? next : least));
}

const pair = (a: Vector3, b: Vector3): Nearest => ({ chord: norm(subtract(a, b)), a, b });

/** Where two arcs cross, null where they do not; one that ends on the other may answer either way. */
function arcsCross(p: Arc, q: Arc): Vector3 | null {
  const [m, n] = [arcNormal(...p), arcNormal(...q)];
  const [p0, p1, q0, q1] = [dot(n, p[0]), dot(n, p[1]), dot(m, q[0]), dot(m, q[1])];
  if (p0 * p1 >= 0 || q0 * q1 >= 0 || p0 > 0 !== q1 > 0) return null;
  const along = normalizeVector(cross(m, n));
  return dot(along, p[0]) + dot(along, p[1]) > 0 ? along : negate(along);
}
