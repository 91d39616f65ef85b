import { circuitAt } from '../rotations/circuit';
import { requireBlock } from '../rotations/model-index';
import { rotate } from '../rotations/quaternion';
import { circuitRowAges } from '../rotations/row-ages';
import { requireSpan, type Span, spanAges } from '../rotations/span';
import type { Model } from '../rotations/types';
import { toLatLon } from '../sphere/vector';
import { overlap } from './overlap';
import { type Pair, type PairStatus, placePair } from './pair';
import { separation } from './separation';

export interface SeparationRequest extends Pair, Span {
  /** Block or frame in whose coordinates the nearest places are given; block_a where left out. */
  readonly coordinates_of?: string;
}

interface Place {
  readonly lat: number;
  readonly lon: number;
}

/** How far two blocks were apart at one age; nulls with a status where one of them has no place or no outline. */
export interface SeparationPoint {
  readonly age_ma: number;
  readonly status: PairStatus;
  /** True at the age of a row of the circuit between the two. */
  readonly at_row: boolean;
  /** 0 where they overlap or touch. */
  readonly distance_km: number | null;
  readonly overlap_km2: number | null;
  /** Of the smaller of the two. */
  readonly overlap_percent: number | null;
  /** The nearest place of each, null too where `coordinates_of` is not connected to them. */
  readonly nearest_a: Place | null;
  readonly nearest_b: Place | null;
}

const NOTHING = {
  distance_km: null,
  overlap_km2: null,
  overlap_percent: null,
  nearest_a: null,
  nearest_b: null,
};

/**
 * Separation and overlap of two blocks over a span of ages, youngest first: at every step, both ends and every
 * row’s age of the circuit between them.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (span), `CircuitCycle`.
 */
export function separationPath(model: Model, request: SeparationRequest): SeparationPoint[] {
  const { block_a, block_b, older_ma, younger_ma } = request;
  requireSpan(request);
  requireBlock(model, block_a, 'block_a');
  requireBlock(model, block_b, 'block_b');
  const rows = circuitRowAges(model, block_b, older_ma, younger_ma, block_a);
  return spanAges(request, rows).map(({ age_ma, at_row }) => separationAt(model, request, age_ma, at_row));
}

function separationAt(
  model: Model,
  request: SeparationRequest,
  age_ma: number,
  at_row: boolean,
): SeparationPoint {
  const pair = placePair(model, request, age_ma);
  const apart = pair.status === 'placed' ? separation(pair.a, pair.b) : null;
  if (pair.status !== 'placed' || !apart)
    return { age_ma, status: pair.status === 'placed' ? 'no outline' : pair.status, at_row, ...NOTHING };
  const shared = apart.km > 0 ? { km2: 0, percent: 0 } : overlap(pair.a, pair.b);
  const { quaternion } = circuitAt(model, request.block_a, age_ma, request.coordinates_of ?? request.block_a);
  return {
    age_ma,
    status: 'placed',
    at_row,
    distance_km: apart.km,
    overlap_km2: shared.km2,
    overlap_percent: shared.percent,
    nearest_a: quaternion && toLatLon(rotate(quaternion, apart.on_a)),
    nearest_b: quaternion && toLatLon(rotate(quaternion, apart.on_b)),
  };
}
