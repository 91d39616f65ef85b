import type { PlacedPose } from '../rotations/circuit';
import type { CompiledRow, Covariance, Link, Model } from '../rotations/types';
import { addCovariances, congruence, outer, scaleCovariance, trace, ZERO_COVARIANCE } from './matrix3';
import { poseSensitivities, type Sensitivities, type Sensitivity } from './sensitivity';

/** One row's part in the covariance of a rotation. */
export interface RowPart extends Sensitivity {
  /** J C Jᵀ and the row's age error, rad²; zero for a row without either. */
  readonly covariance: Covariance;
  readonly dof: number | null;
  /** Index in the links of the pose; −1 for a result of several poses. */
  readonly link: number;
}

export interface RotationUncertainty {
  /** Of u in R = R̂ Exp(u), rad², in the block's present coordinates. */
  readonly covariance: Covariance;
  /** True where a row that matters carries no covariance: the rotation is at least this uncertain. */
  readonly at_least: boolean;
  readonly without: readonly CompiledRow[];
  readonly rows: readonly RowPart[];
}

/** A row whose Jacobian is below this does not matter: it cancels, or its neighbour is met exactly. */
const NO_PART = 1e-12;

/**
 * Uncertainty of a pose, to first order and with rows taken as independent of one another (so it shrinks
 * between rows: the methods page says so). Exact identities at 0 Ma add nothing.
 */
export function poseUncertainty(_model: Model, pose: PlacedPose): RotationUncertainty {
  return uncertaintyOf(poseSensitivities(pose), pose.links);
}

/** As {@link poseUncertainty}, for any result whose sensitivities are known: stages, differences, sums. */
export function uncertaintyOf(
  sensitivities: Sensitivities,
  links: readonly Link[] = [],
): RotationUncertainty {
  const rows = [...sensitivities.values()].filter(matters).map((s): RowPart => {
    const { row, jacobian, age_jacobian } = s;
    const own = row.covariance ? congruence(jacobian, row.covariance) : ZERO_COVARIANCE;
    const sigma = (row.age_two_sigma_ma ?? 0) / 2;
    const link = links.findIndex(({ younger, older }) => younger.id === row.id || older.id === row.id);
    return {
      ...s,
      covariance: addCovariances(own, scaleCovariance(outer(age_jacobian), sigma ** 2)),
      dof: row.cov_dof,
      link,
    };
  });
  const without = rows.flatMap(({ row }) => (row.covariance ? [] : [row]));
  const covariance = rows.reduce((sum, part) => addCovariances(sum, part.covariance), ZERO_COVARIANCE);
  return { covariance, at_least: without.length > 0, without, rows };
}

const matters = ({ jacobian }: Sensitivity): boolean => jacobian.some((entry) => Math.abs(entry) > NO_PART);

/**
 * True where nothing of a result's uncertainty is known though it is not exact: no number should be shown.
 */
export const isUnknown = ({ covariance, at_least }: RotationUncertainty): boolean =>
  at_least && trace(covariance) === 0;
