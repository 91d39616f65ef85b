import { holdsAt } from '../../kernel/rotations/circuit';
import type { Model } from '../../kernel/rotations/types';
import { poseAt } from '../motion/scene/tolerant';
import type { SliceBlock } from './slice/subject';

/** Shares of the oldest age, in the order in which they are tried. */
const SHARES = [0.5, 0.25, 0.75, 0.125, 0.02, 0];

/** The age at which a sheet opens: half of the oldest, or the first of some others at which something is drawn. */
export function firstAge(
  model: Model,
  blocks: readonly Pick<SliceBlock, 'code' | 'outlines'>[],
  frame: string,
): number {
  const ages = SHARES.map((share) => Math.round(10 * share * model.oldest_ma) / 10);
  const draws = (age_ma: number): boolean =>
    blocks.some(
      ({ code, outlines }) =>
        outlines.some((o) => holdsAt(o.outline_older_ma, o.outline_younger_ma, age_ma)) &&
        poseAt(model, code, age_ma, frame).status === 'placed',
    );
  return ages.find(draws) ?? 0;
}
