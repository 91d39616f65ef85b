import { requireAge } from '../errors';
import { existenceAt, type PlacedPose, poseAt } from '../rotations/circuit';
import { requireBlock } from '../rotations/model-index';
import { IDENTITY } from '../rotations/quaternion';
import type { Model, Status } from '../rotations/types';
import { type DatedOutline, outlineAt } from './outline';
import { placedAt, type PlacedOutline } from './separation';

/** Two blocks with their outlines. */
export interface Pair {
  readonly block_a: string;
  readonly block_b: string;
  readonly outlines_a: readonly DatedOutline[];
  readonly outlines_b: readonly DatedOutline[];
}

/** Why a pair has, or has not, a place at an age; `no outline` where one of them is placed but has none then. */
export type PairStatus = Status | 'no outline';

export type PairPose =
  /** R(block_b | block_a). */
  { readonly status: 'placed'; readonly pose: PlacedPose } | { readonly status: Exclude<Status, 'placed'> };

/** R(block_b | block_a) at an age at which both exist. @throws {KernelError} as `poseAt`. */
export function pairPoseAt(model: Model, block_a: string, block_b: string, age_ma: number): PairPose {
  const existence = existenceAt(requireBlock(model, block_a, 'block_a'), requireAge('age_ma', age_ma));
  requireBlock(model, block_b, 'block_b');
  if (existence !== 'placed') return { status: existence };
  const pose = poseAt(model, block_b, age_ma, block_a);
  return pose.status === 'placed' ? { status: 'placed', pose } : { status: pose.status };
}

export type PlacedPair =
  | {
      readonly status: 'placed';
      readonly pose: PlacedPose;
      /** In block_a’s present coordinates, which stand still. */
      readonly a: PlacedOutline;
      readonly b: PlacedOutline;
    }
  | { readonly status: Exclude<PairStatus, 'placed'> };

/** Both outlines at an age, as seen from block_a. @throws {KernelError} as `poseAt`. */
export function placePair(
  model: Model,
  { block_a, block_b, outlines_a, outlines_b }: Pair,
  age_ma: number,
): PlacedPair {
  const found = pairPoseAt(model, block_a, block_b, age_ma);
  if (found.status !== 'placed') return found;
  const [a, b] = [outlineAt(outlines_a, age_ma), outlineAt(outlines_b, age_ma)];
  if (!a || !b) return { status: 'no outline' };
  return {
    status: 'placed',
    pose: found.pose,
    a: placedAt(a, IDENTITY),
    b: placedAt(b, found.pose.quaternion),
  };
}

/** Ages at which an outline of either begins or ends. */
export const outlineEnds = ({ outlines_a, outlines_b }: Pair): (number | null)[] =>
  [...outlines_a, ...outlines_b].flatMap(({ appears_ma, disappears_ma }) => [appears_ma, disappears_ma]);
