import { outlinesOf } from '~/features/motion/outlines';
import type { Motion } from '~/features/motion/queries';
import type { DatedOutline } from '~/kernel/kinematics';

/** The outlines of blocks by age, as the kernel takes them. */
export async function datedOutlines(
  { state }: Pick<Motion, 'state'>,
  code: string,
): Promise<readonly DatedOutline[]> {
  const own = (await outlinesOf(state)).filter(({ block }) => block === code);
  return own.map(({ parts, inside, older_ma, younger_ma }) => ({
    outline: parts.map(({ rings }) => ({ polygon: rings, inside })),
    appears_ma: older_ma,
    disappears_ma: younger_ma,
  }));
}
