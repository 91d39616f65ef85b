/** A flat equal-area map (Mollweide 1805), drawn through d3-geo: seams, poles and long edges are its work. */
import { geoGraticule, geoPath, type GeoProjection, type GeoStream } from 'd3-geo';
import { geoMollweide } from 'd3-geo-projection';
import { meridian, parallel } from '../format';
import type { PathSink } from './clip';
import type { Figure, Ground, GroundOptions } from './ground';
import { placeOf, vectorOf } from './matrix';
import { levelFor, type Points, type Shape } from './shape';

const MARGIN = 20;
/** Mollweide's map of the unit sphere is 4√2 wide and 2√2 high. */
const HALF_WIDTH = 2 * Math.SQRT2;
const HALF_HEIGHT = Math.SQRT2;

export function flatProjection({ centre, zoom, width, height, scale }: GroundOptions): GeoProjection {
  const room = Math.min((width / 2 - MARGIN) / HALF_WIDTH, (height / 2 - MARGIN) / HALF_HEIGHT);
  const projection = geoMollweide()
    .scale(Math.max(20, room) * zoom * scale)
    .rotate([-centre.lon, 0])
    .translate([0, 0])
    .precision(0.4);
  // Nearer than the whole map, the centre's latitude moves to the middle of the canvas.
  const y = projection([centre.lon, centre.lat])?.[1] ?? 0;
  return projection.translate([(width / 2) * scale, (height / 2) * scale - y * Math.max(0, 1 - 1 / zoom)]);
}

/** Feeds what a projection makes of a shape to a canvas path. */
function sinkStream(sink: PathSink): GeoStream {
  let first = true;
  let inPolygon = false;
  return {
    point(x, y) {
      if (first) sink.moveTo(x, y);
      else sink.lineTo(x, y);
      first = false;
    },
    lineStart: () => (first = true),
    lineEnd: () => inPolygon && !first && sink.closePath(),
    polygonStart: () => (inPolygon = true),
    polygonEnd: () => (inPolygon = false),
    sphere: () => undefined,
  };
}

const LONGITUDES = Array.from({ length: 12 }, (_, i) => 30 * i - 150);
const DEGREES = 180 / Math.PI;

/** Streams one part turned by its pose; d3-geo takes the inside to the right, so rings run backwards. */
function streamPart(
  stream: GeoStream,
  part: Points,
  m: ArrayLike<number>,
  at: number,
  closed: boolean,
): void {
  const n = part.length / 3;
  stream.lineStart();
  for (let k = 0; k < n; k++) {
    const i = 3 * (closed ? n - 1 - k : k);
    const [px, py, pz] = [part[i] as number, part[i + 1] as number, part[i + 2] as number];
    const x = (m[at] as number) * px + (m[at + 1] as number) * py + (m[at + 2] as number) * pz;
    const y = (m[at + 3] as number) * px + (m[at + 4] as number) * py + (m[at + 5] as number) * pz;
    const z = (m[at + 6] as number) * px + (m[at + 7] as number) * py + (m[at + 8] as number) * pz;
    stream.point(Math.atan2(y, x) * DEGREES, Math.atan2(z, Math.hypot(x, y)) * DEGREES);
  }
  stream.lineEnd();
}

export function flatGround(options: GroundOptions): Ground {
  const projection = flatProjection(options);
  const [width, height] = [options.width * options.scale, options.height * options.scale];
  const radius = projection.scale();
  const level = levelFor(radius, options.moving ? 0.9 : 0.3);
  let loaded: { shape: Shape; pose: ArrayLike<number>; at: number } | null = null;
  const draw = (sink: PathSink, closed: boolean) => {
    if (!loaded) return;
    const { shape, pose, at } = loaded;
    const stream = projection.stream(sinkStream(sink));
    if (closed) stream.polygonStart();
    for (const part of shape.levels[level] ?? []) streamPart(stream, part, pose, at, closed);
    if (closed) stream.polygonEnd();
  };
  const figures = (scale: number): Figure[] => {
    const parallels = [60, 30, 0, -30, -60].flatMap((lat): Figure[] => {
      const edge = projection([options.centre.lon - 179.9, lat]);
      return edge ? [{ text: parallel(lat), x: edge[0] - 5 * scale, y: edge[1], align: 'right' }] : [];
    });
    const meridians = LONGITUDES.flatMap((lon): Figure[] => {
      const at = projection([lon, 0]);
      const { lon: away } = placeOf(vectorOf(0, lon - options.centre.lon));
      if (!at || Math.abs(away) > 165) return [];
      return [{ text: meridian(lon), x: at[0], y: at[1] - 8 * scale, align: 'center' }];
    });
    return [...parallels, ...meridians];
  };
  return {
    width,
    height,
    radius,
    at(v) {
      const { lat, lon } = placeOf(v);
      return projection([lon, lat]);
    },
    under(xy) {
      const place = projection.invert?.([xy[0], xy[1]]);
      if (!place || !place.every(Number.isFinite)) return null;
      const back = projection(place);
      const near = back !== null && Math.hypot(back[0] - xy[0], back[1] - xy[1]) < 1;
      return near ? vectorOf(place[1], place[0]) : null;
    },
    load(shape, pose, at = 0) {
      loaded = { shape, pose, at };
      return 'whole';
    },
    fill: (sink) => draw(sink, true),
    edges: draw,
    paintUnder({ ctx, palette, scale }, graticule) {
      const path = geoPath(projection, ctx);
      ctx.beginPath();
      path({ type: 'Sphere' });
      ctx.fillStyle = palette.globe;
      ctx.fill();
      const line = (object: Parameters<typeof path>[0], colour: string, weight: number) => {
        ctx.beginPath();
        path(object);
        ctx.strokeStyle = colour;
        ctx.lineWidth = weight * scale;
        ctx.stroke();
      };
      if (graticule) line(geoGraticule().step([15, 15]).extentMajor([[-180, -90], [180, 90]]).extentMinor([[-180, -75.01], [180, 75.01]])(), palette.grat, 0.6); // prettier-ignore
      line(
        { type: 'LineString', coordinates: [-180, -90, 0, 90, 180].map((lon) => [lon, 0]) },
        palette.edge,
        0.9,
      );
    },
    paintOver({ ctx, palette, scale }) {
      ctx.beginPath();
      geoPath(projection, ctx)({ type: 'Sphere' });
      ctx.strokeStyle = palette.frame;
      ctx.lineWidth = 1.3 * scale;
      ctx.stroke();
    },
    holds: () => true,
    figures,
  };
}
