import { KernelError } from '../errors';
import { distanceKm } from '../sphere/distance';
import { EARTH_RADIUS_KM, toDegrees } from '../sphere/angles';
import { circuitAt } from './circuit';
import { evaluateLeg } from './leg-at';
import { angleOf, between, inverse, multiply, rotate } from './quaternion';
import type { CompiledBlock, Leg, Model, Quaternion, Vector3 } from './types';

/**
 * Where a block's rotations change their reference: both placings, in the coordinates of the younger
 * reference at that age.
 */
export interface HandOver {
  readonly block: string;
  readonly age_ma: number;
  readonly younger_reference: string;
  readonly older_reference: string;
  readonly younger: Quaternion;
  /**
   * Null, as are the figures made of it, where the two references have no circuit between them at that age.
   */
  readonly older: Quaternion | null;
  readonly jump_deg: number | null;
  /** The jump of a point 90° from its pole, the greatest there is; for one point see {@link jumpKm}. */
  readonly greatest_km: number | null;
}

/** Every hand-over of a model. Legs that do not share an age have a gap, and no hand-over. */
export function handOverJumps(model: Model): HandOver[] {
  return model.blocks.flatMap((block) =>
    block.legs.flatMap((younger, i) => {
      const older = block.legs[i + 1];
      return older && older.younger_ma === younger.older_ma ? [handOver(model, block, younger, older)] : [];
    }),
  );
}

function handOver(model: Model, block: CompiledBlock, youngerLeg: Leg, olderLeg: Leg): HandOver {
  const age_ma = youngerLeg.older_ma;
  const younger = evaluateLeg(youngerLeg, age_ma).quaternion;
  const older = throughOther(model, olderLeg, youngerLeg.relative_to, age_ma);
  const angle = older && angleOf(between(older, younger));
  return {
    block: block.code,
    age_ma,
    younger_reference: youngerLeg.relative_to,
    older_reference: olderLeg.relative_to,
    younger,
    older,
    jump_deg: angle === null ? null : toDegrees(angle),
    greatest_km: angle === null ? null : angle * EARTH_RADIUS_KM,
  };
}

function throughOther(model: Model, leg: Leg, reference: string, age_ma: number): Quaternion | null {
  const link = circuitOrNull(model, leg.relative_to, age_ma, reference);
  return link && multiply(link, evaluateLeg(leg, age_ma).quaternion);
}

/**
 * Unknown references and loops are problems of the model, listed there; here they only leave the jump
 * unknown.
 */
function circuitOrNull(model: Model, block: string, age_ma: number, relative_to: string): Quaternion | null {
  try {
    return circuitAt(model, block, age_ma, relative_to).quaternion;
  } catch (error) {
    if (error instanceof KernelError) return null;
    throw error;
  }
}

/**
 * How far a point of the block, given at its present position, jumps at a hand-over; null where that cannot
 * be known.
 */
export const jumpKm = ({ younger, older }: HandOver, present: Vector3): number | null =>
  older && distanceKm(rotate(younger, present), rotate(older, present));

/**
 * Takes a position placed by the older leg to where the younger one places it, in the younger reference's
 * coordinates.
 */
export const acrossHandOver = ({ younger, older }: HandOver, position: Vector3): Vector3 | null =>
  older && rotate(multiply(younger, inverse(older)), position);
