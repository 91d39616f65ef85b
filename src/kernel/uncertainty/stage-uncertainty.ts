import { inverse, toMatrix } from '../rotations/quaternion';
import type { StageFrame, StageRotation } from '../rotations/stage';
import { type RotationUncertainty, uncertaintyOf } from './pose-uncertainty';
import { composed, inverted, poseSensitivities } from './sensitivity';

type PlacedStage = Extract<StageRotation, { status: 'placed' }>;

/**
 * Uncertainty of a stage rotation, in the coordinates in which it acts first (R = R̂ Exp(u)). Rows that both
 * ages use are fully correlated with themselves: what they do to both ends alike cancels.
 */
export function stageUncertainty(
  { older, younger }: PlacedStage,
  frame: StageFrame = 'reference',
): RotationUncertainty {
  const [s2, s1] = [poseSensitivities(older), poseSensitivities(younger)];
  const back = toMatrix(inverse(older.quaternion));
  const s2Back = inverted(toMatrix(older.quaternion), s2);
  return uncertaintyOf(
    frame === 'reference' ? composed(s1, back, s2Back) : composed(s2Back, toMatrix(younger.quaternion), s1),
  );
}
