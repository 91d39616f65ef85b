import { KernelError, requireAge, requireFinite } from '../errors';
import { toLatLon, toVector } from '../sphere/vector';
import { type Ellipse, pointEllipse } from '../uncertainty/ellipse';
import { poseUncertainty } from '../uncertainty/pose-uncertainty';
import { poseAt } from './circuit';
import { rotate } from './quaternion';
import { circuitRowAges } from './row-ages';
import type { Model, Status, Vector3 } from './types';
import { poseVelocity, velocityAt } from './velocity';

export interface DriftRequest {
  readonly block: string;
  /** Present position of the point, degrees. */
  readonly lat: number;
  readonly lon: number;
  readonly older_ma: number;
  readonly younger_ma: number;
  /** Ages are asked at every step from younger_ma; above 0. */
  readonly step_ma: number;
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

/** A path may not have more ages than this. */
export const MOST_AGES = 100_000;
/** Ages nearer than this, Myr, are one. */
const SAME_AGE_MYR = 1e-9;

/**
 * Positions of a point of a block as seen from relative_to, youngest first: at both ends of the span, every
 * step from the younger one, and every row's age of the circuit within.
 * @throws {KernelError} `UnknownBlock`, `NegativeAge`, `NonFinite`, `OutOfRange` (ages in the wrong order,
 * step, latitude), `CircuitCycle`.
 */
export function driftPath(model: Model, request: DriftRequest): DriftPoint[] {
  const { block, older_ma, younger_ma, step_ma, relative_to } = request;
  check(request);
  const rows = circuitRowAges(model, block, older_ma, younger_ma, relative_to);
  const present = toVector(request.lat, request.lon);
  return mergeAges(steps(older_ma, younger_ma, step_ma), rows).map(({ age_ma, at_row }) =>
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

function check({ lat, lon, older_ma, younger_ma, step_ma }: DriftRequest): void {
  requireAge('older_ma', older_ma);
  requireAge('younger_ma', younger_ma);
  requireFinite('step_ma', step_ma);
  requireFinite('lon', lon);
  const outOfRange = (quantity: string, value: number, problem: string): never => {
    throw new KernelError('OutOfRange', { quantity, value, problem });
  };
  if (!(Math.abs(requireFinite('lat', lat)) <= 90))
    outOfRange('lat', lat, 'a latitude lies between −90 and 90');
  if (older_ma < younger_ma) outOfRange('older_ma', older_ma, `younger than younger_ma ${younger_ma}`);
  if (!(step_ma > 0)) outOfRange('step_ma', step_ma, 'a step is above 0');
  if ((older_ma - younger_ma) / step_ma > MOST_AGES)
    outOfRange('step_ma', step_ma, `more than ${MOST_AGES} ages`);
}

function steps(older_ma: number, younger_ma: number, step_ma: number): number[] {
  const count = Math.ceil((older_ma - younger_ma) / step_ma - SAME_AGE_MYR);
  const ages = Array.from(
    { length: Math.max(0, count) },
    (_, k) => Math.round((younger_ma + k * step_ma) * 1e9) / 1e9,
  );
  return [...ages, older_ma];
}

function mergeAges(asked: readonly number[], rows: readonly number[]): { age_ma: number; at_row: boolean }[] {
  const all = [
    ...rows.map((age_ma) => ({ age_ma, at_row: true })),
    ...asked.map((age_ma) => ({ age_ma, at_row: false })),
  ];
  const merged: { age_ma: number; at_row: boolean }[] = [];
  for (const next of all.sort((a, b) => a.age_ma - b.age_ma || Number(b.at_row) - Number(a.at_row))) {
    const last = merged.at(-1);
    if (!last || next.age_ma - last.age_ma > SAME_AGE_MYR) merged.push(next);
    else if (next.at_row && !last.at_row) merged[merged.length - 1] = next;
  }
  return merged;
}
