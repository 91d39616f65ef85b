import { geoEquirectangular } from 'd3-geo';
import { geoProject } from 'd3-geo-projection';
import type { Geometry, Position } from 'geojson';
import {
  angularDistance,
  distanceToArc,
  EARTH_RADIUS_KM,
  interpolateArc,
  normalizeLongitude,
  toLatLon,
  toRadians,
  toVector,
} from '../../kernel/sphere';

/** Points are added along an edge until it strays no further than this from its great circle. */
const STRAY_KM = 0.5;
/** An edge over a pole has no straight line to follow: its pieces end at 20,000 km/2²⁰. */
const MOST_HALVINGS = 20;
const DEGREES = 180 / Math.PI;
/** Written digits: 0.1 m. */
const round = (value: number): number => Math.round(value * 1e6) / 1e6 + 0;

/**
 * The plane whose coordinates are degrees, cut at the antimeridian and closed round poles. Its y runs down, as on a
 * screen: outer rings and holes are told apart by their direction there, so it is turned over afterwards.
 */
const plane = geoEquirectangular().scale(DEGREES).translate([0, 0]).precision(0);

const vector = ([lon = 0, lat = 0]: Position) => toVector(lat, lon);

/**
 * Positions between two, so that straight lines in longitude and latitude follow the great circle. (The points that
 * d3-geo adds by itself do not where an edge crosses the equator evenly, or passes close to a pole.)
 */
function between(from: Position, to: Position, halvings = MOST_HALVINGS): Position[] {
  const [lon = 0, lat = 0] = from;
  const east = normalizeLongitude((to[0] ?? 0) - lon);
  const north = (to[1] ?? 0) - lat;
  const [turn, rise] = [toRadians(Math.abs(east)), toRadians(Math.abs(north))];
  // The two part by length × turn / 4 at most, for short edges.
  if (halvings === 0 || (turn * (turn + rise) * EARTH_RADIUS_KM) / 4 < STRAY_KM / 4) return [];
  const [a, b] = [vector(from), vector(to)];
  const angle = angularDistance(a, b);
  // Between antipodes there is no one great circle.
  if (angle > Math.PI - 1e-9) return [];
  const strays = (share: number): boolean =>
    distanceToArc(vector([lon + share * east, lat + share * north]), a, b) * EARTH_RADIUS_KM > STRAY_KM;
  if (angle < 0.5 && ![0.25, 0.5, 0.75].some(strays)) return [];
  const { lat: middleLat, lon: middleLon } = toLatLon(interpolateArc(a, b, 0.5));
  const middle = [middleLon, middleLat];
  return [...between(from, middle, halvings - 1), middle, ...between(middle, to, halvings - 1)];
}

const followed = (line: readonly Position[]): Position[] =>
  line.flatMap((position, i) => {
    const next = line[i + 1];
    return next ? [position, ...between(position, next)] : [position];
  });

function eachLine(node: unknown): unknown {
  if (!Array.isArray(node)) return node;
  const first: unknown = node[0];
  return Array.isArray(first) && typeof first[0] === 'number'
    ? followed(node as Position[])
    : node.map(eachLine);
}

const withPoints = (geometry: Geometry): Geometry =>
  geometry.type === 'GeometryCollection' || geometry.type === 'Point' || geometry.type === 'MultiPoint'
    ? geometry
    : ({ ...geometry, coordinates: eachLine(geometry.coordinates) } as Geometry);

const upright = ([x = 0, y = 0]: Position): Position => [round(x), round(-y)];

function turnedOver(node: unknown): unknown {
  if (!Array.isArray(node)) return node;
  return typeof node[0] === 'number' ? upright(node as Position) : node.map(turnedOver);
}

/**
 * Geometry on the sphere (great-circle edges, polygons clockwise round their inside, as d3-geo reads them) to
 * RFC 7946: cut at the antimeridian, points added so that straight edges in longitude and latitude follow the
 * great circles, outer rings anticlockwise. Null for what is empty.
 */
export function flatten(geometry: Geometry): Geometry | null {
  const projected = geoProject<Geometry>(withPoints(geometry), plane);
  if (!projected || projected.type === 'GeometryCollection') return projected;
  const flat = { ...projected, coordinates: turnedOver(projected.coordinates) } as typeof projected;
  if (flat.type === 'Polygon') return { ...flat, coordinates: flat.coordinates.map(wound) };
  if (flat.type === 'MultiPolygon')
    return { ...flat, coordinates: flat.coordinates.map((rings) => rings.map(wound)) };
  return flat;
}

function wound(ring: Position[], index: number): Position[] {
  const twiceArea = ring.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = ring[(i + 1) % ring.length]!;
    return sum + x! * nextY! - nextX! * y!;
  }, 0);
  return twiceArea > 0 === (index === 0) ? ring : ring.toReversed();
}
