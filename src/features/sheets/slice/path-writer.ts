/**
 * SVG paths of areas on a map. Most outlines lie whole within the map: their vertices are projected one by one and
 * written. Those that cross the seam or the limb, hold a pole or have long edges go through d3-geo, which cuts them and
 * bends their edges; both ways give the same picture ({@link STRAIGHT_EDGE_DEG} bounds the difference).
 */
import { geoPath, type GeoProjection } from 'd3-geo';
import type { MultiPolygon, Position } from 'geojson';
import { PathBytes } from './path-bytes';

/** Edges shorter than this are drawn straight: less than 0.1 pt from their great circle on an A3 map of the globe. */
export const STRAIGHT_EDGE_DEG = 2.5;
const RADIANS = Math.PI / 180;

export function pathWriter(projection: GeoProjection): (area: MultiPolygon) => string {
  const cut = geoPath(projection).digits(2);
  const whole = insideTest(projection);
  const bytes = new PathBytes();
  return (area) =>
    area.coordinates.every((rings) => rings.every(whole))
      ? written(area, projection, bytes)
      : (cut(area) ?? '');
}

/** Whether a ring lies whole within the map, with edges short enough to be straight. */
function insideTest(projection: GeoProjection): (ring: readonly Position[]) => boolean {
  const [lambda, phi] = projection.rotate();
  const reach = projection.clipAngle();
  const [sinCentre, cosCentre] = [Math.sin(-phi * RADIANS), Math.cos(-phi * RADIANS)];
  const least = reach ? Math.cos((reach - STRAIGHT_EDGE_DEG) * RADIANS) : -Infinity;
  const within = (lat: number, turned: number): boolean =>
    sinCentre * Math.sin(lat * RADIANS) + cosCentre * Math.cos(lat * RADIANS) * Math.cos(turned * RADIANS) >=
    least;
  return (ring) => {
    let previous = NaN;
    let before = NaN;
    for (const position of ring) {
      const lat = position[1]!;
      const turned = wrapped(position[0]! + lambda);
      if (Math.abs(lat) > 85 || (reach && !within(lat, turned))) return false;
      const step = Math.abs(turned - previous);
      if (step > 180 || Math.abs(lat - before) > STRAIGHT_EDGE_DEG) return false;
      if (step > STRAIGHT_EDGE_DEG && step * Math.cos(lat * RADIANS) > STRAIGHT_EDGE_DEG) return false;
      previous = turned;
      before = lat;
    }
    return true;
  };
}

/** Into [−180, 180), for what is seldom more than a turn away. */
function wrapped(degrees: number): number {
  let turned = degrees;
  while (turned >= 180) turned -= 360;
  while (turned < -180) turned += 360;
  return turned;
}

const [MOVE, LINE, COMMA, CLOSE] = [77, 76, 44, 90];

function written(area: MultiPolygon, projection: GeoProjection, bytes: PathBytes): string {
  bytes.clear();
  for (const rings of area.coordinates) {
    for (const ring of rings) {
      for (let i = 0; i + 1 < ring.length; i++) {
        const point = projection(ring[i] as [number, number])!;
        bytes.sign(i === 0 ? MOVE : LINE);
        bytes.number(point[0]);
        bytes.sign(COMMA);
        bytes.number(point[1]);
      }
      bytes.sign(CLOSE);
    }
  }
  return bytes.text();
}
