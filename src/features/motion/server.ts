import type { z } from 'zod';
import { KernelError, requireAge } from '~/kernel/errors';
import { poseAt, type PlacedPose } from '~/kernel/rotations/circuit';
import { requireBlock } from '~/kernel/rotations/model-index';
import { driftPath, type DriftPoint } from '~/kernel/rotations/drift-path';
import { toPole } from '~/kernel/rotations/pole';
import { rotate } from '~/kernel/rotations/quaternion';
import { stageRotation } from '~/kernel/rotations/stage';
import type { Link, Quaternion } from '~/kernel/rotations/types';
import { angularVelocity, velocityAt } from '~/kernel/rotations/velocity';
import { toLatLon, toVector } from '~/kernel/sphere/vector';
import { isUnknown, poseUncertainty } from '~/kernel/uncertainty/pose-uncertainty';
import type {
  DriftPathAnswer,
  MotionsAnswer,
  QuaternionsAnswer,
  RotationAnswer,
  StageAnswer,
  VelocityAnswer,
} from './contract';
import type {
  driftPathQuery,
  Motion,
  quaternionsQuery,
  rotationQuery,
  stageQuery,
  velocityQuery,
} from './queries';
import { uncertaintySentence } from './rules';
import * as tolerant from './scene/tolerant';

type Query<S extends z.ZodType> = z.output<S>;

const NO_POLE = { pole_lat: null, pole_lon: null, angle_deg: null, quaternion: null } as const;

export const motionsOf = ({ state, model }: Pick<Motion, 'state' | 'model'>): MotionsAnswer => ({
  version: state.version,
  revision: state.revision,
  ...model,
});

/** A loop leaves the blocks that it cuts off `not connected`. @throws KernelError `UnknownBlock` of the frame, `NegativeAge` */
export function quaternionsOf(
  { state, model, relative_to }: Motion,
  { age_ma }: Query<typeof quaternionsQuery>,
): QuaternionsAnswer {
  requireBlock(model, relative_to, 'relative_to');
  requireAge('age_ma', age_ma);
  const blocks = model.blocks.map(({ code }) => {
    const { status, quaternion } = tolerant.poseAt(model, code, age_ma, relative_to);
    return { block: code, status, quaternion: quaternion && asTuple(quaternion) };
  });
  return { age_ma, relative_to, version: state.version, blocks };
}

/** The finite rotation with its uncertainty and the rows that made it. @throws KernelError as `poseAt` */
export function rotationOf(
  { state, model, relative_to }: Motion,
  { block, age_ma }: Query<typeof rotationQuery>,
): RotationAnswer {
  const pose = poseAt(model, block, age_ma, relative_to);
  const asked = { block, relative_to, age_ma, version: state.version, status: pose.status };
  if (pose.status !== 'placed')
    return { ...asked, ...NO_POLE, covariance: null, uncertainty: null, chain: pose.links.map(chainLink) };
  const uncertainty = poseUncertainty(model, pose);
  return {
    ...asked,
    ...toPole(pose.quaternion),
    quaternion: asTuple(pose.quaternion),
    covariance: isUnknown(uncertainty) ? null : [...uncertainty.covariance],
    uncertainty: uncertaintySentence(pose, uncertainty),
    chain: pose.links.map(chainLink),
  };
}

function chainLink({
  block,
  relative_to,
  direction,
  older,
  younger,
  fraction,
}: Link): RotationAnswer['chain'][number] {
  const rows = older.id === younger.id ? [younger] : [younger, older];
  const stated = rows.filter(({ implied }) => !implied);
  const sources = [...new Set(stated.flatMap(({ source }) => source ?? []))];
  return {
    block,
    relative_to,
    direction,
    older_ma: older.age_ma,
    younger_ma: younger.age_ma,
    fraction,
    source: sources.length > 0 ? sources.join('; ') : null,
    evidence: [...new Set(stated.map((row) => row.evidence))],
    rotations: stated.map(({ id }) => id),
  };
}

/** Forward in time, from the older to the younger age; of the two ways to write its pole, the one nearer to the block's own. */
export function stageOf({ state, model, relative_to }: Motion, query: Query<typeof stageQuery>): StageAnswer {
  const { block, older_ma, younger_ma, in: frame } = query;
  if (older_ma < younger_ma) {
    throw new KernelError('OutOfRange', {
      quantity: 'older_ma',
      value: older_ma,
      problem: `younger than younger_ma ${younger_ma}`,
    });
  }
  const stage = stageRotation(model, block, older_ma, younger_ma, relative_to, frame);
  const asked = {
    block,
    relative_to,
    older_ma,
    younger_ma,
    in: frame,
    version: state.version,
    status: stage.status,
  };
  if (stage.status !== 'placed') return { ...asked, ...NO_POLE };
  return {
    ...asked,
    ...toPole(stage.quaternion, poleOf(stage.older)),
    quaternion: asTuple(stage.quaternion),
  };
}

const poleOf = ({ quaternion }: PlacedPose) => toPole(quaternion);

/** The most steps of one path. */
const MOST_STEPS = 5_000;

export function driftPathOf(motion: Motion, query: Query<typeof driftPathQuery>): DriftPathAnswer {
  const { state, model, relative_to } = motion;
  const { block, lat, lon, older_ma, younger_ma, step_ma } = query;
  if ((older_ma - younger_ma) / step_ma > MOST_STEPS) {
    throw new KernelError('OutOfRange', {
      quantity: 'step_ma',
      value: step_ma,
      problem: `more than ${MOST_STEPS} steps`,
    });
  }
  const points = driftPath(model, { block, lat, lon, older_ma, younger_ma, step_ma, relative_to });
  return { block, relative_to, version: state.version, points: points.map(driftPoint) };
}

const driftPoint = ({ ellipse_95, ...point }: DriftPoint): DriftPathAnswer['points'][number] => ({
  ...point,
  ellipse_95: ellipse_95 && {
    semi_major_km: ellipse_95.semi_major_km,
    semi_minor_km: ellipse_95.semi_minor_km,
    azimuth_deg: ellipse_95.azimuth_deg,
    at_least: ellipse_95.at_least,
  },
});

/** The velocity of a point of a block, given by its present position, at an age. */
export function velocityOf(
  { state, model, relative_to }: Motion,
  query: Query<typeof velocityQuery>,
): VelocityAnswer {
  const { block, lat, lon, age_ma, window_myr } = query;
  const pose = poseAt(model, block, age_ma, relative_to);
  const turning = angularVelocity(model, block, age_ma, relative_to, { window_myr });
  const asked = { block, relative_to, age_ma, version: state.version, status: turning.status, window_myr };
  const position = pose.status === 'placed' ? rotate(pose.quaternion, toVector(lat, lon)) : null;
  const place = position ? toLatLon(position) : { lat: null, lon: null };
  if (turning.status !== 'placed' || !position) {
    const nothing = {
      east_mm_yr: null,
      north_mm_yr: null,
      speed_mm_yr: null,
      azimuth_deg: null,
      older_ma: null,
      younger_ma: null,
    };
    return { ...asked, ...place, ...nothing, clipped: false };
  }
  const { older_ma, younger_ma, clipped } = turning;
  return { ...asked, ...place, ...velocityAt(position, turning.omega), older_ma, younger_ma, clipped };
}

const asTuple = ([w, x, y, z]: Quaternion): [number, number, number, number] => [w, x, y, z];
