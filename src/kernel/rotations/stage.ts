import { KernelError } from '../errors';
import { scale } from '../sphere/vector';
import { type PlacedPose, poseAt, type PoseOptions } from './circuit';
import { between, exp, inverse, log, multiply } from './quaternion';
import type { Model, Pose, Quaternion } from './types';

/** Coordinates in which a stage pole is given: those of the reference, or the block's own present ones. */
export type StageFrame = 'reference' | 'block';

export type StageRotation =
  | {
      readonly status: 'placed';
      readonly quaternion: Quaternion;
      readonly older: PlacedPose;
      readonly younger: PlacedPose;
    }
  | Exclude<Pose, PlacedPose>;

/**
 * The motion of a block from an older to a younger age, forward in time: R(t₁) R(t₂)⁻¹ in the reference's
 * coordinates, R(t₂)⁻¹ R(t₁) in the block's. Given the ages the other way round it is the inverse. Without a
 * place at either age it answers that age's status.
 * @throws {KernelError} as {@link poseAt}.
 */
export function stageRotation(
  model: Model,
  block: string,
  older_ma: number,
  younger_ma: number,
  relative_to: string,
  frame: StageFrame = 'reference',
  options: PoseOptions = {},
): StageRotation {
  const older = poseAt(model, block, older_ma, relative_to, options);
  const younger = poseAt(model, block, younger_ma, relative_to, options);
  if (older.status !== 'placed') return older;
  if (younger.status !== 'placed') return younger;
  return {
    status: 'placed',
    quaternion: stageOf(older.quaternion, younger.quaternion, frame),
    older,
    younger,
  };
}

/** Stage rotation from two total ones. Inverse: {@link youngerFromStage}. */
export const stageOf = (
  older: Quaternion,
  younger: Quaternion,
  frame: StageFrame = 'reference',
): Quaternion => (frame === 'reference' ? between(older, younger) : multiply(inverse(older), younger));

/** The younger total rotation from the older one and the stage between. Inverse: {@link stageOf}. */
export const youngerFromStage = (
  older: Quaternion,
  stage: Quaternion,
  frame: StageFrame = 'reference',
): Quaternion => (frame === 'reference' ? multiply(stage, older) : multiply(older, stage));

/**
 * The same pole, a share of the angle (principal, ≤ 180°): what one flank of a symmetric ridge has. Inverse:
 * {@link wholeStage}.
 */
export const halfStage = (stage: Quaternion, fraction = 0.5): Quaternion => exp(scale(log(stage), fraction));

/**
 * The whole stage of which a flank is a share. Inverse: {@link halfStage}. @throws {KernelError} `OutOfRange`
 * for the share 0.
 */
export function wholeStage(flank: Quaternion, fraction = 0.5): Quaternion {
  if (fraction === 0)
    throw new KernelError('OutOfRange', {
      quantity: 'fraction',
      value: fraction,
      problem: 'a share of 0 keeps nothing of the stage',
    });
  return exp(scale(log(flank), 1 / fraction));
}
