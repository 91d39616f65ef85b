/** Velocities of blocks at places spread evenly over them. */
import { EARTH_RADIUS_KM } from '../../../kernel/sphere/angles';
import { angularVelocity } from './tolerant';
import { contains } from '../globe/contains';
import { cross, turn, unit, type Vec } from '../globe/matrix';
import { vertex, type Shape } from '../globe/shape';
import { matrixOf, type Frame } from './frame';
import { outlineAt, type Scene } from './scene';

export interface Arrow {
  readonly block: string;
  /** Foot in frame coordinates, a unit vector. */
  readonly from: Vec;
  /** km/Myr (mm/yr) along the surface, in frame coordinates. */
  readonly v: Vec;
}

/** Points of the whole sphere that feet are taken from; about 13 degrees apart. */
const LATTICE = fibonacci(260);
const feet = new WeakMap<Shape, readonly Vec[]>();

/** A spiral that spreads n points evenly over the sphere (common practice, no source). */
function fibonacci(n: number): Vec[] {
  return Array.from({ length: n }, (_, k) => {
    const z = 1 - (2 * k + 1) / n;
    const r = Math.sqrt(1 - z * z);
    const a = k * Math.PI * (3 - Math.sqrt(5));
    return [r * Math.cos(a), r * Math.sin(a), z];
  });
}

function feetOf(shape: Shape): readonly Vec[] {
  let known = feet.get(shape);
  if (!known) {
    const inside = LATTICE.filter((p) => contains(shape, p));
    known = inside.length > 0 ? inside : middle(shape);
    feet.set(shape, known);
  }
  return known;
}

function middle(shape: Shape): Vec[] {
  const sum: Vec = [0, 0, 0];
  for (const part of shape.levels[0] ?? []) {
    for (let i = 0; i < part.length / 3; i++)
      vertex(part, i).forEach((x, k) => (sum[k] = (sum[k] as number) + x));
  }
  const p = unit(sum);
  return contains(shape, p) ? [p] : [];
}

export function arrowsAt(scene: Scene, frame: Frame): Arrow[] {
  return scene.blocks.flatMap((block) => {
    const shape = outlineAt(block, frame.age);
    const matrix = matrixOf(frame, block.code);
    if (!shape || !matrix) return [];
    const turning = angularVelocity(frame.model, block.code, frame.age, frame.heldStill);
    if (turning.status !== 'placed') return [];
    const omega = turning.omega.map((x) => x * EARTH_RADIUS_KM) as unknown as Vec;
    return feetOf(shape).map((foot) => {
      const from = turn(matrix, foot);
      return { block: block.code, from, v: cross(omega, from) };
    });
  });
}
