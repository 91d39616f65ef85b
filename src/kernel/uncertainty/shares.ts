import type { PlacedPose } from '../rotations/circuit';
import type { CompiledRow, Vector3 } from '../rotations/types';
import { tangentCovariance } from './ellipse';
import type { RotationUncertainty } from './pose-uncertainty';

export interface Shares {
  /**
   * Share of each row in the variance of the position (trace of its tangent covariance). They add up to 1, or
   * are all 0.
   */
  readonly rows: readonly { readonly row: CompiledRow; readonly link: number; readonly share: number }[];
  /** The same by link of the pose, in the order of its links. */
  readonly links: readonly number[];
}

/**
 * Who makes a position as uncertain as it is: links without covariance have no share, so it is one of what is
 * known.
 */
export function shares(pose: PlacedPose, uncertainty: RotationUncertainty, present: Vector3): Shares {
  const variances = uncertainty.rows.map(({ covariance }) => {
    const { ee, nn } = tangentCovariance(pose, covariance, present);
    return ee + nn;
  });
  const whole = variances.reduce((sum, v) => sum + v, 0);
  const rows = uncertainty.rows.map(({ row, link }, i) => ({
    row,
    link,
    share: whole > 0 ? (variances[i] ?? 0) / whole : 0,
  }));
  const links = pose.links.map((_, i) =>
    rows.reduce((sum, part) => sum + (part.link === i ? part.share : 0), 0),
  );
  return { rows, links };
}
