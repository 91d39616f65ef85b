import { toLatLon } from '../sphere/vector';
import { type Ellipse, pointEllipse } from '../uncertainty/ellipse';
import { poseUncertainty } from '../uncertainty/pose-uncertainty';
import { poseAt } from './circuit';
import { rotate } from './quaternion';
import { circuitRowAges } from './row-ages';
import { requirePlace, requireSpan, type Span, spanAges } from './span';
import type { Model, Status, Vector3 } from './types';
import { poseVelocity, velocityAt } from './velocity';

export interface DriftRequest extends Span {
  readonly block: string;
  /** Present position of the point, degrees. */
  readonly lat: number;
  readonly lon: number;
  readonly relative_to: string;
}

/** Where a point was at one age; nulls with a status where it has no place. */
export interface DriftPoint {
  readonly age_ma: number;
  readonly status: Status;
  /** True at the age of a row of the circuit, false where the position is interpolated. */
  readonly at_row: boolean;
  readonly lat: number | null;
  readonly lon: number | null;
  /** Forward in time, by the younger stage at a row; null too where the circuit has a place but no stage. */
  readonly speed_mm_yr: number | null;
  readonly azimuth_deg: number | null;
  /** Null too where no row in use carries a covariance. */
  readonly ellipse_95: Ellipse | null;
}

/**
 * Positions of a point of a block as seen from relative_to, youngest first: at both ends of the span, every
 * step from the younger one, and every row's age of the circuit within.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (ages in the wrong order,
 * step, latitude), `CircuitCycle`.
 */
export function driftPath(model: Model, request: DriftRequest): DriftPoint[] {
  const { block, older_ma, younger_ma, relative_to } = request;
  requireSpan(request);
  const present = requirePlace(request.lat, request.lon);
  const rows = circuitRowAges(model, block, older_ma, younger_ma, relative_to);
  return spanAges(request, rows).map(({ age_ma, at_row }) =>
    driftPoint(model, block, present, age_ma, at_row, relative_to),
  );
}

function driftPoint(
  model: Model,
  block: string,
  present: Vector3,
  age_ma: number,
  at_row: boolean,
  relative_to: string,
): DriftPoint {
  const pose = poseAt(model, block, age_ma, relative_to);
  if (pose.status !== 'placed') {
    const nothing = { lat: null, lon: null, speed_mm_yr: null, azimuth_deg: null, ellipse_95: null };
    return { age_ma, status: pose.status, at_row, ...nothing };
  }
  const position = rotate(pose.quaternion, present);
  const turning = poseVelocity(pose, { block, relative_to, age_ma, oldest_ma: model.oldest_ma });
  const velocity = turning.status === 'placed' ? velocityAt(position, turning.omega) : null;
  return {
    age_ma,
    status: 'placed',
    at_row,
    ...toLatLon(position),
    speed_mm_yr: velocity?.speed_mm_yr ?? null,
    azimuth_deg: velocity?.azimuth_deg ?? null,
    ellipse_95: pointEllipse(pose, poseUncertainty(model, pose), present),
  };
}
