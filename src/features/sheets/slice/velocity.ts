/** Arrows of motion on a printed map: where each block goes, forward in time, at points spread over it. */
import { geoContains, type GeoProjection } from 'd3-geo';
import { velocityAt } from '../../../kernel/rotations';
import type { Model } from '../../../kernel/rotations/types';
import { destination, toLatLon, toVector } from '../../../kernel/sphere';
import { angularVelocity } from '../../motion/scene/tolerant';
import type { CarriedBlock } from './carried';
import { INK } from './palette';
import { element, short } from './svg';
import { visible } from './visible';

/** Length on paper of an arrow of 100 mm/yr, in points. */
export const ARROW_PT_PER_100_MM_YR = 22;
const SPACING_DEG = 14;
/** Slower than this is drawn as a dot. */
const STILL_MM_YR = 2;

export interface Arrow {
  readonly lat: number;
  readonly lon: number;
  readonly azimuth_deg: number | null;
  readonly speed_mm_yr: number;
}

/** Velocities at the block's middle and at the points of a sparse grid that lie inside it. */
export function blockArrows(model: Model, block: CarriedBlock, age_ma: number, relative_to: string): Arrow[] {
  const motion = angularVelocity(model, block.code, age_ma, relative_to);
  if (motion.status !== 'placed') return [];
  return spread(block).map(({ lat, lon }) => {
    const { azimuth_deg, speed_mm_yr } = velocityAt(toVector(lat, lon), motion.omega);
    return { lat, lon, azimuth_deg, speed_mm_yr };
  });
}

function spread({ area, label }: CarriedBlock): { lat: number; lon: number }[] {
  const points: { lat: number; lon: number }[] = [];
  for (let lat = -84; lat <= 84; lat += SPACING_DEG) {
    const step = SPACING_DEG / Math.max(0.2, Math.cos((lat * Math.PI) / 180));
    for (let lon = -180; lon < 180; lon += step) if (geoContains(area, [lon, lat])) points.push({ lat, lon });
  }
  return points.length > 0 ? points : [label];
}

export function arrowSvg(arrow: Arrow, projection: GeoProjection): string {
  const from = projection([arrow.lon, arrow.lat]);
  if (!from || !visible(projection, [arrow.lon, arrow.lat])) return '';
  const [x, y] = from;
  const look = { class: 'velocity', stroke: INK, 'stroke-width': 0.8, fill: 'none' };
  if (arrow.azimuth_deg === null || arrow.speed_mm_yr < STILL_MM_YR)
    return element('circle', { class: 'velocity', cx: x, cy: y, r: 0.9, fill: INK });
  const ahead = toLatLon(destination(toVector(arrow.lat, arrow.lon), arrow.azimuth_deg, 50));
  const to = projection([ahead.lon, ahead.lat]);
  if (!to) return '';
  const size = Math.hypot(to[0] - x, to[1] - y);
  if (size === 0) return '';
  const length = (arrow.speed_mm_yr / 100) * ARROW_PT_PER_100_MM_YR;
  const [ux, uy] = [(to[0] - x) / size, (to[1] - y) / size];
  const [ex, ey] = [x + ux * length, y + uy * length];
  const head = Math.min(3.2, length * 0.5);
  const wing = (side: number): string =>
    `M${short(ex)} ${short(ey)}L${short(ex - head * (ux - side * 0.45 * uy))} ${short(ey - head * (uy + side * 0.45 * ux))}`;
  return element('path', {
    ...look,
    d: `M${short(x)} ${short(y)}L${short(ex)} ${short(ey)}${wing(1)}${wing(-1)}`,
  });
}
