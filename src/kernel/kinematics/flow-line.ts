import { KernelError, requireFinite } from '../errors';
import { poseAt } from '../rotations/circuit';
import { requireBlock } from '../rotations/model-index';
import { IDENTITY, rotate, unrotate } from '../rotations/quaternion';
import { circuitRowAges } from '../rotations/row-ages';
import { requirePlace, requireSpan, type Span, spanAges } from '../rotations/span';
import { halfStage, stageOf } from '../rotations/stage';
import type { Model, Quaternion, Status, Vector3 } from '../rotations/types';
import { poseVelocity, velocityAt } from '../rotations/velocity';
import { toLatLon } from '../sphere/vector';
import { pairPoseAt } from './pair';

export interface FlowLineRequest extends Span {
  readonly block_a: string;
  readonly block_b: string;
  /** Where the ridge point lay at `younger_ma`, degrees. */
  readonly lat: number;
  readonly lon: number;
  /** Block or frame in whose coordinates at `younger_ma` it is given; block_a where left out. At 0 Ma all are alike. */
  readonly coordinates_of?: string;
  /** Share of the opening that block_a gains, between 0 and 1; the rest is block_b’s. 0.5 where left out. */
  readonly fraction?: number;
}

/** A place of the sea floor on one flank, in its block’s present coordinates, and how fast the flank grew there. */
export interface FlankPoint {
  readonly lat: number;
  readonly lon: number;
  /** Speed of the ridge as seen from the block; null where the pair has a place but no stage. */
  readonly rate_mm_yr: number | null;
}

/** Sea floor of one age on both flanks; nulls with a status where there is none. */
export interface FlowLinePoint {
  readonly age_ma: number;
  readonly status: Status;
  /** True at the age of a row of the circuit between the two, where the younger stage counts. */
  readonly at_row: boolean;
  readonly a: FlankPoint | null;
  readonly b: FlankPoint | null;
  /** Speed of the one block as seen from the other, at the ridge. */
  readonly full_rate_mm_yr: number | null;
}

/**
 * The flow line that leaves a ridge point at the younger end of a span, on both flanks, youngest first: where the
 * sea floor made at that point of the ridge lies today on each block, at every step and every row’s age of the
 * circuit between them.
 *
 * From one age to the next older one the ridge turns back by its share of the stage, in block_a’s coordinates:
 * x(t₂) = S^−f x(t₁), S = R(B|A, t₁) R(B|A, t₂)⁻¹; on block_b it is R(B|A)⁻¹ x, which is the same as the other
 * share of the opposite stage. A jump at a hand-over counts as opening. Beyond the first age at which the pair
 * has no place the line does not go on, and every age has that status.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (span, latitude, share),
 * `CircuitCycle`.
 */
export function flowLine(model: Model, request: FlowLineRequest): FlowLinePoint[] {
  const { block_a, block_b, older_ma, younger_ma, fraction = 0.5, coordinates_of = block_a } = request;
  requireSpan(request);
  requireFraction(fraction);
  requireBlock(model, block_a, 'block_a');
  requireBlock(model, block_b, 'block_b');
  const given = requirePlace(request.lat, request.lon);
  const seen = poseAt(model, block_a, younger_ma, coordinates_of);
  let ended: Exclude<Status, 'placed'> | null = seen.status === 'placed' ? null : seen.status;
  let ridge = unrotate(seen.quaternion ?? IDENTITY, given);
  let younger: Quaternion | null = null;
  const rows = circuitRowAges(model, block_b, older_ma, younger_ma, block_a);
  return spanAges(request, rows).map(({ age_ma, at_row }): FlowLinePoint => {
    const pair = ended ? { status: ended } : pairPoseAt(model, block_a, block_b, age_ma);
    if (pair.status !== 'placed') {
      ended = pair.status;
      return { age_ma, status: pair.status, at_row, a: null, b: null, full_rate_mm_yr: null };
    }
    const { pose } = pair;
    if (younger) ridge = olderRidge(ridge, younger, pose.quaternion, fraction);
    younger = pose.quaternion;
    const asked = { block: block_b, relative_to: block_a, age_ma, oldest_ma: model.oldest_ma };
    const turning = poseVelocity(pose, asked);
    const full = turning.status === 'placed' ? velocityAt(ridge, turning.omega).speed_mm_yr : null;
    return {
      age_ma,
      status: 'placed',
      at_row,
      a: { ...toLatLon(ridge), rate_mm_yr: full && full * fraction },
      b: { ...toLatLon(unrotate(younger, ridge)), rate_mm_yr: full && full * (1 - fraction) },
      full_rate_mm_yr: full,
    };
  });
}

/**
 * A ridge point in block_a’s coordinates at the older of two ages, from where it lay at the younger one, with
 * R(block_b | block_a) at both. Inverse: {@link youngerRidge}.
 */
export const olderRidge = (ridge: Vector3, younger: Quaternion, older: Quaternion, fraction = 0.5): Vector3 =>
  unrotate(halfStage(stageOf(older, younger), fraction), ridge);

/** A ridge point at the younger of two ages, from where it lay at the older one. Inverse: {@link olderRidge}. */
export const youngerRidge = (
  ridge: Vector3,
  younger: Quaternion,
  older: Quaternion,
  fraction = 0.5,
): Vector3 => rotate(halfStage(stageOf(older, younger), fraction), ridge);

function requireFraction(fraction: number): void {
  if (requireFinite('fraction', fraction) >= 0 && fraction <= 1) return;
  throw new KernelError('OutOfRange', {
    quantity: 'fraction',
    value: fraction,
    problem: 'a share of the opening lies between 0 and 1',
  });
}
