/** Everything of a subject that has a place at an age, carried there: the same for maps and for GeoJSON. */
import type { MultiLineString, MultiPolygon, Polygon } from 'geojson';
import { holdsAt, rotate } from '../../../kernel/rotations';
import type { Evidence, Pose, Status } from '../../../kernel/rotations/types';
import { toLatLon } from '../../../kernel/sphere';
import { poseAt } from '../../motion/scene/tolerant';
import { measured } from './measured';
import { carryLines, carryPolygons, lineVectors, polygonVectors } from './shapes';
import { inOrder, motionSources, poseSources } from './sources';
import type { SliceSubject } from './subject';

export interface CarriedBlock {
  readonly code: string;
  readonly name: string;
  readonly evidence: Evidence;
  readonly area: MultiPolygon;
  readonly area_km2: number;
  /** Where the name stands: the middle of the cap that holds the largest part. */
  readonly label: { readonly lat: number; readonly lon: number };
  /** Of the block, its outlines and the rows that place it. */
  readonly sources: readonly string[];
  /** Of the rows by which it moves. */
  readonly motion_sources: readonly string[];
}

export interface CarriedCoast {
  readonly line: MultiLineString;
  readonly sources: readonly string[];
}

export interface Carried {
  readonly blocks: readonly CarriedBlock[];
  readonly coasts: readonly CarriedCoast[];
  /** Blocks with an outline that have no place at this age, and why. */
  readonly missing: readonly { readonly name: string; readonly status: Status }[];
}

export function carry(subject: SliceSubject, age_ma: number, relative_to: string): Carried {
  const blocks: CarriedBlock[] = [];
  const coasts: CarriedCoast[] = [];
  const missing: { name: string; status: Status }[] = [];
  const poses = new Map<string, Pose>();
  for (const block of subject.blocks) {
    const outlines = block.outlines.filter((o) => holdsAt(o.outline_older_ma, o.outline_younger_ma, age_ma));
    const pose = poseAt(subject.model, block.code, age_ma, relative_to);
    poses.set(block.code, pose);
    if (block.outlines.length === 0) continue;
    if (pose.status !== 'placed') {
      missing.push({ name: block.name, status: pose.status });
      continue;
    }
    if (outlines.length === 0) continue;
    const parts = outlines.map(({ sha256, inside }) => {
      const geometry = subject.geometryOf(sha256) as Polygon | MultiPolygon;
      const polygons = polygonVectors(geometry, inside);
      return { polygons, ...measured(geometry, polygons, inside) };
    });
    const { middle } = parts.reduce((most, part) => (part.largest_km2 > most.largest_km2 ? part : most));
    const area = carryPolygons(
      parts.flatMap(({ polygons }) => polygons),
      pose.quaternion,
    );
    const label = toLatLon(rotate(pose.quaternion, middle));
    blocks.push({
      code: block.code,
      name: block.name,
      evidence: block.evidence,
      area,
      area_km2: parts.reduce((sum, part) => sum + part.area_km2, 0),
      label,
      sources: inOrder([block.source, ...outlines.map((o) => o.source), ...poseSources(pose)]),
      motion_sources: inOrder(motionSources(subject.model, pose)),
    });
  }
  for (const line of subject.coasts) {
    const pose = poses.get(line.block);
    if (pose?.status !== 'placed' || !holdsAt(line.appears_ma, line.disappears_ma, age_ma)) continue;
    const lines = lineVectors(subject.geometryOf(line.sha256));
    if (lines.length === 0) continue;
    coasts.push({
      line: carryLines(lines, pose.quaternion),
      sources: inOrder([line.source, ...poseSources(pose)]),
    });
  }
  return { blocks, coasts, missing };
}
