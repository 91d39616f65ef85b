/** Reads one outline: a polygon or several, each ring checked, its inside settled, exchanged axes asked about. */
import type { Geometry, MultiPolygon, Polygon, Position } from 'geojson';
import { readRing, ringArea } from '../../../kernel/sphere';
import type { Asking } from './ask';
import type { LocatedFeature } from './geojson-text';
import type { PropertyReader } from './properties';
import { crossingFault, polygonFault, ringFault, type RingFault } from './rings';
import { findCrossing } from './crossings';

export interface OutlineReading {
  readonly geometry: Polygon | MultiPolygon;
  readonly inside: 'smaller' | 'larger';
}

const SPHERE = 4 * Math.PI;
const SMALLER = 'the smaller side';
const LARGER = 'the larger side';

export function readOutline(
  feature: LocatedFeature,
  inside: 'smaller' | 'larger' | null,
  reader: PropertyReader,
  asking: Asking,
  swapped: boolean,
): OutlineReading | null {
  const { geometry } = feature;
  if (geometry?.type !== 'Polygon' && geometry?.type !== 'MultiPolygon') {
    const hint = 'An outline is a Polygon or a MultiPolygon; lines and points belong in features.geojson.';
    reader.reject(feature, 'geometry', 'not an area', hint, geometry?.type ?? 'null');
    return null;
  }
  const read = swapped ? exchange(geometry) : geometry;
  const polygons: unknown[] = read.type === 'Polygon' ? [read.coordinates] : read.coordinates;
  for (const polygon of polygons) {
    for (const ring of Array.isArray(polygon) ? (polygon as unknown[]) : [polygon]) {
      const fault = ringFault(ring);
      if (fault) {
        reader.reject(feature, 'geometry', fault.problem, fault.hint, fault.read);
        return null;
      }
    }
  }
  const settled = inside ?? askInside(feature, read, asking);
  const fault = partsFault(polygons as Position[][][], settled);
  if (fault) {
    reader.reject(feature, 'geometry', fault.problem, fault.hint, fault.read);
    return null;
  }
  if (polygons.length === 0) {
    reader.reject(
      feature,
      'geometry',
      'no rings',
      'Give the outline at least one ring, or set the geometry to null.',
      read.type,
    );
    return null;
  }
  return { geometry: read, inside: settled };
}

/** What is wrong between the rings of an outline and between its parts, each without fault by itself. */
export function partsFault(
  polygons: readonly Position[][][],
  inside: 'smaller' | 'larger',
): RingFault | null {
  if (inside === 'larger' && polygons.length > 1) {
    return {
      read: `${polygons.length} parts`,
      problem: 'the larger side of several parts is the whole globe',
      hint: 'Give one outer ring with inside larger, or write the rest of the globe as parts of inside smaller.',
    };
  }
  const own = polygons.map((rings) => polygonFault(rings, inside)).find((fault) => fault !== null);
  if (own) return own;
  const rings = polygons.flat();
  const crossing = polygons.length > 1 ? findCrossing(rings) : null;
  return crossing && crossingFault(rings, crossing);
}

/**
 * By ring direction alone a clockwise outer ring holds the rest of the globe (RFC 7946, 3.1.6, asks for
 * anticlockwise). The project reads the smaller side unless told otherwise, so the file is asked which it means.
 */
function askInside(
  feature: LocatedFeature,
  geometry: Polygon | MultiPolygon,
  asking: Asking,
): 'smaller' | 'larger' {
  const outers =
    geometry.type === 'Polygon' ? [geometry.coordinates[0]] : geometry.coordinates.map((p) => p[0]);
  const reversed = outers.map((ring) => ringArea(readRing(ring ?? []))).find((signed) => signed < 0);
  if (reversed === undefined) return 'smaller';
  const percent = (100 * (1 + reversed / SPHERE)).toFixed(1);
  const code = String(feature.properties['code'] ?? `entry ${feature.index + 1}`);
  const ask =
    'Rings run clockwise, so that by their direction they cover most of the globe. Which side of them is the block?';
  const answer = asking.ask(
    'ring_winding',
    ask,
    [SMALLER, LARGER],
    `line ${feature.line}: ${code}, ${percent} % of the globe`,
  );
  return answer === LARGER ? 'larger' : 'smaller';
}

function exchange<T extends Polygon | MultiPolygon>(geometry: T): T {
  const turn = (ring: Position[]): Position[] => ring.map(([x, y, ...more]) => [y!, x!, ...more]);
  const coordinates =
    geometry.type === 'Polygon'
      ? geometry.coordinates.map(turn)
      : geometry.coordinates.map((p) => p.map(turn));
  return { ...geometry, coordinates };
}

function positions(geometry: Geometry | null): Position[] {
  if (!geometry || geometry.type === 'GeometryCollection') return [];
  const walk = (node: unknown): Position[] => {
    if (!Array.isArray(node)) return [];
    return typeof node[0] === 'number' ? [node as Position] : node.flatMap(walk);
  };
  return walk(geometry.coordinates);
}

export const outlineFaults = {
  beyond180: (feature: LocatedFeature): boolean =>
    positions(feature.geometry).some((p) => Math.abs(p[0]!) > 180),

  /** Asks where positions have latitudes beyond 90° and every position would be valid the other way round. */
  swapped(features: readonly LocatedFeature[], asking: Asking): boolean {
    const all = features.flatMap((f) => positions(f.geometry).map((p) => ({ line: f.line, p })));
    const beyond = all.filter(({ p }) => Math.abs(p[1]!) > 90);
    if (beyond.length < 2 || !all.every(({ p }) => Math.abs(p[0]!) <= 90 && Math.abs(p[1]!) <= 360))
      return false;
    const ask =
      'Latitudes go beyond 90°, and all positions would be valid the other way round. Are latitude and longitude exchanged?';
    let answer: string | null = null;
    for (const { line, p } of beyond.slice(0, 5)) {
      answer = asking.ask(
        'swapped_lat_lon',
        ask,
        ['exchange them', 'keep them'],
        `line ${line}: [${p[0]}, ${p[1]}]`,
      );
    }
    return answer !== 'keep them';
  },
};
