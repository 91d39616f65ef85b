import { requireFinite } from '../errors';
import { poseAt } from '../rotations/circuit';
import { rotate } from '../rotations/quaternion';
import { circuitRowAges } from '../rotations/row-ages';
import { requirePlace, requireSpan, type Span, spanAges } from '../rotations/span';
import type { Model, Status, Vector3 } from '../rotations/types';
import { poseVelocity, STILL_MM_YR, velocityAt } from '../rotations/velocity';
import { cosDegrees, sinDegrees, toDegrees } from '../sphere/angles';
import { azimuthOf } from '../sphere/azimuth';

/** A relative velocity split along a margin; B lies left of it, looking along its azimuth, and A right. */
export interface Convergence {
  /** Towards 90° right of the margin’s azimuth: positive where B closes on A. */
  readonly normal_mm_yr: number;
  /** Along the margin’s azimuth. */
  readonly tangential_mm_yr: number;
  readonly speed_mm_yr: number;
  /** Of the relative velocity, clockwise from north; null where nothing moves. */
  readonly azimuth_deg: number | null;
  /** Angle between the relative velocity and the normal, 0 (head-on or straight apart) to 90 (slip); null where nothing moves. */
  readonly obliquity_deg: number | null;
}

/** Worst error of {@link convergenceAcross} and of the way back, as a share of the speed. */
export const CONVERGENCE_ERROR = 5e-16;

/**
 * Splits the velocity of B as seen from A, mm/yr east and north, across a margin of an azimuth in degrees.
 * Inverse: {@link velocityAcross}.
 * @throws {KernelError} `NonFinite` for the azimuth.
 */
export function convergenceAcross(
  east_mm_yr: number,
  north_mm_yr: number,
  margin_azimuth_deg: number,
): Convergence {
  const s = sinDegrees(requireFinite('margin_azimuth_deg', margin_azimuth_deg));
  const c = cosDegrees(margin_azimuth_deg);
  const normal_mm_yr = east_mm_yr * c - north_mm_yr * s;
  const tangential_mm_yr = east_mm_yr * s + north_mm_yr * c;
  const speed_mm_yr = Math.hypot(east_mm_yr, north_mm_yr);
  const moves = speed_mm_yr > STILL_MM_YR;
  return {
    normal_mm_yr,
    tangential_mm_yr,
    speed_mm_yr,
    azimuth_deg: moves ? azimuthOf(east_mm_yr, north_mm_yr) : null,
    obliquity_deg: moves ? toDegrees(Math.atan2(Math.abs(tangential_mm_yr), Math.abs(normal_mm_yr))) : null,
  };
}

/** East and north components, mm/yr, of what closes and slips across a margin. Inverse: {@link convergenceAcross}. */
export function velocityAcross(
  normal_mm_yr: number,
  tangential_mm_yr: number,
  margin_azimuth_deg: number,
): { east_mm_yr: number; north_mm_yr: number } {
  const s = sinDegrees(requireFinite('margin_azimuth_deg', margin_azimuth_deg));
  const c = cosDegrees(margin_azimuth_deg);
  return {
    east_mm_yr: normal_mm_yr * c + tangential_mm_yr * s,
    north_mm_yr: tangential_mm_yr * c - normal_mm_yr * s,
  };
}

export interface ConvergenceRequest extends Span {
  /** B, left of the margin. */
  readonly block: string;
  /** A, right of the margin. */
  readonly relative_to: string;
  /** The place on the margin, degrees, the same at every age in the coordinates of `coordinates_of`. */
  readonly lat: number;
  readonly lon: number;
  /** In the same coordinates, degrees clockwise from north. */
  readonly margin_azimuth_deg: number;
  /** Block or frame in whose coordinates place and azimuths are given; A where left out. */
  readonly coordinates_of?: string;
}

/** Convergence at one age; nulls with a status where there is none. */
export interface ConvergencePoint {
  readonly age_ma: number;
  readonly status: Status;
  /** True at the age of a row of the circuit from B to A, where the younger stage counts. */
  readonly at_row: boolean;
  readonly normal_mm_yr: number | null;
  readonly tangential_mm_yr: number | null;
  readonly speed_mm_yr: number | null;
  readonly azimuth_deg: number | null;
  readonly obliquity_deg: number | null;
}

/**
 * Relative motion of B towards A across a margin over a span of ages, youngest first: at every step, both ends
 * and every row’s age of the circuit from B to A.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (span, latitude),
 * `CircuitCycle`.
 */
export function convergencePath(model: Model, request: ConvergenceRequest): ConvergencePoint[] {
  const { block, relative_to, older_ma, younger_ma } = request;
  requireSpan(request);
  requireFinite('margin_azimuth_deg', request.margin_azimuth_deg);
  const place = requirePlace(request.lat, request.lon);
  const rows = circuitRowAges(model, block, older_ma, younger_ma, relative_to);
  return spanAges(request, rows).map(({ age_ma, at_row }) => {
    const answer = convergenceAt(model, request, place, age_ma);
    return typeof answer === 'string'
      ? { age_ma, status: answer, at_row, ...NOTHING }
      : { age_ma, status: 'placed', at_row, ...answer };
  });
}

const NOTHING = {
  normal_mm_yr: null,
  tangential_mm_yr: null,
  speed_mm_yr: null,
  azimuth_deg: null,
  obliquity_deg: null,
};

function convergenceAt(
  model: Model,
  { block, relative_to, margin_azimuth_deg, coordinates_of = relative_to }: ConvergenceRequest,
  place: Vector3,
  age_ma: number,
): Convergence | Status {
  const pose = poseAt(model, block, age_ma, relative_to);
  if (pose.status !== 'placed') return pose.status;
  const turning = poseVelocity(pose, { block, relative_to, age_ma, oldest_ma: model.oldest_ma });
  if (turning.status !== 'placed') return turning.status;
  const seen = poseAt(model, relative_to, age_ma, coordinates_of);
  if (seen.status !== 'placed') return seen.status;
  const { east_mm_yr, north_mm_yr } = velocityAt(place, rotate(seen.quaternion, turning.omega));
  return convergenceAcross(east_mm_yr, north_mm_yr, margin_azimuth_deg);
}
