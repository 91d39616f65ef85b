/**
 * Runs in the browser: draws the same 300 moving blocks with the workbench's renderer and with d3-geo, and answers the
 * time of every frame.
 */
import { geoOrthographic, geoPath, type GeoPermissibleObjects } from 'd3-geo';
import { Clipper } from '../../../src/features/motion/globe/clip';
import { globeGround } from '../../../src/features/motion/globe/ground-globe';
import { multiply, viewMatrix } from '../../../src/features/motion/globe/matrix';
import { paintBlocks, type DrawnBlock } from '../../../src/features/motion/globe/paint-blocks';
import { buildPatterns } from '../../../src/features/motion/globe/patterns';
import { TOKENS, type Palette } from '../../../src/features/motion/globe/palette';
import { polygonShape, type Shape } from '../../../src/features/motion/globe/shape';

const BLOCKS = 300;
const EVIDENCE = ['published', 'fitted', 'posed', 'unconstrained'] as const;

/** Small linear congruential generator (Numerical Recipes constants): the same blocks in every run. */
function randoms(seed: number): () => number {
  let state = seed >>> 0;
  return () => (state = (Math.imul(state, 1664525) + 1013904223) >>> 0) / 4294967296;
}

interface Body {
  readonly evidence: (typeof EVIDENCE)[number];
  readonly geometry: { type: 'Polygon'; coordinates: [number, number][][] };
  readonly pole: [number, number];
  readonly rate: number;
}

/** Rough-edged blocks of 4 to 9 degrees in radius, spread evenly, each about its own pole. */
function bodies(vertices: number): Body[] {
  const random = randoms(20260301);
  const each = Math.round(vertices / BLOCKS);
  return Array.from({ length: BLOCKS }, (_, k) => {
    const z = 1 - (2 * k + 1) / BLOCKS;
    const lat = (Math.asin(z) * 180) / Math.PI;
    const lon = ((k * 137.50776405) % 360) - 180;
    const size = 4 + 5 * random();
    const waves = Array.from(
      { length: 12 },
      (_w, j) => [(0.25 * random()) / (1 + j / 2), random() * 7] as const,
    );
    const ring: [number, number][] = [];
    for (let i = 0; i < each; i++) {
      const t = (2 * Math.PI * i) / each;
      const r =
        size *
        (1 + waves.reduce((sum, [a, p], j) => sum + a * Math.sin((j + 2) * t + p), 0) / 2 + 0.02 * random());
      const dlat = r * Math.sin(t);
      const at = Math.max(-89.9, Math.min(89.9, lat + dlat));
      ring.push([lon + (r * Math.cos(t)) / Math.max(0.2, Math.cos((at * Math.PI) / 180)), at]);
    }
    ring.push(ring[0] as [number, number]);
    return {
      evidence: EVIDENCE[k % 4] as (typeof EVIDENCE)[number],
      geometry: { type: 'Polygon', coordinates: [ring] },
      pole: [random() * 180 - 90, random() * 360 - 180],
      rate: 0.2 + random(),
    };
  });
}

function spin([lat, lon]: [number, number], deg: number): Float64Array {
  const [x, y, z] = [
    Math.cos((lat * Math.PI) / 180) * Math.cos((lon * Math.PI) / 180),
    Math.cos((lat * Math.PI) / 180) * Math.sin((lon * Math.PI) / 180),
    Math.sin((lat * Math.PI) / 180),
  ];
  const c = Math.cos((deg * Math.PI) / 180);
  const s = Math.sin((deg * Math.PI) / 180);
  const t = 1 - c;
  return Float64Array.of(
    c + x * x * t, x * y * t - z * s, x * z * t + y * s,
    x * y * t + z * s, c + y * y * t, y * z * t - x * s,
    x * z * t - y * s, y * z * t + x * s, c + z * z * t,
  ); // prettier-ignore
}

/** d3's rotation angles that give the same picture as a view matrix. */
function d3Rotation(m: Float64Array): [number, number, number] {
  const deg = 180 / Math.PI;
  const lat = Math.asin(Math.max(-1, Math.min(1, m[8] as number)));
  const lon = Math.atan2(m[7] as number, m[6] as number);
  return [-lon * deg, -lat * deg, Math.atan2(-(m[2] as number), m[5] as number) * deg];
}

