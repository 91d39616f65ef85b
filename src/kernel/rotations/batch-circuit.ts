import { type Beyond, evaluateLeg, legAt } from './leg-at';
import { createIndex } from './model-index';
import type { Model } from './types';

/** Why the circuit above a block ends at its top. */
export const TOP = { root: 0, noRotations: 1, outsideRotations: 2, missingReference: 3, loop: 4 } as const;

/** Every block's rotation to the top of its own circuit at one age, in the order of `model.blocks`. */
export interface Absolute {
  /** Index of the top block; for a block in a loop −1 − its own index, which equals no other. */
  readonly tops: Int32Array;
  /** One of {@link TOP}. */
  readonly ends: Uint8Array;
  /** [w, x, y, z] each. */
  readonly values: Float64Array;
}

const UNKNOWN = -0x80000000;
const OPEN = UNKNOWN + 1;

/** Each link is evaluated once, however many blocks hang on it. */
export function absoluteAt(model: Model, age_ma: number, beyond: Beyond): Absolute {
  const index = createIndex(model);
  const count = model.blocks.length;
  const tops = new Int32Array(count).fill(UNKNOWN);
  const ends = new Uint8Array(count);
  const values = new Float64Array(4 * count);

  const setTop = (i: number, top: number, end: number): void => {
    tops[i] = top;
    ends[i] = end;
    values[4 * i] = 1;
  };

  function resolve(i: number): void {
    const block = model.blocks[i]!;
    tops[i] = OPEN;
    const leg = legAt(block, age_ma, beyond);
    if (!leg) {
      const end =
        block.legs.length > 0 ? TOP.outsideRotations : block.kind === 'frame' ? TOP.root : TOP.noRotations;
      return setTop(i, i, end);
    }
    const parent = index.get(leg.relative_to);
    if (parent === undefined) return setTop(i, i, TOP.missingReference);
    if (tops[parent] === UNKNOWN) resolve(parent);
    if (tops[parent] === OPEN || ends[parent] === TOP.loop) return setTop(i, -1 - i, TOP.loop);

    tops[i] = tops[parent]!;
    ends[i] = ends[parent]!;
    const [bw, bx, by, bz] = evaluateLeg(leg, age_ma).quaternion;
    const p = 4 * parent;
    const [w, x, y, z] = [values[p]!, values[p + 1]!, values[p + 2]!, values[p + 3]!];
    values[4 * i] = w * bw - x * bx - y * by - z * bz;
    values[4 * i + 1] = w * bx + x * bw + y * bz - z * by;
    values[4 * i + 2] = w * by - x * bz + y * bw + z * bx;
    values[4 * i + 3] = w * bz + x * by - y * bx + z * bw;
  }

  for (let i = 0; i < count; i++) if (tops[i] === UNKNOWN) resolve(i);
  return { tops, ends, values };
}
