import { geoDistance, type GeoProjection } from 'd3-geo';

/** Whether a position lies within an azimuthal map's reach; always true on a map of the whole globe. */
export function visible(projection: GeoProjection, position: [number, number]): boolean {
  const angle = projection.clipAngle();
  if (!angle) return true;
  const [lambda, phi] = projection.rotate();
  return geoDistance(position, [-lambda, -phi]) * (180 / Math.PI) < angle;
}
