import { normalizeVector, scale } from '../sphere/vector';
import { between, exp, log, multiply } from './quaternion';
import type { Quaternion, Stage } from './types';

/**
 * Worst error of an interpolated rotation, radians, for stage angles up to 179°; beyond, it grows as 1/(π −
 * angle).
 */
export const INTERPOLATE_ERROR_RAD = 3e-15;

/**
 * R(s) = Exp(s Log(R₂ R₁⁻¹)) R₁: constant rate about the stage pole, the shorter way round. s = 0 gives r1, s
 * = 1 gives r2; other values go on at the same rate. Only for rotations of one reference: a product of such
 * rotations does not turn at a constant rate.
 */
export function interpolate(r1: Quaternion, r2: Quaternion, s: number): Quaternion {
  return multiply(exp(scale(log(between(r1, r2)), s)), r1);
}

interface Row {
  readonly age_ma: number;
  readonly quaternion: Quaternion;
}

/** The motion from a younger to an older row of one reference, ready for {@link evaluateStage}. */
export function stageBetween(younger: Row, older: Row): Stage {
  const turn = log(between(younger.quaternion, older.quaternion));
  const angle = Math.hypot(turn[0], turn[1], turn[2]);
  return {
    younger_ma: younger.age_ma,
    older_ma: older.age_ma,
    start: younger.quaternion,
    axis: angle > 0 ? normalizeVector(turn) : [0, 0, 1],
    rate: angle / (older.age_ma - younger.age_ma),
  };
}

/** R at an age within a stage (or beyond it, at the same rate): one sine and one cosine. */
export function evaluateStage(stage: Stage, age_ma: number): Quaternion {
  const half = (stage.rate * (age_ma - stage.younger_ma)) / 2;
  const s = Math.sin(half);
  return multiply([Math.cos(half), stage.axis[0] * s, stage.axis[1] * s, stage.axis[2] * s], stage.start);
}
