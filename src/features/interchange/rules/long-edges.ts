/**
 * Edges here are great circles; a file's own standard has them straight in longitude and latitude (RFC 7946, 3.1.1).
 * Where the two part visibly, the file may be read the other way: points are added along the straight lines.
 */
import type { Geometry, Position } from 'geojson';
import {
  angularDistance,
  densifyStraight,
  EARTH_RADIUS_KM,
  interpolateArc,
  STRAIGHT_EDGE_STRAY_DEG,
  toRadians,
  toVector,
} from '../../../kernel/sphere';
import type { Asking } from './ask';

export const EDGES = 'edges';
export const GREAT_CIRCLES = 'along great circles';
export const STRAIGHT = 'straight in longitude and latitude';

/** Edges that part by less than this are not worth an offer: a line's width on a map of a continent. */
const WORTH_ASKING_DEG = 0.05;
const LONGEST_EDGE_DEG = 1;
const KM_PER_DEG = toRadians(EARTH_RADIUS_KM);

interface Placed {
  readonly line: number;
  readonly geometry: Geometry;
}

/** Says how far the two readings part, and which one holds. Great circles unless told otherwise. */
export function followsStraightLines(features: readonly Placed[], asking: Asking): boolean {
  const parting = features
    .map(({ line, geometry }) => ({ line, deg: greatestParting(geometry) }))
    .filter(({ deg }) => deg > WORTH_ASKING_DEG);
  if (parting.length === 0) return false;
  const most = parting.reduce((a, b) => (b.deg > a.deg ? b : a));
  const km = Math.round(most.deg * KM_PER_DEG).toLocaleString('en-GB');
  const stray = (STRAIGHT_EDGE_STRAY_DEG * KM_PER_DEG).toFixed(1);
  const ask =
    `Long edges run along great circles; straight in longitude and latitude they would lie up to ${km} km away ` +
    `(line ${most.line}). Straight lines are followed by added points, at most ${LONGEST_EDGE_DEG}° apart and ${stray} km off.`;
  return asking.offer(EDGES, ask, [GREAT_CIRCLES, STRAIGHT]) === STRAIGHT;
}

/** Adds points along every edge; the positions that were there stay as they are. */
export function alongStraightLines<T extends Geometry>(geometry: T): T {
  if (geometry.type === 'GeometryCollection' || geometry.type === 'Point' || geometry.type === 'MultiPoint')
    return geometry;
  return { ...geometry, coordinates: mapLines(geometry.coordinates, dense) };
}

function dense(line: readonly Position[]): Position[] {
  return line.flatMap((position, i) => {
    const next = line[i + 1];
    if (!next) return [position];
    const [, ...between] = densifyStraight([position, next], LONGEST_EDGE_DEG).slice(0, -1);
    return [position, ...between.map((added) => added.map(toMicrodegrees))];
  });
}

/** 0.1 m: added points need no more digits than anyone can read. */
const toMicrodegrees = (deg: number): number => Math.round(deg * 1e6) / 1e6;

function greatestParting(geometry: Geometry): number {
  let most = 0;
  if (geometry.type === 'GeometryCollection') return most;
  mapLines(geometry.coordinates, (line) => {
    line.forEach((a, i) => {
      const b = line[i + 1];
      if (b) most = Math.max(most, parting(a, b));
    });
    return [...line];
  });
  return most;
}

/** Between the middles of the great circle and of the straight line, degrees. */
function parting(a: Position, b: Position): number {
  const [from, to] = [place(a), place(b)];
  const length = angularDistance(from, to);
  if (length > Math.PI - 1e-6 || span(a, b) === 0) return 0;
  const [, middle] = densifyStraight([a, b], span(a, b) / 2);
  return middle ? (angularDistance(interpolateArc(from, to, 0.5), place(middle)) * 180) / Math.PI : 0;
}

const place = ([lon = 0, lat = 0]: readonly number[]) => toVector(lat, lon);
const span = (a: Position, b: Position): number => {
  const east = Math.abs(a[0]! - b[0]!) % 360;
  return Math.max(Math.min(east, 360 - east), Math.abs(a[1]! - b[1]!));
};

function mapLines(node: unknown, change: (line: readonly Position[]) => Position[]): unknown {
  if (!Array.isArray(node) || typeof node[0] === 'number') return node;
  const first: unknown = node[0];
  if (Array.isArray(first) && typeof first[0] === 'number') return change(node as Position[]);
  return node.map((part) => mapLines(part, change));
}
