import type { PlacedPose } from '../rotations/circuit';
import { rotate, unrotate } from '../rotations/quaternion';
import type { Covariance, Vector3 } from '../rotations/types';
import { EARTH_RADIUS_KM, toDegrees } from '../sphere/angles';
import { azimuthOf } from '../sphere/azimuth';
import { eastNorth } from '../sphere/tangent';
import { cross, toLatLon } from '../sphere/vector';
import { confidenceRule, type ConfidenceRule } from './confidence';
import { bilinear } from './matrix3';
import { isUnknown, type RotationUncertainty } from './pose-uncertainty';

/** Covariance of a position in its tangent plane, rad². */
export interface TangentCovariance {
  readonly ee: number;
  readonly en: number;
  readonly nn: number;
}

/** 95 % ellipse of a position. */
export interface Ellipse {
  readonly semi_major_km: number;
  readonly semi_minor_km: number;
  /** Of the major axis, clockwise from north, [0, 180); 0 for a circle. */
  readonly azimuth_deg: number;
  readonly at_least: boolean;
  readonly rule: ConfidenceRule;
}

/**
 * The directions of u that move a point east and north: δx = R (u × p), so e·δx = u · (p × Rᵀe). `present` is
 * the point's present position in the block, a unit vector.
 */
function leverArms({ quaternion }: PlacedPose, present: Vector3): { east: Vector3; north: Vector3 } {
  const { east, north } = eastNorth(rotate(quaternion, present));
  return {
    east: cross(present, unrotate(quaternion, east)),
    north: cross(present, unrotate(quaternion, north)),
  };
}

/** What a covariance of the rotation makes of the point's position. */
export function tangentCovariance(
  pose: PlacedPose,
  covariance: Covariance,
  present: Vector3,
): TangentCovariance {
  const { east, north } = leverArms(pose, present);
  return {
    ee: bilinear(east, covariance, east),
    en: bilinear(east, covariance, north),
    nn: bilinear(north, covariance, north),
  };
}

/**
 * 95 % ellipse of where a point of the block was. Null where nothing is known of the uncertainty; zero axes
 * where the pose is exact. First order: meant for axes well below the radius of the Earth.
 */
export function pointEllipse(
  pose: PlacedPose,
  uncertainty: RotationUncertainty,
  present: Vector3,
): Ellipse | null {
  if (isUnknown(uncertainty)) return null;
  const parts = uncertainty.rows.map(({ covariance, dof }) => {
    const { ee, nn } = tangentCovariance(pose, covariance, present);
    return { trace: ee + nn, dof };
  });
  const rule = confidenceRule(2, parts);
  const { ee, en, nn } = tangentCovariance(pose, uncertainty.covariance, present);
  const mean = (ee + nn) / 2;
  const half = Math.hypot((ee - nn) / 2, en);
  const axis = (variance: number): number =>
    EARTH_RADIUS_KM * Math.sqrt(rule.quantile * Math.max(0, variance));
  return {
    semi_major_km: axis(mean + half),
    semi_minor_km: axis(mean - half),
    azimuth_deg: half > 1e-12 * mean ? (azimuthOf(2 * en, nn - ee) / 2) % 180 : 0,
    at_least: uncertainty.at_least,
    rule,
  };
}

/**
 * 95 % interval of a point's latitude alone (one dimension), degrees, kept within ±90. Null as for {@link
 * pointEllipse}.
 */
export function latitudeBand(
  pose: PlacedPose,
  uncertainty: RotationUncertainty,
  present: Vector3,
): { lat: number; lower: number; upper: number; at_least: boolean; rule: ConfidenceRule } | null {
  if (isUnknown(uncertainty)) return null;
  const parts = uncertainty.rows.map(({ covariance, dof }) => ({
    trace: tangentCovariance(pose, covariance, present).nn,
    dof,
  }));
  const rule = confidenceRule(1, parts);
  const { nn } = tangentCovariance(pose, uncertainty.covariance, present);
  const half = toDegrees(Math.sqrt(rule.quantile * Math.max(0, nn)));
  const { lat } = toLatLon(rotate(pose.quaternion, present));
  return {
    lat,
    lower: Math.max(-90, lat - half),
    upper: Math.min(90, lat + half),
    at_least: uncertainty.at_least,
    rule,
  };
}
