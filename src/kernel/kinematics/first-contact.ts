import { KernelError, requireFinite } from '../errors';
import { requireBlock } from '../rotations/model-index';
import { requireSpan, type Span, spanAges } from '../rotations/span';
import type { Model } from '../rotations/types';
import { EARTH_RADIUS_KM } from '../sphere/angles';
import { fastest, type Interval, JUST_OLDER_MYR, smoothIntervals } from './intervals';
import { outlineEnds, type Pair, placePair } from './pair';
import { type Bracket, signChanges } from './roots';
import { separation } from './separation';

export interface ContactRequest extends Pair, Span {
  /** Two blocks no further apart than this are in contact, km; 0 or more. */
  readonly tolerance_km: number;
}

/** Two sides of a break whose separations differ by more than this, km, are a jump, not a motion. */
const JUMP_KM = 1e-3;

export type FirstContact =
  | {
      readonly status: 'contact';
      /** Middle of the interval. */
      readonly age_ma: number;
      /**
       * Between these ages the separation falls to the tolerance; no further apart than `ROOT_TOLERANCE_MYR`
       * where it falls by motion.
       */
      readonly older_ma: number;
      readonly younger_ma: number;
      /**
       * `motion`: apart before, in contact after. `first place`: in contact as soon as both have a place and an
       * outline, so perhaps earlier. `jump`: from one side of a hand-over, or of an outline’s end, to the other.
       */
      readonly by: 'motion' | 'first place' | 'jump';
    }
  /** Placed at some ages, and never in contact; the least distance of those asked at. */
  | { readonly status: 'apart'; readonly least_km: number; readonly least_ma: number }
  /** At no age do both have a place and an outline. */
  | { readonly status: 'not placed' };

/**
 * Forward in time, the first age at which the separation of two blocks falls to a tolerance. It is asked at
 * every step, at every row’s age and at both sides of every break; in between it cannot fall faster than the
 * links turn, so that a short contact is found too (see `SHORTEST_EXCURSION_MYR`).
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (span, tolerance),
 * `CircuitCycle`.
 */
export function firstContact(model: Model, request: ContactRequest): FirstContact {
  const { block_a, block_b } = request;
  check(model, request);
  const known = new Map<number, number | null>();
  const above = (age_ma: number): number | null => {
    const value = known.has(age_ma) ? known.get(age_ma)! : aboveTolerance(model, request, age_ma);
    known.set(age_ma, value);
    return value;
  };
  let before: 'apart' | 'not placed' = 'not placed';
  for (const interval of smoothIntervals(model, block_b, block_a, request, outlineEnds(request))) {
    const first = above(interval.older_ma);
    if (first === null) {
      before = 'not placed';
      continue;
    }
    if (first <= 0) return atOnce(interval.older_ma, before, above);
    const bracket = fall(model, request, interval, above);
    if (bracket) return { status: 'contact', ...span(bracket), by: 'motion' };
    before = 'apart';
  }
  const last = above(request.younger_ma);
  if (last !== null && last <= 0) return atOnce(request.younger_ma, before, above);
  return leastOf(known, request.tolerance_km);
}

function check(model: Model, { block_a, block_b, tolerance_km, ...span }: ContactRequest): void {
  requireSpan(span);
  requireBlock(model, block_a, 'block_a');
  requireBlock(model, block_b, 'block_b');
  if (requireFinite('tolerance_km', tolerance_km) < 0)
    throw new KernelError('OutOfRange', {
      quantity: 'tolerance_km',
      value: tolerance_km,
      problem: 'a distance is never below 0 km',
    });
}

/** Separation above the tolerance, km; null where the two have no place or no outline. */
function aboveTolerance(model: Model, request: ContactRequest, age_ma: number): number | null {
  const pair = placePair(model, request, age_ma);
  const apart = pair.status === 'placed' ? separation(pair.a, pair.b) : null;
  return apart && apart.km - request.tolerance_km;
}

/** The first fall to the tolerance within an interval at whose older end the two are apart. */
function fall(
  model: Model,
  request: ContactRequest,
  { older_ma, younger_ma }: Interval,
  above: (age_ma: number) => number | null,
): Bracket | null {
  const pair = placePair(model, request, older_ma);
  const rate = pair.status === 'placed' ? EARTH_RADIUS_KM * fastest(pair.pose) : 0;
  const end = Math.min(older_ma, younger_ma + JUST_OLDER_MYR);
  const ages = spanAges({ older_ma, younger_ma: end, step_ma: request.step_ma }).reverse();
  for (let i = 1; i < ages.length; i++) {
    const value = (age_ma: number): number => above(age_ma) ?? Infinity;
    const [bracket] = signChanges({ value, rate }, ages[i - 1]!.age_ma, ages[i]!.age_ma);
    if (bracket) return bracket;
  }
  return null;
}

const span = ({ older_ma, younger_ma }: Interval): { age_ma: number } & Interval => ({
  age_ma: (older_ma + younger_ma) / 2,
  older_ma,
  younger_ma,
});

/** In contact at the very age of a break, by whichever way led there. */
function atOnce(
  younger_ma: number,
  before: 'apart' | 'not placed',
  above: (age_ma: number) => number | null,
): FirstContact {
  const older_ma = younger_ma + JUST_OLDER_MYR;
  const at = { status: 'contact', age_ma: younger_ma, older_ma: younger_ma, younger_ma } as const;
  if (before === 'not placed') return { ...at, by: 'first place' };
  if ((above(older_ma) ?? Infinity) > JUMP_KM) return { ...at, by: 'jump' };
  return { status: 'contact', ...span({ older_ma, younger_ma }), by: 'motion' };
}

function leastOf(known: ReadonlyMap<number, number | null>, tolerance_km: number): FirstContact {
  let least: { least_km: number; least_ma: number } | null = null;
  for (const [least_ma, above] of known) {
    if (above === null) continue;
    const least_km = above + tolerance_km;
    if (!least || least_km < least.least_km) least = { least_km, least_ma };
  }
  return least ? { status: 'apart', ...least } : { status: 'not placed' };
}
