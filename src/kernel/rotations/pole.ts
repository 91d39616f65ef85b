import { cosDegrees, normalizeLongitude, sinDegrees, toDegrees } from '../sphere/angles';
import { angularDistance } from '../sphere/distance';
import { toLatLon, toVector } from '../sphere/vector';
import { angleOf, between, log } from './quaternion';
import type { Quaternion } from './types';

/** An Euler pole in degrees; right-hand rule, positive anticlockwise seen from outside above the pole. */
export interface Pole {
  readonly pole_lat: number;
  readonly pole_lon: number;
  readonly angle_deg: number;
}

/**
 * Worst error of a round trip pole → quaternion → pole, measured as the rotation between the two, degrees;
 * near a geographic pole most.
 */
export const POLE_ERROR_DEG = 1.2e-11;
/**
 * A rotation by less than this, degrees, has no pole worth naming: it is given as the identity, pole 90° N.
 */
export const IDENTITY_TOLERANCE_DEG = 1e-13;

/** Unit quaternion of a finite rotation in degrees; any angle is read. Inverse: {@link toPole}. */
export function fromPole(pole_lat: number, pole_lon: number, angle_deg: number): Quaternion {
  const axis = toVector(pole_lat, pole_lon);
  const half = angle_deg / 2;
  const s = sinDegrees(half);
  return [cosDegrees(half), axis[0] * s, axis[1] * s, axis[2] * s];
}

/**
 * Euler pole of a rotation, angle in [0, 180], longitude in (−180, 180]. The identity is (90, 0, 0). With
 * `near`, the form of the same rotation whose pole is nearest to that pole, and whose angle, whole turns
 * added, is nearest to its angle. Inverse: {@link fromPole}.
 */
export function toPole(q: Quaternion, near?: Pole): Pole {
  const angle_deg = toDegrees(angleOf(q));
  if (angle_deg < IDENTITY_TOLERANCE_DEG)
    return near ? { ...near, angle_deg: wholeTurns(near.angle_deg) } : NO_ROTATION;
  const { lat, lon } = toLatLon(log(q));
  const pole = { pole_lat: lat, pole_lon: lon, angle_deg };
  return near ? nearestForm(pole, near) : pole;
}

const NO_ROTATION: Pole = { pole_lat: 90, pole_lon: 0, angle_deg: 0 };
const wholeTurns = (angle_deg: number): number => 360 * Math.round(angle_deg / 360) + 0;

function nearestForm(pole: Pole, near: Pole): Pole {
  const distance = angularDistance(
    toVector(pole.pole_lat, pole.pole_lon),
    toVector(near.pole_lat, near.pole_lon),
  );
  const turned = distance > Math.PI / 2 ? otherPole(pole) : pole;
  return { ...turned, angle_deg: turned.angle_deg + wholeTurns(near.angle_deg - turned.angle_deg) };
}

/** The same rotation about the antipode of its pole; its own inverse. */
export function otherPole({ pole_lat, pole_lon, angle_deg }: Pole): Pole {
  return {
    pole_lat: -pole_lat,
    pole_lon: Math.abs(pole_lat) === 90 ? 0 : normalizeLongitude(pole_lon + 180),
    angle_deg: -angle_deg,
  };
}

/** Whether two rotations differ by no more than an angle in degrees; q and −q are the same rotation. */
export const sameRotation = (a: Quaternion, b: Quaternion, tolerance_deg = 1e-9): boolean =>
  toDegrees(angleOf(between(a, b))) <= tolerance_deg;
