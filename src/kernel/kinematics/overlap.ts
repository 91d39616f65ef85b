import { inverse, multiply, unrotate } from '../rotations/quaternion';
import type { Vector3 } from '../rotations/types';
import { EARTH_RADIUS_KM } from '../sphere/angles';
import { arcNormal, nearestOnArc } from '../sphere/arc';
import { triangleArea } from '../sphere/area';
import { angularDistance } from '../sphere/distance';
import { add, cross, dot, negate, norm, normalizeVector } from '../sphere/vector';
import {
  edgeEnd,
  type EdgeTree,
  edgeTree,
  gap,
  halves,
  onGrid,
  type Run,
  splitPair,
  turnTree,
  wholeRun,
} from './edge-tree';
import { type Outline, outlineAreaKm2, outlineHolds } from './outline';
import type { PlacedOutline } from './separation';
import { passing } from './sides';

/** Worst error of an overlap, steradians, for each edge of both outlines; less than that in all is given as 0. */
export const OVERLAP_ERROR_SR_PER_EDGE = 1e-15;

export interface Overlap {
  readonly km2: number;
  /** Of the smaller of the two outlines; 0 where one has no area. */
  readonly percent: number;
}

/** Where an edge of one outline passes one of the other. */
interface Passing {
  readonly edgeA: number;
  readonly edgeB: number;
  /** 1 where edge A goes into outline B (and edge B out of A), −1 the other way. */
  readonly sign: 1 | -1;
  readonly at: Vector3;
}

/**
 * Area that two outlines share, and its share of the smaller one. The boundary of what they share is made of the
 * edges of each within the other, the region on their left: its area is the sum of the triangles from one
 * place to them, up to whole spheres. A part of an edge counts from where it comes in to where it goes out,
 * edges in common once or not at all (see {@link passing}), so that nothing need be joined into rings.
 */
export function overlap(a: PlacedOutline, b: PlacedOutline): Overlap {
  const between = multiply(inverse(a.quaternion), b.quaternion);
  const [treeA, treeB] = [edgeTree(a.outline), turnTree(edgeTree(b.outline), between)];
  const least = Math.min(outlineAreaKm2(a.outline), outlineAreaKm2(b.outline)) / EARTH_RADIUS_KM ** 2;
  if (!treeA.count || !treeB.count || !(least > 0)) return { km2: 0, percent: 0 };

  const passings = allPassings(treeA, treeB);
  const inB = depths(
    treeA,
    passings,
    (p) => [p.edgeA, p.sign],
    depthFinder(b.outline, treeB, 'fixed', (v) => unrotate(between, v)),
  );
  const inA = depths(
    treeB,
    passings,
    (p) => [p.edgeB, -p.sign],
    depthFinder(a.outline, treeA, 'shifted', (v) => v),
  );
  if (!passings.length && !inB.some(Boolean) && !inA.some(Boolean)) return { km2: 0, percent: 0 };

  const origin = clearOrigin(treeA, treeB, passings[0]?.at);
  let sum = fan(origin, treeA, inB) + fan(origin, treeB, inA);
  for (const { edgeA, edgeB, sign, at } of passings)
    sum +=
      sign *
      (triangleArea(origin, at, edgeEnd(treeA, edgeA, 1)) -
        triangleArea(origin, at, edgeEnd(treeB, edgeB, 1)));
  const shared = withinArea(sum, least, OVERLAP_ERROR_SR_PER_EDGE * (treeA.count + treeB.count));
  return { km2: shared * EARTH_RADIUS_KM ** 2, percent: (100 * shared) / least };
}

/** An area known up to whole spheres, as the one from 0 to the greatest that is nearest; 0 within the error. */
function withinArea(sum: number, greatest: number, error: number): number {
  const sphere = 4 * Math.PI;
  const rest = sum - sphere * Math.floor(sum / sphere);
  const area = rest > (greatest + sphere) / 2 ? 0 : Math.min(rest, greatest);
  return area <= error ? 0 : area;
}

function allPassings(a: EdgeTree, b: EdgeTree): Passing[] {
  const found: Passing[] = [];
  const search = (runA: Run, runB: Run): void => {
    if (gap(a, runA.node, b, runB.node) > 0) return;
    const pairs = splitPair(a, runA, b, runB);
    if (pairs) for (const pair of pairs) search(...pair);
    else {
      const p = [edgeEnd(a, runA.low, 0), edgeEnd(a, runA.low, 1)] as const;
      const q = [edgeEnd(b, runB.low, 0), edgeEnd(b, runB.low, 1)] as const;
      const sign = passing(...p, ...q);
      if (sign) found.push({ edgeA: runA.low, edgeB: runB.low, sign, at: crossingOf(p, q) });
    }
  };
  search(wholeRun(a), wholeRun(b));
  return found;
}

