import type { PlacedPose } from '~/kernel/rotations/circuit';
import { isUnknown, type RotationUncertainty } from '~/kernel/uncertainty/pose-uncertainty';

/** What is known of a rotation's uncertainty, in a sentence that counts the links without a covariance. */
export function uncertaintySentence({ links }: PlacedPose, uncertainty: RotationUncertainty): string {
  const lacking = uncertainty.without.map(({ id }) => id);
  const without = links.filter(
    ({ younger, older }) => lacking.includes(younger.id) || lacking.includes(older.id),
  ).length;
  if (isUnknown(uncertainty)) return `none of ${links.length} links carries a covariance`;
  if (uncertainty.at_least) {
    return `at least: ${without} of ${links.length} links ${without === 1 ? 'carries' : 'carry'} no covariance`;
  }
  if (uncertainty.rows.length === 0) return 'exact';
  return links.length === 1
    ? 'the link carries a covariance'
    : `each of ${links.length} links carries a covariance`;
}
