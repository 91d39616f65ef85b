/** Where a block shows on the canvas: the box of its visible vertices and the mean of them. */
import type { Ground } from './ground';
import { turn } from './matrix';
import { vertex, type Shape } from './shape';

export interface Extent {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: number;
  readonly y: number;
}

/** Share of a block that must be in view for its name to be shown. */
const LEAST_SEEN = 0.1;

export function extentOf(shape: Shape, pose: ArrayLike<number>, at: number, ground: Ground): Extent | null {
  const parts = shape.levels[shape.levels.length - 1] ?? [];
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  let [sx, sy, seen, all] = [0, 0, 0, 0];
  for (const part of parts) {
    for (let i = 0; i < part.length / 3; i++) {
      all++;
      const xy = ground.at(turn(pose, vertex(part, i), at));
      if (!xy) continue;
      const [x, y] = xy;
      left = Math.min(left, x);
      right = Math.max(right, x);
      top = Math.min(top, y);
      bottom = Math.max(bottom, y);
      sx += x;
      sy += y;
      seen++;
    }
  }
  if (seen === 0 || seen / all < LEAST_SEEN) return null;
  return { left, right, top, bottom, x: sx / seen, y: sy / seen };
}