type Arc = readonly [Vector3, Vector3];

/** The place where two arcs that pass each other do so; on edges in common, one of those that they share. */
function crossingOf(p: Arc, q: Arc): Vector3 {
  const along = cross(arcNormal(...p), arcNormal(...q));
  if (norm(along) > 1e-12) {
    const unit = normalizeVector(dot(along, add(...p)) > 0 ? along : negate(along));
    return nearestOnArc(unit, ...p);
  }
  const ends = [
    ...p.map((v) => ({ v, off: angularDistance(v, nearestOnArc(v, ...q)) })),
    ...q.map((v) => ({ v, off: angularDistance(v, nearestOnArc(v, ...p)) })),
  ];
  return ends.reduce((best, end) => (end.off < best.off ? end : best)).v;
}

/** For each edge, how often its beginning lies within the other outline: 0 or 1 where that one is sound. */
function depths(
  tree: EdgeTree,
  passings: readonly Passing[],
  edgeAndSign: (p: Passing) => readonly [edge: number, sign: number],
  depthOf: (v: Vector3) => number,
): Int32Array {
  const change = new Int32Array(tree.count);
  for (const p of passings) {
    const [edge, sign] = edgeAndSign(p);
    change[edge]! += sign;
  }
  const depth = new Int32Array(tree.count);
  for (let i = 1; i < tree.starts.length; i++) {
    const start = tree.starts[i - 1]!;
    let now = depthOf(edgeEnd(tree, start, 0));
    for (let edge = start; edge < tree.starts[i]!; edge++) {
      depth[edge] = now;
      now += change[edge]!;
    }
  }
  return depth;
}

/** Places in no special position, on the grid, from which to count edges passed on the way to a corner. */
const REFERENCES: readonly Vector3[] = (
  [
    [0.5257, 0.6882, 0.5],
    [-0.7351, 0.1925, -0.65],
    [0.2917, -0.8514, 0.4358],
  ] as const
).map((v) => onGrid(normalizeVector(v)));

/**
 * How often a corner lies within an outline (0 or 1 where that one is sound): as its reference does, less what the way there
 * passes.
 */
function depthFinder(
  outline: Outline,
  tree: EdgeTree,
  /** Whether the corners are those of the outline that stays or of the shifted one. */
  corners: 'fixed' | 'shifted',
  toPresent: (v: Vector3) => Vector3,
): (v: Vector3) => number {
  const known = new Map<Vector3, number>();
  return (v) => {
    const reference = REFERENCES.find((r) => Math.abs(dot(v, r)) < 0.9)!;
    const depth =
      known.get(reference) ?? Number(outlineHolds(outline, normalizeVector(toPresent(reference))));
    known.set(reference, depth);
    return depth - passedOnTheWay(v, reference, tree, corners);
  };
}

function passedOnTheWay(v: Vector3, to: Vector3, tree: EdgeTree, corners: 'fixed' | 'shifted'): number {
  const normal = arcNormal(v, to);
  const { balls } = tree;
  let passed = 0;
  const search = (run: Run): void => {
    const i = 4 * run.node;
    if (
      Math.abs(normal[0] * balls[i]! + normal[1] * balls[i + 1]! + normal[2] * balls[i + 2]!) > balls[i + 3]!
    )
      return;
    if (run.high - run.low > 1) for (const half of halves(run)) search(half);
    else {
      const [c, d] = [edgeEnd(tree, run.low, 0), edgeEnd(tree, run.low, 1)];
      passed += corners === 'fixed' ? passing(v, to, c, d) : -passing(c, d, v, to);
    }
  };
  search(wholeRun(tree));
  return passed;
}

function fan(origin: Vector3, tree: EdgeTree, depth: Int32Array): number {
  let sum = 0;
  for (let edge = 0; edge < tree.count; edge++) {
    const times = depth[edge]!;
    if (times) sum += times * triangleArea(origin, edgeEnd(tree, edge, 0), edgeEnd(tree, edge, 1));
  }
  return sum;
}

/** A place in the overlap, near which small areas keep their digits, or where its antipode is near a corner another. */
function clearOrigin(a: EdgeTree, b: EdgeTree, passed: Vector3 | undefined): Vector3 {
  const clearance = ([x, y, z]: Vector3): number => {
    let least = 4;
    for (const { ends } of [a, b])
      for (let i = 0; i < ends.length; i += 3)
        least = Math.min(least, (x + ends[i]!) ** 2 + (y + ends[i + 1]!) ** 2 + (z + ends[i + 2]!) ** 2);
    return least;
  };
  const near = passed ?? edgeEnd(a, 0, 0);
  if (clearance(near) > 0.01) return near;
  return [...REFERENCES, ...REFERENCES.map(negate)].reduce((best, v) =>
    clearance(v) > clearance(best) ? v : best,
  );
}
