import { scale } from '../sphere/vector';
import { circuitBreakpoints } from './breakpoints';
import { circuitAt } from './circuit';
import { requireBlock } from './model-index';
import { angleOf, between, log } from './quaternion';
import type { Model, Quaternion } from './types';
import type { AngularVelocity } from './velocity';

/** Step past the end of a leg, Myr, by which the older side of it is meant. */
const JUST_OLDER_MYR = 1e-9;
/** Two sides of a leg's end that differ by more than this, radians (0.6 m on the sphere), are a jump, not a motion. */
const JUMP_RAD = 1e-7;

/** How far a window reaches on one side, and the rotation there. */
interface End {
  readonly age_ma: number;
  readonly quaternion: Quaternion;
}

/**
 * Ω = Log(R(t₁) R(t₂)⁻¹)/(t₂ − t₁) over a window cut to the ages at which block and circuit go on without a
 * break: the jump of a hand-over is no motion, and ends the window on its side.
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
  const ends = circuitBreakpoints(model, block, relative_to);
  const at = (age: number): Quaternion | null => circuitAt(model, block, age, relative_to).quaternion;

  const here = at(age_ma);
  if (!here) return { status: 'outside rotations', at: block };
  const older = reachOlder({ age_ma, quaternion: here }, bounds.older, ends, at);
  const younger = reachYounger({ age_ma, quaternion: here }, bounds.younger, ends, at);
  if (!(older.age_ma > younger.age_ma)) return { status: 'outside rotations', at: block };
  const length = older.age_ma - younger.age_ma;
  return {
    status: 'placed',
    omega: scale(log(between(older.quaternion, younger.quaternion)), 1 / length),
    older_ma: older.age_ma,
    younger_ma: younger.age_ma,
    clipped: older.age_ma < wanted.older || younger.age_ma > wanted.younger,
  };
}

const jumps = (a: Quaternion, b: Quaternion): boolean => angleOf(between(a, b)) > JUMP_RAD;

function reachOlder(
  from: End,
  bound: number,
  ends: readonly number[],
  at: (age: number) => Quaternion | null,
): End {
  let reached = from;
  for (const end of [...ends.filter((age) => age >= from.age_ma), Infinity]) {
    const age_ma = Math.min(end, bound);
    const quaternion = at(age_ma);
    if (!quaternion) break;
    reached = { age_ma, quaternion };
    if (end >= bound) break;
    const beyond = at(end + JUST_OLDER_MYR);
    if (!beyond || jumps(quaternion, beyond)) break;
  }
  return reached;
}

function reachYounger(
  from: End,
  bound: number,
  ends: readonly number[],
  at: (age: number) => Quaternion | null,
): End {
  let reached = from;
  for (const end of [...ends.filter((age) => age < from.age_ma).reverse(), -Infinity]) {
    const age_ma = Math.max(end, bound);
    if (age_ma >= reached.age_ma || !at((age_ma + reached.age_ma) / 2)) break;
    const quaternion = at(age_ma);
    const above = end >= bound ? at(end + JUST_OLDER_MYR) : quaternion;
    if (!quaternion || (above && jumps(quaternion, above))) {
      if (above) reached = { age_ma: age_ma + JUST_OLDER_MYR, quaternion: above };
      break;
    }
    reached = { age_ma, quaternion };
    if (end <= bound) break;
  }
  return reached;
}
