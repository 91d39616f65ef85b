/** Where everything is at one age, seen from what is held still: one matrix per block, in the model's order. */
import { matricesAt } from '../../../kernel/rotations';
import { STATUSES, type Model, type Status } from '../../../kernel/rotations/types';

export interface Frame {
  readonly model: Model;
  readonly age: number;
  readonly heldStill: string;
  /** Nine numbers a block, NaN where it has no position. */
  readonly matrices: Float64Array;
  readonly statuses: Uint8Array;
  readonly indexOf: ReadonlyMap<string, number>;
}

const indices = new WeakMap<Model, ReadonlyMap<string, number>>();
function indexOf(model: Model): ReadonlyMap<string, number> {
  let index = indices.get(model);
  if (!index) {
    index = new Map(model.blocks.map(({ code }, i) => [code, i]));
    indices.set(model, index);
  }
  return index;
}

export function frameAt(model: Model, age: number, heldStill: string): Frame {
  const matrices = new Float64Array(9 * model.blocks.length);
  const statuses = new Uint8Array(model.blocks.length);
  if (indexOf(model).has(heldStill)) matricesAt(model, age, heldStill, matrices, statuses);
  else matrices.fill(NaN);
  return { model, age, heldStill, matrices, statuses, indexOf: indexOf(model) };
}

/** The last frame asked for is kept: globe, log and notebook ask for the same one. */
export function frameKeeper(): typeof frameAt {
  let last: Frame | null = null;
  return (model, age, heldStill) => {
    if (last?.model !== model || last.age !== age || last.heldStill !== heldStill)
      last = frameAt(model, age, heldStill);
    return last;
  };
}

const presents = frameKeeper();
/** Today's map: every block still present lies where it lies. */
export const presentFrame = (model: Model, heldStill: string): Frame => presents(model, 0, heldStill);

/** A block's 3 × 3 matrix in a frame, or null where it has no position. */
export function matrixOf(frame: Frame, code: string): Float64Array | null {
  const i = frame.indexOf.get(code);
  if (i === undefined || Number.isNaN(frame.matrices[9 * i])) return null;
  return frame.matrices.subarray(9 * i, 9 * i + 9);
}

export const statusOf = (frame: Frame, code: string): Status =>
  STATUSES[frame.statuses[frame.indexOf.get(code) ?? -1] ?? 1] ?? 'no block here';
