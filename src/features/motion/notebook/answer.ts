/** Where the selected point is at an age, how surely, and through which rotations. */
import { toPole } from '../../../kernel/rotations';
import { poseAt } from '../scene/tolerant';
import { distanceKm, toLatLon, toVector } from '../../../kernel/sphere';
import { rotate } from '../../../kernel/rotations/quaternion';
import { pointEllipse, poseUncertainty, shares, type Ellipse } from '../../../kernel/uncertainty';
import type { Evidence, Link, Model, Pose, Quaternion, Vector3 } from '../../../kernel/rotations/types';
import { shortAge } from '../format';
import { oldestPlaced } from '../log/columns';
import type { NamedPoint } from '../scene/points';

export interface LinkRow {
  readonly block: string;
  readonly relative_to: string;
  readonly lat: number;
  readonly lon: number;
  readonly angle: number;
  readonly younger: number;
  readonly older: number;
  /** Of the way from the younger to the older row. */
  readonly fraction: number;
  readonly sources: readonly string[];
  readonly evidence: Evidence;
  /** Share of the variance of the position, 0 to 1. */
  readonly share: number;
  readonly withoutCovariance: boolean;
  /** Where the point would be had the block stayed where it is today as seen from its reference, and how far off that is. */
  readonly withoutIt: { readonly lat: number; readonly lon: number; readonly km: number };
}

export type Answer =
  | {
      readonly placed: true;
      readonly lat: number;
      readonly lon: number;
      readonly quaternion: Quaternion;
      readonly ellipse: Ellipse | null;
      readonly rows: readonly LinkRow[];
    }
  | { readonly placed: false; readonly why: string };

export function answerAt(
  model: Model,
  point: NamedPoint,
  age: number,
  heldStill: string,
  nameOf: (code: string) => string,
): Answer {
  const pose = poseAt(model, point.block, age, heldStill);
  if (pose.status !== 'placed')
    return { placed: false, why: whyNot(model, point, age, heldStill, pose, nameOf) };
  const present = toVector(point.lat, point.lon);
  const uncertainty = poseUncertainty(model, pose);
  const parts = shares(pose, uncertainty, present);
  const there = rotate(pose.quaternion, present);
  const { lat, lon } = toLatLon(there);
  const without = new Set(uncertainty.without.map(({ id }) => id));
  return {
    placed: true,
    lat,
    lon,
    quaternion: pose.quaternion,
    ellipse: pointEllipse(pose, uncertainty, present),
    rows: pose.links.map((link, i) => ({
      ...rowOf(link, parts.links[i] ?? 0, without),
      withoutIt: withoutLink(pose.links, i, present, there),
    })),
  };
}

function withoutLink(
  links: readonly Link[],
  left: number,
  present: Vector3,
  there: Vector3,
): LinkRow['withoutIt'] {
  const place = links.reduce((at, link, i) => (i === left ? at : rotate(link.quaternion, at)), present);
  return { ...toLatLon(place), km: distanceKm(place, there) };
}

/** A link passed downwards is its inverse: the reference as seen from the block. */
function rowOf(
  { block, relative_to, direction, quaternion, younger, older, fraction }: Link,
  share: number,
  without: ReadonlySet<string>,
): Omit<LinkRow, 'withoutIt'> {
  const { pole_lat: lat, pole_lon: lon, angle_deg: angle } = toPole(quaternion);
  const north =
    lat < -1e-9 ? { lat: -lat, lon: lon > 0 ? lon - 180 : lon + 180, angle: -angle } : { lat, lon, angle };
  const [from, to] = direction === 'up' ? [block, relative_to] : [relative_to, block];
  const sources = [...new Set([younger.source, older.source].filter((source) => source !== null))];
  return {
    ...{ block: from, relative_to: to, ...north, sources, share },
    younger: younger.age_ma,
    older: older.age_ma,
    fraction,
    evidence: older.evidence,
    withoutCovariance: without.has(younger.id) || without.has(older.id),
  };
}

function whyNot(
  model: Model,
  point: NamedPoint,
  age: number,
  heldStill: string,
  pose: Extract<Pose, { quaternion: null }>,
  nameOf: (code: string) => string,
): string {
  const name = nameOf(point.block);
  const at = nameOf(pose.at);
  switch (pose.status) {
    case 'older than block':
      return `${name} did not exist yet.`;
    case 'younger than block':
      return `${name} no longer existed.`;
    case 'not connected':
      return `Not computed. ${at} has no circuit to ${nameOf(heldStill)} at this age.`;
    default: {
      const oldest = oldestPlaced(model, point.block, heldStill);
      return oldest !== null && age > oldest
        ? `${name} has no place older than ${shortAge(oldest)} Ma: the rotations of ${at} end there.`
        : `Not computed. ${at} has no rotations at this age.`;
    }
  }
}
