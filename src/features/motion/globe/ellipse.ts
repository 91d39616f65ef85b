/** Points of an ellipse on the sphere around a place, its axes measured along great circles. */
import { EARTH_RADIUS_KM } from '../../../kernel/sphere/angles';
import { unit, type Vec } from './matrix';

interface Axes {
  readonly semi_major_km: number;
  readonly semi_minor_km: number;
  readonly azimuth_deg: number;
}

export const ELLIPSE_POINTS = 48;

/** East and north at a place; at a pole along the meridian of longitude 0. */
export function eastNorth(v: Vec): { east: Vec; north: Vec } {
  const across = Math.hypot(v[0], v[1]);
  const east: Vec = across < 1e-12 ? [0, 1, 0] : [-v[1] / across, v[0] / across, 0];
  const north: Vec = [
    v[1] * east[2] - v[2] * east[1],
    v[2] * east[0] - v[0] * east[2],
    v[0] * east[1] - v[1] * east[0],
  ];
  return { east, north };
}

export function ellipsePoints(
  v: Vec,
  { semi_major_km, semi_minor_km, azimuth_deg }: Axes,
  n = ELLIPSE_POINTS,
): Vec[] {
  const { east, north } = eastNorth(v);
  const az = (azimuth_deg * Math.PI) / 180;
  const [s, c] = [Math.sin(az), Math.cos(az)];
  return Array.from({ length: n }, (_, i) => {
    const t = (2 * Math.PI * i) / n;
    const a = (semi_major_km / EARTH_RADIUS_KM) * Math.cos(t);
    const b = (semi_minor_km / EARTH_RADIUS_KM) * Math.sin(t);
    const [e, m] = [a * s + b * c, a * c - b * s];
    const r = Math.hypot(e, m);
    if (r === 0) return v;
    const [k, w] = [Math.sin(r) / r, Math.cos(r)];
    return unit([
      w * v[0] + k * (e * east[0] + m * north[0]),
      w * v[1] + k * (e * east[1] + m * north[1]),
      w * v[2] + k * (e * east[2] + m * north[2]),
    ]);
  });
}
