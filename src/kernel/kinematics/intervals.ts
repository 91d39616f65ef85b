import { circuitBreakpoints } from '../rotations/breakpoints';
import type { PlacedPose } from '../rotations/circuit';
import { requireBlock } from '../rotations/model-index';
import { circuitRowAges } from '../rotations/row-ages';
import type { Model } from '../rotations/types';

/** Step past an age, Myr, by which its older side is meant. */
export const JUST_OLDER_MYR = 1e-9;

/** Ages from just above younger_ma up to and including older_ma. */
export interface Interval {
  readonly older_ma: number;
  readonly younger_ma: number;
}

/**
 * A span cut, oldest first, into the parts in which every link between two blocks keeps its stage and both
 * blocks their existence, so that what is asked there goes on without a break, or has no answer throughout.
 * `also` are further ages to cut at.
 */
export function smoothIntervals(
  model: Model,
  block: string,
  relative_to: string,
  { older_ma, younger_ma }: Interval,
  also: readonly (number | null)[] = [],
): Interval[] {
  const lives = [block, relative_to].flatMap((code) => {
    const { appears_ma, disappears_ma } = requireBlock(model, code);
    return [appears_ma, disappears_ma];
  });
  const cuts = [
    ...circuitBreakpoints(model, block, relative_to),
    ...circuitRowAges(model, block, older_ma, younger_ma, relative_to),
    ...lives,
    ...also,
  ].filter((age): age is number => age !== null && age > younger_ma && age < older_ma);
  const ages = [...new Set([younger_ma, ...cuts, older_ma])].sort((a, b) => b - a);
  return ages.slice(1).map((younger, i) => ({ older_ma: ages[i]!, younger_ma: younger }));
}

/** At least the greatest speed of any place, radians per Myr, as long as each link keeps its stage. */
export const fastest = ({ links }: PlacedPose): number =>
  links.reduce((sum, { stage }) => sum + (stage?.rate ?? 0), 0);
