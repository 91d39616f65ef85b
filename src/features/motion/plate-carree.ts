import { geoEquirectangular } from 'd3-geo';
import { geoProject } from 'd3-geo-projection';
import type { Geometry, Position } from 'geojson';

/** Tolerance of added points, degrees: 0.7 km. */
const PRECISION_DEG = 0.006;
const DEGREES = 180 / Math.PI;
/** Written digits: 0.1 m. */
const round = (value: number): number => Math.round(value * 1e6) / 1e6 + 0;

interface Sink {
  point: (x: number, y: number) => void;
}

/** The plane whose coordinates are degrees: a stream that d3-geo cuts at the antimeridian and closes round poles. */
const plane = {
  stream: (sink: Sink) => {
    const projection = geoEquirectangular().scale(DEGREES).translate([0, 0]).precision(PRECISION_DEG);
    const turned = Object.create(sink) as Sink;
    turned.point = (x, y) => sink.point(round(x), round(-y));
    return projection.stream(turned as Parameters<typeof projection.stream>[0]);
  },
};

/**
 * Geometry on the sphere (great-circle edges, polygons clockwise round their inside, as d3-geo reads them) to
 * RFC 7946: cut at the antimeridian, points added so that straight edges in longitude and latitude follow the
 * great circles, outer rings anticlockwise. Null for what is empty.
 */
export function flatten(geometry: Geometry): Geometry | null {
  const flat = geoProject<Geometry>(geometry, plane);
  if (flat?.type === 'Polygon') return { ...flat, coordinates: flat.coordinates.map(wound) };
  if (flat?.type === 'MultiPolygon')
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
