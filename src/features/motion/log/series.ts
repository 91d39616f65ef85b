/** Curves of the strips, computed once for a model, a point and a frame; moving the age line only reads them. */
import { rotate, velocityAt } from '../../../kernel/rotations';
import { toLatLon, toVector } from '../../../kernel/sphere';
import { latitudeBand, poseUncertainty } from '../../../kernel/uncertainty';
import { angularVelocity, circuitRowAges, poseAt } from '../scene/tolerant';
import type { Model } from '../../../kernel/rotations/types';
import type { NamedPoint } from '../scene/points';

export interface LatitudeSample {
  readonly age: number;
  readonly lat: number;
  /** 95 % limits; null where nothing is known of them. */
  readonly lower: number | null;
  readonly upper: number | null;
  /** True where a link carries no covariance. */
  readonly atLeast: boolean;
}

/** Constant on its span of ages. */
export interface SpeedStep {
  readonly younger: number;
  readonly older: number;
  readonly mm_yr: number;
}

/** Myr between the samples that fall on no row. */
const STEP = 1;
/** Just older than a row: where a hand-over changes the position. */
const BEYOND = 1e-6;

const rowAges = (model: Model, block: string, frame: string): number[] =>
  circuitRowAges(model, block, model.oldest_ma, 0, frame);

export function latitudeAt(
  model: Model,
  { block, lat, lon }: NamedPoint,
  frame: string,
  age: number,
): LatitudeSample | null {
  const pose = poseAt(model, block, age, frame);
  if (pose.status !== 'placed') return null;
  const present = toVector(lat, lon);
  const band = latitudeBand(pose, poseUncertainty(model, pose), present);
  return {
    age,
    lat: toLatLon(rotate(pose.quaternion, present)).lat,
    lower: band?.lower ?? null,
    upper: band?.upper ?? null,
    atLeast: band?.at_least ?? true,
  };
}

/** Unbroken runs of samples, youngest first. */
export function latitudeCurve(model: Model, point: NamedPoint, frame: string): LatitudeSample[][] {
  const ages = new Set<number>();
  for (let age = 0; age <= model.oldest_ma; age += STEP) ages.add(age);
  for (const age of rowAges(model, point.block, frame)) ages.add(age).add(age + BEYOND);
  const runs: LatitudeSample[][] = [];
  let run: LatitudeSample[] | null = null;
  for (const age of [...ages].sort((a, b) => a - b)) {
    const sample = latitudeAt(model, point, frame, age);
    if (!sample) run = null;
    else if (run) run.push(sample);
    else runs.push((run = [sample]));
  }
  return runs;
}

export function speedAt(
  model: Model,
  { block, lat, lon }: NamedPoint,
  frame: string,
  age: number,
): number | null {
  const pose = poseAt(model, block, age, frame);
  const turning = angularVelocity(model, block, age, frame);
  if (pose.status !== 'placed' || turning.status !== 'placed') return null;
  return velocityAt(rotate(pose.quaternion, toVector(lat, lon)), turning.omega).speed_mm_yr;
}

/** One step between neighbouring rows of the circuit, its speed that of the middle age. */
export function speedSteps(model: Model, point: NamedPoint, frame: string): SpeedStep[] {
  const ages = rowAges(model, point.block, frame);
  return ages.slice(1).flatMap((older, i) => {
    const younger = ages[i] as number;
    const mm_yr = speedAt(model, point, frame, (younger + older) / 2);
    return mm_yr === null ? [] : [{ younger, older, mm_yr }];
  });
}