/** `ours` draws as the workbench does while it moves, by level of detail; `every vertex` drops none, as d3-geo. */
export type Renderer = 'ours' | 'every vertex' | 'd3';

export interface Timing {
  readonly frames: number[];
  readonly vertices: number;
}

const LIGHT: Record<string, string> = {
  globe: '#FCFAF5', outline: '#27313C', 'ev-ink': '#3E4A52', 'ev-published': '#DCDCD6',
  'ev-fitted': '#CBDCD5', 'ev-posed': '#EADBC0', 'ev-unconstrained': '#F7F4EC',
}; // prettier-ignore

/** A shape without coarser levels: every vertex is drawn at any scale. */
const whole = (shape: Shape): Shape => ({ ...shape, levels: shape.levels.slice(0, 1) });

function canvasOf(size: number): CanvasRenderingContext2D {
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = size;
  document.body.replaceChildren(canvas);
  return canvas.getContext('2d', { alpha: false }) as CanvasRenderingContext2D;
}

/** Waits for a painted frame, so that the time of rasterising counts. */
const flushed = (ctx: CanvasRenderingContext2D) => ctx.getImageData(0, 0, 1, 1).data[0];

export function run(which: Renderer, vertices: number, frames: number, size: number): Timing {
  const ctx = canvasOf(size);
  const palette = {
    ...Object.fromEntries(TOKENS.map((name) => [name, '#1C2530'])),
    ...LIGHT,
  } as unknown as Palette;
  const patterns = buildPatterns(ctx, palette, 1);
  const moving = bodies(vertices);
  const disc = { cx: size / 2, cy: size / 2, radius: size / 2 - 8 };
  const times: number[] = [];
  const drawn: DrawnBlock[] = moving.map((body, i) => ({
    evidence: body.evidence,
    weak: false,
    shape: which === 'every vertex' ? whole(polygonShape(body.geometry)) : polygonShape(body.geometry),
    carrier: i,
  }));
  const clipper = new Clipper();
  const projection = geoOrthographic().scale(disc.radius).translate([disc.cx, disc.cy]).clipAngle(90);
  const path = geoPath(projection, ctx);
  const reversed = moving.map((body) => ({
    ...body.geometry,
    coordinates: body.geometry.coordinates.map((r) => [...r].reverse()),
  }));
  const poses = new Float64Array(9 * BLOCKS);
  const turned = new Float64Array(9);
  const fit = (2 * disc.radius) / size;
  for (let frame = 0; frame < frames; frame++) {
    const started = performance.now();
    const centre = { lat: 12 - frame / 5, lon: 34 + frame, roll: 0 };
    moving.forEach((body, i) => poses.set(spin(body.pole, body.rate * frame), 9 * i));
    ctx.fillStyle = palette.globe;
    ctx.fillRect(0, 0, size, size);
    if (which !== 'd3') {
      const ground = globeGround(
        { centre, zoom: 1, width: size, height: size, scale: 1, moving: true, fit },
        clipper,
      );
      paintBlocks(ctx, ground, drawn, poses, { palette, patterns, scale: 1 });
    } else {
      const view = viewMatrix(centre);
      ctx.strokeStyle = palette.outline;
      ctx.lineWidth = 0.85;
      moving.forEach((body, i) => {
        multiply(view, poses, turned, 9 * i);
        projection.rotate(d3Rotation(turned));
        ctx.beginPath();
        path(reversed[i] as GeoPermissibleObjects);
        ctx.fillStyle = patterns[body.evidence];
        ctx.fill();
        ctx.setLineDash(body.evidence === 'unconstrained' ? [6, 3.2] : []);
        ctx.stroke();
      });
    }
    flushed(ctx);
    times.push(performance.now() - started);
  }
  return { frames: times, vertices: drawn.reduce((sum, { shape }) => sum + shape.vertices, 0) };
}

declare global {
  interface Window {
    globeBench: typeof run;
    globePicture: (which: Renderer) => string;
  }
}
window.globeBench = run;
window.globePicture = (which) => {
  run(which, 20_000, 30, 700);
  return document.querySelector('canvas')?.toDataURL() ?? '';
};
