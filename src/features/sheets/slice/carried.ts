/** Everything of a subject that has a place at an age, carried there: the same for maps and for GeoJSON. */
import type { MultiLineString, MultiPolygon, Polygon } from 'geojson';
import { holdsAt, poseAt, rotate } from '../../../kernel/rotations';
import type { Evidence, Pose, Status } from '../../../kernel/rotations/types';
import { areaKm2, boundingCap, centroid, toLatLon } from '../../../kernel/sphere';
import { carryLines, carryPolygons, lineVectors, polygonVectors } from './shapes';
import type { SliceSubject } from './subject';

export interface CarriedBlock {
  readonly code: string;
  readonly name: string;
  readonly evidence: Evidence;
  readonly area: MultiPolygon;
  readonly area_km2: number;
  /** Where the name stands: the middle of the cap that holds the largest part. */
  readonly label: { readonly lat: number; readonly lon: number };
}

export interface Carried {
  readonly blocks: readonly CarriedBlock[];
  readonly coasts: readonly MultiLineString[];
  /** Blocks with an outline that have no place at this age, and why. */
  readonly missing: readonly { readonly name: string; readonly status: Status }[];
  /** Names under which the rows, outlines and lines used are cited, in alphabetical order. */
  readonly sources: readonly string[];
}

export function carry(subject: SliceSubject, age_ma: number, relative_to: string): Carried {
  const blocks: CarriedBlock[] = [];
  const coasts: MultiLineString[] = [];
  const missing: { name: string; status: Status }[] = [];
  const sources = new Set<string>();
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
    const sided = outlines.flatMap((o) =>
      polygonVectors(subject.geometryOf(o.sha256) as Polygon | MultiPolygon, o.inside).map((polygon) => ({
        polygon,
        inside: o.inside,
      })),
    );
    const polygons = sided.map(({ polygon }) => polygon);
    const sizes = sided.map(({ polygon, inside }) => areaKm2(polygon, inside));
    const largest = sided[sizes.indexOf(Math.max(...sizes))]!;
    const area = carryPolygons(polygons, pose.quaternion);
    const middle =
      largest.inside === 'larger'
        ? centroid(largest.polygon, 'larger')
        : boundingCap(largest.polygon[0]!).centre;
    const label = toLatLon(rotate(pose.quaternion, middle));
    blocks.push({
      code: block.code,
      name: block.name,
      evidence: block.evidence,
      area,
      area_km2: sizes.reduce((a, b) => a + b, 0),
      label,
    });
    cite(sources, pose, block.source);
  }
  for (const line of subject.coasts) {
    const pose = poses.get(line.block);
    if (pose?.status !== 'placed' || !holdsAt(line.appears_ma, line.disappears_ma, age_ma)) continue;
    const lines = lineVectors(subject.geometryOf(line.sha256));
    if (lines.length === 0) continue;
    coasts.push(carryLines(lines, pose.quaternion));
    if (line.source) sources.add(line.source);
  }
  return { blocks, coasts, missing, sources: [...sources].sort((a, b) => a.localeCompare(b, 'en')) };
}

function cite(
  sources: Set<string>,
  pose: Extract<Pose, { status: 'placed' }>,
  outlineSource: string | null,
): void {
  if (outlineSource) sources.add(outlineSource);
  for (const link of pose.links) {
    for (const row of [link.younger, link.older]) if (row.source && !row.implied) sources.add(row.source);
  }
}
