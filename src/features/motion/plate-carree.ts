import { geoEquirectangular } from 'd3-geo';
import { geoProject } from 'd3-geo-projection';
import type { Geometry, Position } from 'geojson';

/** Tolerance of added points, degrees: 0.7 km. */
const PRECISION_DEG = 0.006;
const DEGREES = 180 / Math.PI;
/** Written digits: 0.1 m. */
const round = (value: number): number => Math.round(value * 1e6) / 1e6 + 0;

/**
 * The plane whose coordinates are degrees, cut at the antimeridian and closed round poles. Its y runs down, as on a
 * screen: outer rings and holes are told apart by their direction there, so it is turned over afterwards.
 */
const plane = geoEquirectangular().scale(DEGREES).translate([0, 0]).precision(PRECISION_DEG);

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
  const projected = geoProject<Geometry>(geometry, plane);
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
