/** The drift path: solid towards the past, dotted towards what was yet to come, ticks, ages and 95 % ellipses. */
import { number } from '../format';
import type { Track, TrackPoint } from '../scene/track';
import { ELLIPSE_POINTS, ellipsePoints } from './ellipse';
import type { Box } from './labels';
import type { Ground } from './ground';
import { dash, font, haloText, type Pen, type XY } from './pen';

/** What names must not cover, and what they should keep off. */
export interface Kept {
  readonly clear: readonly Box[];
  readonly avoid: readonly Box[];
}

interface Seen {
  readonly point: TrackPoint;
  readonly at: XY | null;
}

const TICK = 5.5;
/** Least distance between two labelled ages, CSS pixels. */
const LABEL_GAP = 20;

/** `ellipses` where that layer is on. Answers what the path covers, for the names to keep clear of. */
export function paintTrack(pen: Pen, ground: Ground, track: Track, age: number, ellipses: boolean): Kept {
  const seen = track.points.map((point): Seen => ({ point, at: ground.at(point.v) }));
  const older = seen.filter(({ point }) => point.age >= age);
  const younger = seen.filter(({ point }) => point.age <= age);
  const { ctx, palette, scale } = pen;
  ctx.strokeStyle = palette.ochre;
  ctx.lineJoin = 'round';
  ctx.lineWidth = 1.5 * scale;
  line(pen, ground, older);
  dash(pen, [1, 2.2]);
  line(pen, ground, younger);
  dash(pen, []);
  ctx.lineWidth = 1.2 * scale;
  ticks(pen, seen, track.tick);
  return { clear: labels(pen, ground, older, track.tick, age, ellipses), avoid: along(seen, scale) };
}

/** Small boxes along the path, so that names keep off it. */
function along(seen: readonly Seen[], scale: number): Box[] {
  const half = 3 * scale;
  return seen.flatMap(({ at }, i) =>
    at && i % 4 === 0 ? [{ x: at[0] - half, y: at[1] - half, w: 2 * half, h: 2 * half }] : [],
  );
}

/** Broken where it goes out of sight or over the seam of a map. */
function line({ ctx }: Pen, { width }: Ground, seen: readonly Seen[]): void {
  ctx.beginPath();
  let last: XY | null = null;
  for (const { at } of seen) {
    if (at && last && Math.abs(at[0] - last[0]) < width / 3) ctx.lineTo(at[0], at[1]);
    else if (at) ctx.moveTo(at[0], at[1]);
    last = at;
  }
  ctx.stroke();
}

const isTick = (age: number, step: number): boolean => Math.abs(age / step - Math.round(age / step)) < 1e-6;

function ticks({ ctx, scale }: Pen, seen: readonly Seen[], step: number): void {
  ctx.beginPath();
  seen.forEach(({ point, at }, i) => {
    if (!at || !isTick(point.age, step)) return;
    const [ax, ay] = seen[Math.max(0, i - 1)]?.at ?? at;
    const [bx, by] = seen[Math.min(seen.length - 1, i + 1)]?.at ?? at;
    const length = Math.hypot(bx - ax, by - ay);
    if (length < 0.05) return;
    const [nx, ny] = [((ay - by) / length) * TICK * scale, ((bx - ax) / length) * TICK * scale];
    ctx.moveTo(at[0] - nx, at[1] - ny);
    ctx.lineTo(at[0] + nx, at[1] + ny);
  });
  ctx.stroke();
}

/** Ages at every second tick where the path has room, each with its ellipse. */
function labels(
  pen: Pen,
  ground: Ground,
  older: readonly Seen[],
  step: number,
  age: number,
  ellipses: boolean,
): Box[] {
  const { ctx, palette, scale } = pen;
  const boxes: Box[] = [];
  let last: XY | null = older[0]?.at ?? null;
  ctx.font = font(pen, 11, 500);
  ctx.textBaseline = 'middle';
  ctx.textAlign = 'right';
  for (const { point, at } of older) {
    if (!at || !isTick(point.age, 2 * step) || point.age === age) continue;
    if (last && Math.hypot(at[0] - last[0], at[1] - last[1]) < LABEL_GAP * scale) continue;
    last = at;
    let reach = TICK * scale;
    if (ellipses && point.ellipse) reach = Math.max(reach, ellipse(pen, ground, point, false));
    const text = number(point.age, point.age % 1 ? 1 : 0);
    haloText(pen, text, at[0] - reach - 2 * scale, at[1], palette['ochre-ink']);
    const w = ctx.measureText(text).width;
    boxes.push({
      x: at[0] - reach - w - 4 * scale,
      y: at[1] - 7 * scale,
      w: w + reach + 8 * scale,
      h: 14 * scale,
    });
  }
  return boxes;
}

/** Strokes a 95 % ellipse, dashed where it is "at least"; answers how far it reaches to the left of its centre. */
export function ellipse(pen: Pen, ground: Ground, { v, ellipse: e }: TrackPoint, filled: boolean): number {
  const centre = ground.at(v);
  if (!e || !centre) return 0;
  const ring = ellipsePoints(v, e).flatMap((p) => {
    const at = ground.at(p);
    return at ? [at] : [];
  });
  if (ring.length < ELLIPSE_POINTS || ring.some(([x]) => Math.abs(x - centre[0]) > ground.width / 3))
    return 0;
  const { ctx, palette, scale } = pen;
  ctx.beginPath();
  for (const [x, y] of ring) ctx.lineTo(x, y);
  ctx.closePath();
  if (filled) {
    ctx.fillStyle = palette['ochre-band'];
    ctx.fill();
  }
  ctx.strokeStyle = palette.ochre;
  ctx.lineWidth = 1 * scale;
  dash(pen, e.at_least ? [3, 2] : []);
  ctx.stroke();
  dash(pen, []);
  return Math.max(...ring.map(([x]) => centre[0] - x));
}

/** The selected point at this age. */
export function paintPoint({ ctx, palette, scale }: Pen, [x, y]: XY): void {
  ctx.beginPath();
  ctx.arc(x, y, 4.2 * scale, 0, 2 * Math.PI);
  ctx.fillStyle = palette.ochre;
  ctx.fill();
  ctx.lineWidth = 1.6 * scale;
  ctx.strokeStyle = palette.globe;
  ctx.stroke();
}
