/** Where a block shows on the canvas: the box of its visible vertices and the mean of them. */
import { type Disc } from './clip';
import { type Shape } from './shape';

export interface Extent {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly x: number;
  readonly y: number;
  /** Share of the vertices that are seen. */
  readonly seen: number;
}

/** null where less than a tenth of it is in view. */
export function extentOf(shape: Shape, m: ArrayLike<number>, at: number, disc: Disc): Extent | null {
  const parts = shape.levels[shape.levels.length - 1] ?? [];
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  let [sx, sy, seen, all] = [0, 0, 0, 0];
  for (const part of parts) {
    for (let i = 0; i < part.length; i += 3) {
      const [px, py, pz] = [part[i] as number, part[i + 1] as number, part[i + 2] as number];
      const z = (m[at + 6] as number) * px + (m[at + 7] as number) * py + (m[at + 8] as number) * pz;
      all++;
      if (z <= 0.02) continue;
      const x = disc.cx + disc.radius * ((m[at] as number) * px + (m[at + 1] as number) * py + (m[at + 2] as number) * pz);
      const y =
        disc.cy - disc.radius * ((m[at + 3] as number) * px + (m[at + 4] as number) * py + (m[at + 5] as number) * pz);
      left = Math.min(left, x);
      right = Math.max(right, x);
      top = Math.min(top, y);
      bottom = Math.max(bottom, y);
      sx += x;
      sy += y;
      seen++;
    }
  }
  if (all === 0 || seen / all < 0.1) return null;
  return { left, right, top, bottom, x: sx / seen, y: sy / seen, seen: seen / all };
}
