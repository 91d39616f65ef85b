import { matricesAt, statusCode } from './batch';
import type { PoseOptions } from './circuit';
import type { Model } from './types';

/** Interleaved x, y, z. */
export type Coordinates = Float64Array | Float32Array;

/**
 * Turns points by the row-major 3 × 3 matrix that starts at `offset` of `matrix`; in and out may be the same
 * array. Inverse: {@link unrotatePoints}.
 */
export function rotatePoints(
  matrix: Coordinates,
  offset: number,
  xyzIn: Coordinates,
  xyzOut: Coordinates,
): void {
  const [a, b, c] = [matrix[offset]!, matrix[offset + 1]!, matrix[offset + 2]!];
  const [d, e, f] = [matrix[offset + 3]!, matrix[offset + 4]!, matrix[offset + 5]!];
  const [g, h, k] = [matrix[offset + 6]!, matrix[offset + 7]!, matrix[offset + 8]!];
  for (let i = 0; i + 2 < xyzIn.length; i += 3) {
    const x = xyzIn[i]!;
    const y = xyzIn[i + 1]!;
    const z = xyzIn[i + 2]!;
    xyzOut[i] = a * x + b * y + c * z;
    xyzOut[i + 1] = d * x + e * y + f * z;
    xyzOut[i + 2] = g * x + h * y + k * z;
  }
}

/** Turns points back, by the transpose. Inverse: {@link rotatePoints}. */
export function unrotatePoints(
  matrix: Coordinates,
  offset: number,
  xyzIn: Coordinates,
  xyzOut: Coordinates,
): void {
  const m = matrix.subarray(offset, offset + 9);
  rotatePoints(
    Float64Array.of(m[0]!, m[3]!, m[6]!, m[1]!, m[4]!, m[7]!, m[2]!, m[5]!, m[8]!),
    0,
    xyzIn,
    xyzOut,
  );
}

/**
 * `past`: present positions to where they were; `present`: positions at the age back to the present ones.
 * Each undoes the other.
 */
export type Direction = 'past' | 'present';

const NO_BLOCK = statusCode('no block here');

/**
 * Carries points of many blocks through one age. `blockOf` holds each point's index in `model.blocks`, −1 for
 * a point on no block. Points without a pose become NaN; `statuses` has one code for each point.
 * @throws {KernelError} as `posesAt`.
 */
export function reconstructPoints(
  model: Model,
  age_ma: number,
  relative_to: string,
  blockOf: Int32Array,
  xyzIn: Coordinates,
  xyzOut: Coordinates,
  statuses: Uint8Array,
  { direction = 'past', ...options }: PoseOptions & { direction?: Direction } = {},
): void {
  const matrices = new Float64Array(9 * model.blocks.length);
  const ofBlocks = new Uint8Array(model.blocks.length);
  matricesAt(model, age_ma, relative_to, matrices, ofBlocks, options);
  if (direction === 'present') transposeEach(matrices);
  for (let p = 0, i = 0; p < blockOf.length; p++, i += 3) {
    const block = blockOf[p]!;
    const status = ofBlocks[block];
    statuses[p] = status ?? NO_BLOCK;
    if (status === undefined) {
      xyzOut.fill(NaN, i, i + 3);
      continue;
    }
    const m = 9 * block;
    const x = xyzIn[i]!;
    const y = xyzIn[i + 1]!;
    const z = xyzIn[i + 2]!;
    xyzOut[i] = matrices[m]! * x + matrices[m + 1]! * y + matrices[m + 2]! * z;
    xyzOut[i + 1] = matrices[m + 3]! * x + matrices[m + 4]! * y + matrices[m + 5]! * z;
    xyzOut[i + 2] = matrices[m + 6]! * x + matrices[m + 7]! * y + matrices[m + 8]! * z;
  }
}

function transposeEach(matrices: Float64Array): void {
  const swap = (i: number, j: number): void => {
    [matrices[i], matrices[j]] = [matrices[j]!, matrices[i]!];
  };
  for (let m = 0; m < matrices.length; m += 9) {
    swap(m + 1, m + 3);
    swap(m + 2, m + 6);
    swap(m + 5, m + 7);
  }
}
