import { requireAge } from '../errors';
import { type Absolute, absoluteAt, TOP } from './batch-circuit';
import { existenceAt, type PoseOptions } from './circuit';
import { createIndex, requireBlock } from './model-index';
import { type Model, type Status, STATUSES } from './types';

/**
 * Worst difference, radians, between a pose of a batch and the exact circuit's, for circuits of up to eight
 * links.
 */
export const BATCH_ERROR_RAD = 2e-14;

/** Status of a batch as its place in STATUSES; the inverse is `STATUSES[code]`. */
export const statusCode = (status: Status): number => STATUSES.indexOf(status);

/**
 * R(block | relative_to) of every block at one age, in the order of `model.blocks`: [w, x, y, z] each, NaN
 * where there is no pose, and a {@link statusCode} each. The same answers as `poseAt`, but a block in a loop
 * is `not connected` instead of an error.
 * @throws {KernelError} `UnknownBlock` for relative_to, `NegativeAge`, `NonFinite`.
 */
export function posesAt(
  model: Model,
  age_ma: number,
  relative_to: string,
  quaternions: Float64Array,
  statuses: Uint8Array,
  { beyond = 'none' }: PoseOptions = {},
): void {
  requireBlock(model, relative_to, 'relative_to');
  const still = createIndex(model).get(relative_to)!;
  const absolute = absoluteAt(model, requireAge('age_ma', age_ma), beyond);
  const { values } = absolute;
  const [w, x, y, z] = [
    values[4 * still]!,
    -values[4 * still + 1]!,
    -values[4 * still + 2]!,
    -values[4 * still + 3]!,
  ];

  model.blocks.forEach((block, i) => {
    const existence = existenceAt(block, age_ma);
    const status = existence === 'placed' ? connection(absolute, i, still, age_ma) : existence;
    statuses[i] = statusCode(status);
    const at = 4 * i;
    if (status !== 'placed') {
      quaternions.fill(NaN, at, at + 4);
      return;
    }
    const [bw, bx, by, bz] = [values[at]!, values[at + 1]!, values[at + 2]!, values[at + 3]!];
    quaternions[at] = w * bw - x * bx - y * by - z * bz;
    quaternions[at + 1] = w * bx + x * bw + y * bz - z * by;
    quaternions[at + 2] = w * by - x * bz + y * bw + z * bx;
    quaternions[at + 3] = w * bz + x * by - y * bx + z * bw;
  });
}

function connection({ tops, ends }: Absolute, i: number, still: number, age_ma: number): Status {
  if (tops[i] === tops[still]) return ends[i] === TOP.loop ? 'not connected' : 'placed';
  const [a, b] = [ends[i], ends[still]];
  if (a === TOP.loop || b === TOP.loop) return 'not connected';
  if (
    age_ma === 0 &&
    (a === TOP.noRotations || b === TOP.noRotations) &&
    a! <= TOP.noRotations &&
    b! <= TOP.noRotations
  )
    return 'placed';
  const stopped = [a, b].some((end) => end === TOP.outsideRotations || end === TOP.noRotations);
  return stopped ? 'outside rotations' : 'not connected';
}

/**
 * As {@link posesAt}, as row-major 3 × 3 matrices, nine numbers each. The inverse of such a matrix is its
 * transpose.
 */
export function matricesAt(
  model: Model,
  age_ma: number,
  relative_to: string,
  matrices: Float64Array,
  statuses: Uint8Array,
  options: PoseOptions = {},
): void {
  const quaternions = new Float64Array(4 * model.blocks.length);
  posesAt(model, age_ma, relative_to, quaternions, statuses, options);
  for (let i = 0, m = 0, q = 0; i < model.blocks.length; i++, m += 9, q += 4) {
    const [w, x, y, z] = [quaternions[q]!, quaternions[q + 1]!, quaternions[q + 2]!, quaternions[q + 3]!];
    matrices[m] = 1 - 2 * (y * y + z * z);
    matrices[m + 1] = 2 * (x * y - w * z);
    matrices[m + 2] = 2 * (x * z + w * y);
    matrices[m + 3] = 2 * (x * y + w * z);
    matrices[m + 4] = 1 - 2 * (x * x + z * z);
    matrices[m + 5] = 2 * (y * z - w * x);
    matrices[m + 6] = 2 * (x * z - w * y);
    matrices[m + 7] = 2 * (y * z + w * x);
    matrices[m + 8] = 1 - 2 * (x * x + y * y);
  }
}
