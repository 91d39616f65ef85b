/**
 * SVG paths of areas on a map. Most outlines lie whole within the map: their vertices are projected one by one and
 * written. Those that cross the seam or the limb, hold a pole or have long edges go through d3-geo, which cuts them and
 * bends their edges; both ways give the same picture ({@link STRAIGHT_EDGE_DEG} bounds the difference).
 */
import { geoPath, type GeoProjection } from 'd3-geo';
import type { MultiPolygon, Position } from 'geojson';

/** Edges shorter than this are drawn straight: less than 0.1 pt from their great circle on an A3 map of the globe. */
export const STRAIGHT_EDGE_DEG = 2.5;
const RADIANS = Math.PI / 180;

export function pathWriter(projection: GeoProjection): (area: MultiPolygon) => string {
  const cut = geoPath(projection).digits(2);
  const whole = insideTest(projection);
  return (area) =>
    area.coordinates.every((rings) => rings.every(whole)) ? written(area, projection) : (cut(area) ?? '');
}

/** Whether a ring lies whole within the map, with edges short enough to be straight. */
function insideTest(projection: GeoProjection): (ring: readonly Position[]) => boolean {
  const [lambda, phi] = projection.rotate();
  const reach = projection.clipAngle();
  const [sinCentre, cosCentre] = [Math.sin(-phi * RADIANS), Math.cos(-phi * RADIANS)];
  const least = reach ? Math.cos((reach - STRAIGHT_EDGE_DEG) * RADIANS) : -Infinity;
  return (ring) => {
    let previous = NaN;
    let before = NaN;
    for (const [lon, lat] of ring) {
      const turned = ((((lon! + lambda + 180) % 360) + 360) % 360) - 180;
      if (Math.abs(lat!) > 85) return false;
      if (
        reach &&
        sinCentre * Math.sin(lat! * RADIANS) +
          cosCentre * Math.cos(lat! * RADIANS) * Math.cos(turned * RADIANS) <
          least
      )
        return false;
      const step = Math.abs(turned - previous);
      if (
        step > 180 ||
        step * Math.cos(lat! * RADIANS) > STRAIGHT_EDGE_DEG ||
        Math.abs(lat! - before) > STRAIGHT_EDGE_DEG
      )
        return false;
      previous = turned;
      before = lat!;
    }
    return true;
  };
}

function written(area: MultiPolygon, projection: GeoProjection): string {
  let d = '';
  for (const rings of area.coordinates) {
    for (const ring of rings) {
      for (let i = 0; i + 1 < ring.length; i++) {
        const [x, y] = projection(ring[i] as [number, number])!;
        d += `${i === 0 ? 'M' : 'L'}${Math.round(x * 100) / 100},${Math.round(y * 100) / 100}`;
      }
      d += 'Z';
    }
  }
  return d;
}
