import { KernelError, requireFinite } from '../errors';
import { EARTH_RADIUS_KM } from '../sphere/angles';
import { azimuthOf } from '../sphere/azimuth';
import { eastNorth } from '../sphere/tangent';
import { add, cross, dot, scale } from '../sphere/vector';
import { type PlacedPose, poseAt } from './circuit';
import { rotate } from './quaternion';
import type { Link, Model, Status, Vector3 } from './types';
import { windowedVelocity } from './velocity-window';

/** Worst error of a speed, mm/yr, for rates up to 10°/Myr. */
export const SPEED_ERROR_MM_YR = 2e-12;
/** Slower than this, mm/yr, a motion has no azimuth. */
export const STILL_MM_YR = 1e-9;

export type AngularVelocity =
  | {
      readonly status: 'placed';
      /** rad/Myr, forward in time, in the reference's coordinates. */
      readonly omega: Vector3;
      /** Ages between which it holds (or over which the window took it). */
      readonly older_ma: number;
      readonly younger_ma: number;
      /** True where the window reached past the sequence and was cut. */
      readonly clipped: boolean;
    }
  | { readonly status: Exclude<Status, 'placed'>; readonly at: string };

/**
 * Angular velocity of a block as seen from relative_to: Ω(B|F) = Ω(A|F) + R(A|F) Ω(B|A), each link's own
 * stage (at a row's age the younger one, at 0 the first). With `window_myr` above 0: from the stage rotation
 * over the window centred on the age, cut to the sequence and to hand-over jumps, and divided by the length left.
 * @throws {KernelError} as {@link poseAt}; `OutOfRange` for a window below 0.
 */
export function angularVelocity(
  model: Model,
  block: string,
  age_ma: number,
  relative_to: string,
  { window_myr = 0 }: { window_myr?: number } = {},
): AngularVelocity {
  if (requireFinite('window_myr', window_myr) < 0) {
    throw new KernelError('OutOfRange', {
      quantity: 'window_myr',
      value: window_myr,
      problem: 'a window is never shorter than 0 Myr',
    });
  }
  const pose = poseAt(model, block, age_ma, relative_to);
  if (pose.status !== 'placed') return { status: pose.status, at: pose.at };
  return window_myr > 0
    ? windowedVelocity(model, block, age_ma, relative_to, window_myr)
    : poseVelocity(pose, { block, relative_to, age_ma, oldest_ma: model.oldest_ma });
}

interface Asked {
  readonly block: string;
  readonly relative_to: string;
  readonly age_ma: number;
  readonly oldest_ma: number;
}

/**
 * As {@link angularVelocity} without a window, for a pose already at hand. A block as seen from itself stands
 * still from oldest_ma to 0; one that only lies where it lies at 0 Ma, without rotations, has no velocity.
 */
export function poseVelocity(
  { links }: PlacedPose,
  { block, relative_to, age_ma, oldest_ma }: Asked,
): AngularVelocity {
  let omega: Vector3 = [0, 0, 0];
  let older_ma = Infinity;
  let younger_ma = 0;
  let reached = block;
  for (const link of links) {
    const [from, to] =
      link.direction === 'up' ? [link.block, link.relative_to] : [link.relative_to, link.block];
    const turning = linkVelocity(link);
    if (from !== reached || !link.stage || !turning) return { status: 'outside rotations', at: link.block };
    reached = to;
    omega = add(turning, rotate(link.quaternion, omega));
    if (!link.extrapolated) older_ma = Math.min(older_ma, link.stage.older_ma);
    younger_ma = Math.max(younger_ma, link.stage.younger_ma);
  }
  if (reached !== relative_to) return { status: 'outside rotations', at: reached };
  if (older_ma === Infinity) older_ma = Math.max(age_ma, oldest_ma);
  return { status: 'placed', omega, older_ma, younger_ma, clipped: false };
}

/** Of a link as it enters the product; that of an inverse is Ω(A|B) = −R(B|A)⁻¹ Ω(B|A). */
function linkVelocity({ stage, direction, quaternion }: Link): Vector3 | null {
  if (!stage) return null;
  const forward = scale(stage.axis, -stage.rate);
  return direction === 'up' ? forward : scale(rotate(quaternion, forward), -1);
}

export interface Velocity {
  readonly east_mm_yr: number;
  readonly north_mm_yr: number;
  readonly speed_mm_yr: number;
  /** Clockwise from north; null where nothing moves. */
  readonly azimuth_deg: number | null;
}

/**
 * v = Ω × x at a position in the reference's coordinates at that age; mm/yr is km/Myr. At a pole see
 * `eastNorth`.
 */
export function velocityAt(position: Vector3, omega: Vector3): Velocity {
  const { east, north } = eastNorth(position);
  const v = scale(cross(omega, position), EARTH_RADIUS_KM);
  const east_mm_yr = dot(v, east);
  const north_mm_yr = dot(v, north);
  const speed_mm_yr = Math.hypot(east_mm_yr, north_mm_yr);
  return {
    east_mm_yr,
    north_mm_yr,
    speed_mm_yr,
    azimuth_deg: speed_mm_yr > STILL_MM_YR ? azimuthOf(east_mm_yr, north_mm_yr) : null,
  };
}
