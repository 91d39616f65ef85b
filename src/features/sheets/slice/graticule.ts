/** Graticule of a map, every 15° with the equator apart, and its labels where the lines leave the map. */
import { geoDistance, geoGraticule, geoPath, type GeoProjection } from 'd3-geo';
import type { LineString } from 'geojson';
import { meridian, parallel } from '../../motion/format';
import { GRATICULE, INK_2, PAPER, RULE } from './palette';
import { element, textElement, type TextStyle } from './svg';

const STEP = 15;
const LABEL: TextStyle = { family: 'Inter', size: 7, fill: INK_2, halo: PAPER };

export function graticuleSvg(projection: GeoProjection): string {
  const path = geoPath(projection).digits(2);
  const lines = geoGraticule().extentMajor([[-180, -85], [180, 85]]).extentMinor([[-180, -85], [180, 85]]).step([STEP, STEP]).stepMajor([90, 360]); // prettier-ignore
  const equator: LineString = {
    type: 'LineString',
    coordinates: Array.from({ length: 73 }, (_, i) => [-180 + 5 * i, 0]),
  };
  return (
    element('path', {
      class: 'graticule',
      d: path(lines()) ?? '',
      fill: 'none',
      stroke: GRATICULE,
      'stroke-width': 0.5,
    }) +
    element('path', {
      class: 'equator',
      d: path(equator) ?? '',
      fill: 'none',
      stroke: RULE,
      'stroke-width': 0.8,
    })
  );
}

interface Point {
  readonly x: number;
  readonly y: number;
}

/** Places where a run of positions is drawn by the projection, in drawing units. */
function drawn(projection: GeoProjection, positions: readonly [number, number][]): Point[] {
  const points: Point[] = [];
  let on = false;
  const sink = {
    point: (x: number, y: number) => on && points.push({ x, y }),
    lineStart: () => (on = true),
    lineEnd: () => (on = false),
    polygonStart: () => undefined,
    polygonEnd: () => undefined,
  };
  const stream = projection.stream(sink);
  stream.lineStart();
  for (const [lon, lat] of positions) stream.point(lon, lat);
  stream.lineEnd();
  return points;
}

function leftmost(projection: GeoProjection, lat: number): Point | null {
  const line = Array.from({ length: 721 }, (_, i): [number, number] => [-180 + i / 2, lat]);
  return drawn(projection, line).reduce<Point | null>((best, p) => (best && best.x <= p.x ? best : p), null);
}

/** Half the height of a label's letters. */
const HALF_LETTER = 2.5;

/** How far the map's edge comes towards a label within the height of its letters, where the edge leans over it. */
function slant(projection: GeoProjection, lat: number, { x, y }: Point): number {
  const next = leftmost(projection, lat - Math.sign(lat));
  if (!next || lat === 0) return 0;
  const [out, down] = [x - next.x, Math.abs(y - next.y)];
  return out <= 0 || down < 0.2 * out ? 0 : (out / down) * HALF_LETTER;
}

/** Parallels are labelled where they are leftmost, meridians where they are lowest; what would collide is left out. */
export function graticuleLabels(projection: GeoProjection): string {
  const taken: Point[] = [];
  let svg = '';
  const put = (x: number, y: number, text: string, anchor: 'end' | 'middle'): void => {
    if (taken.some((p) => Math.abs(p.x - x) < 26 && Math.abs(p.y - y) < 9)) return;
    taken.push({ x, y });
    svg += textElement(x, y, text, { ...LABEL, anchor });
  };
  for (let lat = -60; lat <= 60; lat += 30) {
    const left = leftmost(projection, lat);
    if (left) put(left.x - 4 - slant(projection, lat, left), left.y + 2.5, parallel(lat), 'end');
  }
  for (let lon = -180; lon < 180; lon += 60) {
    const points = drawn(
      projection,
      Array.from({ length: 341 }, (_, i) => [lon, -85 + i / 2]),
    );
    for (const { x, y } of meridianEnds(projection, points)) put(x, y, meridian(lon), 'middle');
  }
  return svg;
}

/** Where a meridian's label stands: under its lowest point, or on azimuthal maps outside the limb where it ends there. */
function meridianEnds(projection: GeoProjection, points: readonly Point[]): Point[] {
  const reach = projection.clipAngle();
  if (!reach) {
    const low = points.reduce<Point | null>((best, p) => (best && best.y >= p.y ? best : p), null);
    return low ? [{ x: low.x, y: low.y + 9 }] : [];
  }
  const [cx, cy] = projection.translate();
  const [lambda, phi] = projection.rotate();
  return [points[0], points.at(-1)].flatMap((end) => {
    const position = end && projection.invert?.([end.x, end.y]);
    if (!position || (geoDistance(position, [-lambda, -phi]) * 180) / Math.PI < 0.97 * reach) return [];
    const out = 11 / (Math.hypot(end.x - cx, end.y - cy) || 1);
    return [{ x: end.x + 1.25 * out * (end.x - cx), y: end.y + out * (end.y - cy) + 2.5 }];
  });
}
