/** A drift path on a printed map: the line, ticks at rows' ages, rings at the steps with their ages, ellipses. */
import { geoPath, type GeoProjection } from 'd3-geo';
import type { Polygon } from 'geojson';
import { destination, toLatLon, toVector } from '../../../kernel/sphere';
import type { DriftPoint } from '../../../kernel/rotations';
import { shortAge } from '../../motion/format';
import { OCHRE, OCHRE_INK, PAPER } from './palette';
import { element, short, textElement, type TextStyle } from './svg';
import { visible } from './visible';

/** A path to draw, with the age of the slice and the spacing of its age labels. */
export interface DrawnPath {
  readonly points: readonly DriftPoint[];
  /** The point at the age of the slice itself; null where it has no place then. */
  readonly here: DriftPoint | null;
  readonly age_ma: number;
  readonly label_step_ma: number;
}

type Placed = DriftPoint & { lat: number; lon: number };
const isPlaced = (point: DriftPoint): point is Placed => point.lat !== null && point.lon !== null;

export function pathSvg(path: DrawnPath, projection: GeoProjection, ellipses: boolean): string {
  const points = path.points.filter(isPlaced);
  const draw = geoPath(projection).digits(2);
  const line = { type: 'LineString' as const, coordinates: points.map((p) => [p.lon, p.lat]) };
  const at = path.here && isPlaced(path.here) ? path.here : null;
  return [
    element('path', {
      class: 'drift-path',
      d: draw(line) ?? '',
      fill: 'none',
      stroke: OCHRE,
      'stroke-width': 1.4,
    }),
    ...points.map((p) => mark(p, projection)),
    ...ageLabels(path, projection).map(({ x, y, text }) => textElement(x, y, text, AGE)),
    ellipses && at ? ellipseSvg(at, (polygon) => draw(polygon) ?? '') : '',
    at ? here(at, projection) : '',
  ].join('');
}

/** A short bar across the path at a row's age; a dot at an interpolated one. */
function mark(point: Placed, projection: GeoProjection): string {
  const xy = projection([point.lon, point.lat]);
  if (!xy || !visible(projection, [point.lon, point.lat])) return '';
  const [x, y] = xy;
  if (!point.at_row) return element('circle', { class: 'interpolated', cx: x, cy: y, r: 1.1, fill: OCHRE });
  const ahead = toLatLon(destination(toVector(point.lat, point.lon), point.azimuth_deg ?? 0, 20));
  const [ax, ay] = projection([ahead.lon, ahead.lat]) ?? [x + 1, y];
  const length = Math.hypot(ax - x, ay - y) || 1;
  const [dx, dy] = [(-3 * (ay - y)) / length, (3 * (ax - x)) / length];
  const d = `M${short(x - dx)} ${short(y - dy)}L${short(x + dx)} ${short(y + dy)}`;
  return element('path', { class: 'row', d, stroke: OCHRE, 'stroke-width': 1.1 });
}

const AGE: TextStyle = {
  family: 'Inter',
  size: 6.5,
  weight: 500,
  anchor: 'end',
  fill: OCHRE_INK,
  halo: PAPER,
};

export interface AgeLabel {
  /** Right end of the baseline. */
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

/** Ages at the label step; one that would lie on another is left out. */
export function ageLabels(path: DrawnPath, projection: GeoProjection): AgeLabel[] {
  const placed: [number, number][] = [];
  return path.points.filter(isPlaced).flatMap((point) => {
    const steps = point.age_ma / path.label_step_ma;
    const xy = projection([point.lon, point.lat]);
    if (!xy || Math.abs(steps - Math.round(steps)) > 1e-6 || !visible(projection, [point.lon, point.lat]))
      return [];
    if (placed.some(([x, y]) => Math.abs(x - xy[0]) < 16 && Math.abs(y - xy[1]) < 8)) return [];
    placed.push(xy);
    return [{ x: xy[0] - 5, y: xy[1] + 2.5, text: shortAge(point.age_ma) }];
  });
}

function here(point: Placed, projection: GeoProjection): string {
  const xy = projection([point.lon, point.lat]);
  if (!xy || !visible(projection, [point.lon, point.lat])) return '';
  return element('circle', { cx: xy[0], cy: xy[1], r: 2.2, fill: OCHRE, stroke: PAPER, 'stroke-width': 0.8 });
}

function ellipseSvg(point: Placed, draw: (polygon: Polygon) => string): string {
  const ellipse = point.ellipse_95;
  if (!ellipse) return '';
  const centre = toVector(point.lat, point.lon);
  const ring = Array.from({ length: 73 }, (_, i) => {
    const t = (-i * 2 * Math.PI) / 72;
    const [along, across] = [ellipse.semi_major_km * Math.cos(t), ellipse.semi_minor_km * Math.sin(t)];
    const azimuth = ellipse.azimuth_deg + (Math.atan2(across, along) * 180) / Math.PI;
    const { lat, lon } = toLatLon(destination(centre, azimuth, Math.hypot(along, across)));
    return [lon, lat];
  });
  const d = draw({ type: 'Polygon', coordinates: [ring.reverse()] });
  const dash = ellipse.at_least ? '2.4 1.6' : undefined;
  return element('path', {
    class: 'ellipse',
    d,
    fill: OCHRE,
    'fill-opacity': 0.15,
    stroke: OCHRE,
    'stroke-width': 0.7,
    'stroke-dasharray': dash,
  });
}
