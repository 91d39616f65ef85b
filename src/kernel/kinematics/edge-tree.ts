import { toMatrix } from '../rotations/quaternion';
import type { Quaternion, Vector3 } from '../rotations/types';
import { eachEdge } from '../sphere/ring';
import { type Outline, ringsWithInsideLeft } from './outline';

/**
 * Components are rounded to multiples of this (0.7 nm on the ground): exact as doubles, and as integers for
 * signs that rounding must not turn.
 */
export const GRID = 2 ** -52;
/** Added to every ball, so that rounding leaves no edge outside. */
const BALL_SLACK = 4e-15;

/**
 * The edges of an outline with what is meant on their left, in the order of its rings, and a binary tree of
 * balls over runs of them: neighbours along an outline are neighbours on the ground. Node 0 holds all edges;
 * node k that holds edges from `low` to before `high` has the halves of the run in nodes 2k + 1 and 2k + 2.
 */
export interface EdgeTree {
  readonly count: number;
  /** [ax, ay, az, bx, by, bz] of each edge. */
  readonly ends: Float64Array;
  /** [x, y, z, radius] of each node, chords through the sphere. */
  readonly balls: Float64Array;
  /** First edge of each ring, and the number of edges at the end. */
  readonly starts: readonly number[];
}

const trees = new WeakMap<Outline, EdgeTree>();

/** Made once for an outline, which must not change afterwards. */
export function edgeTree(outline: Outline): EdgeTree {
  const known = trees.get(outline);
  if (known) return known;
  const numbers: number[] = [];
  const starts: number[] = [0];
  for (const ring of outline.flatMap(ringsWithInsideLeft)) {
    eachEdge(ring.map(onGrid), (a, b) => {
      if (a[0] !== b[0] || a[1] !== b[1] || a[2] !== b[2]) numbers.push(...a, ...b);
    });
    if (numbers.length / 6 > (starts.at(-1) ?? 0)) starts.push(numbers.length / 6);
  }
  const count = numbers.length / 6;
  const ends = Float64Array.from(numbers);
  const balls = new Float64Array(count ? 4 * 2 ** (Math.ceil(Math.log2(count)) + 1) : 0);
  if (count) fillBalls(ends, balls, 0, 0, count);
  const tree = { count, ends, balls, starts };
  trees.set(outline, tree);
  return tree;
}

const toGrid = (x: number): number => Math.round(x / GRID) * GRID;
/** A unit vector with its components on the grid. */
export const onGrid = (v: Vector3): Vector3 => [toGrid(v[0]), toGrid(v[1]), toGrid(v[2])];

/** A tree of the same edges turned; the inverse rotation turns it back, to rounding. */
export function turnTree({ count, ends, balls, starts }: EdgeTree, quaternion: Quaternion): EdgeTree {
  const [xx, xy, xz, yx, yy, yz, zx, zy, zz] = toMatrix(quaternion);
  const turned = { count, ends: new Float64Array(ends.length), balls: balls.slice(), starts };
  for (let i = 0; i < ends.length; i += 3) {
    const [x, y, z] = [ends[i]!, ends[i + 1]!, ends[i + 2]!];
    turned.ends[i] = toGrid(xx * x + xy * y + xz * z);
    turned.ends[i + 1] = toGrid(yx * x + yy * y + yz * z);
    turned.ends[i + 2] = toGrid(zx * x + zy * y + zz * z);
  }
  for (let i = 0; i < balls.length; i += 4) {
    const [x, y, z] = [balls[i]!, balls[i + 1]!, balls[i + 2]!];
    turned.balls[i] = xx * x + xy * y + xz * z;
    turned.balls[i + 1] = yx * x + yy * y + yz * z;
    turned.balls[i + 2] = zx * x + zy * y + zz * z;
  }
  return turned;
}

/** The end of an edge: 0 where it begins, 1 where it ends. */
export function edgeEnd({ ends }: EdgeTree, edge: number, end: 0 | 1): Vector3 {
  const i = 6 * edge + 3 * end;
  return [ends[i]!, ends[i + 1]!, ends[i + 2]!];
}

function fillBalls(ends: Float64Array, balls: Float64Array, node: number, low: number, high: number): void {
  let [x, y, z] = [0, 0, 0];
  for (let i = 6 * low; i < 6 * high; i += 3) {
    x += ends[i]!;
    y += ends[i + 1]!;
    z += ends[i + 2]!;
  }
  const share = high - low === 1 ? 1 / Math.max(length(x, y, z), 1e-9) : 0.5 / (high - low);
  [x, y, z] = [x * share, y * share, z * share];
  let radius = 0;
  for (let i = 6 * low; i < 6 * high; i += 6) radius = Math.max(radius, reach(ends, i, x, y, z));
  balls.set([x, y, z, radius + BALL_SLACK], 4 * node);
  if (high - low === 1) return;
  const middle = (low + high) >> 1;
  fillBalls(ends, balls, 2 * node + 1, low, middle);
  fillBalls(ends, balls, 2 * node + 2, middle, high);
}

/** At least the greatest distance from a point to an edge: that to the middle of its arc, and half its length more. */
function reach(ends: Float64Array, i: number, x: number, y: number, z: number): number {
  const [mx, my, mz] = [ends[i]! + ends[i + 3]!, ends[i + 1]! + ends[i + 4]!, ends[i + 2]! + ends[i + 5]!];
  const to = 1 / Math.max(length(mx, my, mz), 1e-9);
  const half = length(mx * to - ends[i]!, my * to - ends[i + 1]!, mz * to - ends[i + 2]!);
  return length(mx * to - x, my * to - y, mz * to - z) + half;
}

const length = (x: number, y: number, z: number): number => Math.sqrt(x * x + y * y + z * z);

/** Least distance, as a chord, that balls of two nodes leave between what they hold; below 0 where they overlap. */
export function gap(a: EdgeTree, nodeA: number, b: EdgeTree, nodeB: number): number {
  const [i, j] = [4 * nodeA, 4 * nodeB];
  const centres = length(
    a.balls[i]! - b.balls[j]!,
    a.balls[i + 1]! - b.balls[j + 1]!,
    a.balls[i + 2]! - b.balls[j + 2]!,
  );
  return centres - a.balls[i + 3]! - b.balls[j + 3]!;
}

/** A node with the run of edges that it holds. */
export interface Run {
  readonly node: number;
  readonly low: number;
  readonly high: number;
}

export const wholeRun = ({ count }: EdgeTree): Run => ({ node: 0, low: 0, high: count });

export function halves({ node, low, high }: Run): [Run, Run] {
  const middle = (low + high) >> 1;
  return [
    { node: 2 * node + 1, low, high: middle },
    { node: 2 * node + 2, low: middle, high },
  ];
}

/** The two runs with the one of the larger ball halved, each pair; null where both are single edges. */
export function splitPair(a: EdgeTree, runA: Run, b: EdgeTree, runB: Run): [Run, Run][] | null {
  const [manyA, manyB] = [runA.high - runA.low > 1, runB.high - runB.low > 1];
  if (!manyA && !manyB) return null;
  const largerA = a.balls[4 * runA.node + 3]! >= b.balls[4 * runB.node + 3]!;
  return manyA && (largerA || !manyB)
    ? halves(runA).map((half) => [half, runB])
    : halves(runB).map((half) => [runA, half]);
}
