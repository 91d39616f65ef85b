import { requireAge } from '../errors';
import { type Beyond, evaluateLeg } from './leg-at';
import { requireBlock } from './model-index';
import { IDENTITY, inverse, multiply } from './quaternion';
import { routeAt, type Step } from './route';
import type { BlockInput, Link, Model, Pose } from './types';

/** Worst error of a composed rotation, radians, for each link of the circuit. */
export const LINK_ERROR_RAD = 4e-15;

export type PlacedPose = Extract<Pose, { status: 'placed' }>;

export interface PoseOptions {
  readonly beyond?: Beyond;
}

/**
 * R(block | relative_to) at an age: carries a point of the block from its present position to where it was,
 * in the coordinates of relative_to, which stands still. The circuit goes through the lowest common ancestor,
 * each link evaluated before links are composed. Whether relative_to existed does not matter; whether the
 * block did is answered first.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `CircuitCycle`.
 */
export function poseAt(
  model: Model,
  block: string,
  age_ma: number,
  relative_to: string,
  options: PoseOptions = {},
): Pose {
  const existence = existenceAt(requireBlock(model, block), requireAge('age_ma', age_ma));
  requireBlock(model, relative_to, 'relative_to');
  if (existence !== 'placed') return { status: existence, quaternion: null, at: block, links: [] };
  return circuitAt(model, block, age_ma, relative_to, options);
}

/**
 * Whether a block exists at an age: disappears_ma < age ≤ appears_ma, and at 0 where it has not disappeared.
 */
export function existenceAt(
  { appears_ma, disappears_ma }: Pick<BlockInput, 'appears_ma' | 'disappears_ma'>,
  age_ma: number,
): 'placed' | 'older than block' | 'younger than block' {
  if (appears_ma !== null && age_ma > appears_ma) return 'older than block';
  return disappears_ma && age_ma <= disappears_ma ? 'younger than block' : 'placed';
}

/** Whether an age lies in a life or a part of it, by the rule of {@link existenceAt}; null: no such end. */
export const holdsAt = (appears_ma: number | null, disappears_ma: number | null, age_ma: number): boolean =>
  existenceAt({ appears_ma, disappears_ma }, age_ma) === 'placed';

/** As {@link poseAt}, whether or not the block exists at that age. */
export function circuitAt(
  model: Model,
  block: string,
  age_ma: number,
  relative_to: string,
  { beyond = 'none' }: PoseOptions = {},
): Pose {
  const route = routeAt(model, block, requireAge('age_ma', age_ma), relative_to, beyond);
  if (route.status !== 'placed') return { ...route, quaternion: null, links: [] };
  const links = route.steps.map((step) => linkAt(step, age_ma));
  const quaternion = links.reduce((product, link) => multiply(link.quaternion, product), IDENTITY);
  return { status: 'placed', quaternion, links };
}

function linkAt({ block, leg, direction }: Step, age_ma: number): Link {
  const { quaternion, ...evaluated } = evaluateLeg(leg, age_ma);
  return {
    block: block.code,
    relative_to: leg.relative_to,
    direction,
    quaternion: direction === 'up' ? quaternion : inverse(quaternion),
    ...evaluated,
  };
}
