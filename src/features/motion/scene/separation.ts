/** Least distance between the outlines of two blocks at an age, for the line drawn between them. */
import { EARTH_RADIUS_KM } from '../../../kernel/sphere/angles';
import { angleBetween, cross, dot, turn, turnBack, unit, type Vec } from '../globe/matrix';
import { vertex, type Points, type Shape } from '../globe/shape';
import { matrixOf, type Frame } from './frame';
import { findSceneBlock, outlineAt, type Scene } from './scene';

export interface Separation {
  readonly km: number;
  /** Ends of the shortest line in frame coordinates, on the first block and on the second. */
  readonly from: Vec;
  readonly to: Vec;
  readonly other: string;
}

/** Pairs of vertices looked at in one search; larger outlines are searched in a coarser copy. */
const MOST_PAIRS = 2e6;
const COARSE_PAIRS = 6e4;

/** The block a block is joined to today: the first of its references up the circuit that has an outline. */
export function partnerOf(scene: Scene, code: string): string | null {
  const seen = new Set([code]);
  let block = scene.model.blocks.find((candidate) => candidate.code === code);
  while (block) {
    const above: string | undefined = block.legs[0]?.relative_to;
    if (!above || seen.has(above)) return null;
    if (findSceneBlock(scene, above)?.outlines.length) return above;
    seen.add(above);
    block = scene.model.blocks.find((candidate) => candidate.code === above);
  }
  return null;
}

/** `coarse` searches thinner outlines, for a picture that moves. */
export function separationAt(
  scene: Scene,
  frame: Frame,
  code: string,
  other: string,
  coarse = false,
): Separation | null {
  const shapes = [code, other].map((name) => {
    const block = findSceneBlock(scene, name);
    return block ? outlineAt(block, frame.age) : null;
  });
  const [a, b] = shapes;
  const [ma, mb] = [matrixOf(frame, code), matrixOf(frame, other)];
  if (!a || !b || !ma || !mb) return null;
  const between = closest(
    coarse ? COARSE_PAIRS : MOST_PAIRS,
    a,
    b,
    (v) => turnBack(mb, turn(ma, v)),
    (v) => turnBack(ma, turn(mb, v)),
  );
  if (!between) return null;
  const from = turn(ma, between.a);
  const to = turn(mb, between.b);
  return { km: EARTH_RADIUS_KM * angleBetween(from, to), from, to, other };
}

interface Pair {
  a: Vec;
  b: Vec;
}

/** Nearest vertices of both, then the edges beside them; `toB` and `toA` change coordinates. */
function closest(most: number, a: Shape, b: Shape, toB: (v: Vec) => Vec, toA: (v: Vec) => Vec): Pair | null {
  let level = 0;
  while (level + 1 < a.levels.length && size(a.levels[level]) * size(b.levels[level]) > most) level++;
  let best = -Infinity;
  let found: [Points, number, Points, number] | null = null;
  for (const ringA of a.levels[level] ?? []) {
    for (let i = 0; i < ringA.length / 3; i++) {
      const [x, y, z] = toB(vertex(ringA, i));
      for (const ringB of b.levels[level] ?? []) {
        for (let j = 0; j < ringB.length; j += 3) {
          const near = x * (ringB[j] as number) + y * (ringB[j + 1] as number) + z * (ringB[j + 2] as number);
          if (near > best) {
            best = near;
            found = [ringA, i, ringB, j / 3];
          }
        }
      }
    }
  }
  if (!found) return null;
  const [ringA, i, ringB, j] = found;
  const pairs: Pair[] = [];
  const p = vertex(ringA, i);
  for (const q of besides(ringB, j, toB(p))) pairs.push({ a: p, b: q });
  const r = vertex(ringB, j);
  for (const q of besides(ringA, i, toA(r))) pairs.push({ a: q, b: r });
  return pairs.reduce((least, pair) =>
    angleBetween(toB(pair.a), pair.b) < angleBetween(toB(least.a), least.b) ? pair : least,
  );
}

const size = (parts: readonly Points[] | undefined): number =>
  (parts ?? []).reduce((sum, p) => sum + p.length / 3, 0);

/** The vertex itself and the nearest points of the two edges that meet there. */
function besides(ring: Points, i: number, from: Vec): Vec[] {
  const n = ring.length / 3;
  const here = vertex(ring, i);
  return [
    here,
    onEdge(from, here, vertex(ring, (i + 1) % n)),
    onEdge(from, vertex(ring, (i + n - 1) % n), here),
  ];
}

function onEdge(from: Vec, a: Vec, b: Vec): Vec {
  const normal = unit(cross(a, b));
  const h = dot(from, normal);
  const foot = unit([from[0] - h * normal[0], from[1] - h * normal[1], from[2] - h * normal[2]]);
  const within = dot(cross(a, foot), normal) >= 0 && dot(cross(foot, b), normal) >= 0;
  return within ? foot : angleBetween(from, a) < angleBetween(from, b) ? a : b;
}
