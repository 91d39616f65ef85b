/** A place on a margin between two blocks, and how they move across it. */
import { KernelError } from '../../../kernel/errors';
import { convergencePath, type ConvergencePoint, type ConvergenceRequest } from '../../../kernel/kinematics';
import { rotate } from '../../../kernel/rotations';
import type { Model } from '../../../kernel/rotations/types';
import { toLatLon, toVector } from '../../../kernel/sphere';
import type { NamedPoint } from './points';
import { poseAt } from './tolerant';

export interface Margin {
  /** Right of the margin, looking along its azimuth; the place is in its coordinates. */
  readonly relative_to: string;
  readonly lat: number;
  readonly lon: number;
  readonly azimuth: number;
}

/** Where the point lies at the age, as seen from the other block; its present place where it has none then. */
export function marginAt(model: Model, point: NamedPoint, relative_to: string, age: number): Margin {
  const pose = poseAt(model, point.block, age, relative_to);
  const present = toVector(point.lat, point.lon);
  const { lat, lon } = toLatLon(pose.status === 'placed' ? rotate(pose.quaternion, present) : present);
  const round = (degrees: number): number => Math.round(degrees * 10) / 10;
  return { relative_to, lat: round(lat), lon: round(lon), azimuth: 0 };
}

/** None where the draft's circuit between the two runs in a loop. */
export function acrossMargin(model: Model, request: ConvergenceRequest): ConvergencePoint[] {
  try {
    return convergencePath(model, request);
  } catch (error) {
    if (error instanceof KernelError) return [];
    throw error;
  }
}
