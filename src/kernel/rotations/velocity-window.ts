import { scale } from '../sphere/vector';
import { circuitBreakpoints } from './breakpoints';
import { circuitAt } from './circuit';
import { requireBlock } from './model-index';
import { between, log } from './quaternion';
import type { Model } from './types';
import type { AngularVelocity } from './velocity';

/** Step past the end of a leg, Myr, by which the older side of it is meant. */
const JUST_OLDER_MYR = 1e-9;

/**
 * Ω = Log(R(t₁) R(t₂)⁻¹)/(t₂ − t₁) over a window cut to the ages at which block and circuit go on without a
 * break.
 */
export function windowedVelocity(
  model: Model,
  block: string,
  age_ma: number,
  relative_to: string,
  window_myr: number,
): AngularVelocity {
  const { appears_ma, disappears_ma } = requireBlock(model, block);
  const wanted = { older: age_ma + window_myr / 2, younger: age_ma - window_myr / 2 };
  const bounds = {
    older: Math.min(wanted.older, appears_ma ?? Infinity),
    younger: Math.max(wanted.younger, disappears_ma ?? 0, 0),
  };
  const ages = circuitBreakpoints(model, block, relative_to);
  const placed = (age: number): boolean => circuitAt(model, block, age, relative_to).status === 'placed';

  let older_ma = age_ma;
  for (const end of [...ages.filter((age) => age > age_ma), Infinity]) {
    const next = Math.min(end, bounds.older);
    if (!placed(next)) break;
    older_ma = next;
    if (end >= bounds.older) break;
  }
  let younger_ma = age_ma;
  for (const end of [...ages.filter((age) => age < age_ma).reverse(), -Infinity]) {
    const next = Math.max(end, bounds.younger);
    if (next >= younger_ma || !placed((next + younger_ma) / 2)) break;
    const reached = placed(next);
    younger_ma = reached ? next : next + JUST_OLDER_MYR;
    if (!reached || end <= bounds.younger) break;
  }

  const older = circuitAt(model, block, older_ma, relative_to);
  const younger = circuitAt(model, block, younger_ma, relative_to);
  if (older.status !== 'placed' || younger.status !== 'placed' || !(older_ma > younger_ma))
    return { status: 'outside rotations', at: block };
  const omega = scale(log(between(older.quaternion, younger.quaternion)), 1 / (older_ma - younger_ma));
  return {
    status: 'placed',
    omega,
    older_ma,
    younger_ma,
    clipped: older_ma < wanted.older || younger_ma > wanted.younger,
  };
}
