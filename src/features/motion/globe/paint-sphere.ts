/** The globe without its blocks: disc, graticule, equator, the double limb with its ticks and labels. */
import { meridian, parallel } from '../format';
import { equator, graticule } from './graticule';
import { turn, vectorOf } from './matrix';
import type { Figure } from './ground';
import type { Look } from './ground-globe';
import { font, place, type Pen } from './pen';

/** Distance between the limb's two circles, CSS pixels. */
export const RING = 5;

export function paintDisc({ ctx, palette }: Pen, { disc }: Look): void {
  ctx.beginPath();
  ctx.arc(disc.cx, disc.cy, disc.radius, 0, 2 * Math.PI);
  ctx.fillStyle = palette.globe;
  ctx.fill();
}

export function paintGraticule(pen: Pen, { disc, view }: Look, all: boolean): void {
  const { ctx, palette, scale, clipper } = pen;
  if (all) {
    clipper.load(graticule(), 0, view);
    ctx.beginPath();
    clipper.stroke(ctx, disc, false);
    ctx.strokeStyle = palette.grat;
    ctx.lineWidth = 0.6 * scale;
    ctx.stroke();
  }
  clipper.load(equator(), 0, view);
  ctx.beginPath();
  clipper.stroke(ctx, disc, false);
  ctx.strokeStyle = palette.edge;
  ctx.lineWidth = 0.9 * scale;
  ctx.stroke();
}

export function paintLimb(pen: Pen, look: Look): void {
  const { ctx, palette, scale } = pen;
  const { disc } = look;
  ctx.strokeStyle = palette.frame;
  ctx.lineWidth = 1.3 * scale;
  ctx.beginPath();
  ctx.arc(disc.cx, disc.cy, disc.radius, 0, 2 * Math.PI);
  ctx.stroke();
  ctx.lineWidth = 0.7 * scale;
  ctx.beginPath();
  ctx.arc(disc.cx, disc.cy, disc.radius + RING * scale, 0, 2 * Math.PI);
  ctx.stroke();
  ctx.beginPath();
  for (const { angle } of limbTicks(look.view)) {
    const [c, s] = [Math.cos(angle), -Math.sin(angle)];
    ctx.moveTo(disc.cx + disc.radius * c, disc.cy + disc.radius * s);
    ctx.lineTo(disc.cx + (disc.radius + RING * scale) * c, disc.cy + (disc.radius + RING * scale) * s);
  }
  ctx.lineWidth = 0.8 * scale;
  ctx.stroke();
}

/** Where parallels meet the limb: angles anticlockwise from the right, with the parallel's latitude. */
export function limbTicks(view: ArrayLike<number>, step = 30): { lat: number; angle: number }[] {
  // Height above the equator of the limb's point at angle a is A cos a + B sin a.
  const A = view[2] as number;
  const B = view[5] as number;
  const reach = Math.hypot(A, B);
  const top = Math.atan2(B, A);
  const ticks: { lat: number; angle: number }[] = [];
  for (let lat = -90 + step; lat < 90; lat += step) {
    const h = Math.sin((lat * Math.PI) / 180) / reach;
    if (!(Math.abs(h) < 1)) continue;
    const away = Math.acos(h);
    ticks.push({ lat, angle: top + away }, { lat, angle: top - away });
  }
  return ticks;
}

/** Latitudes outside the left half of the limb, where there is room for them. */
export function paintLimbLabels(pen: Pen, { disc, view, width, height }: Look): void {
  const { ctx, palette, scale } = pen;
  ctx.font = font(pen, 11);
  ctx.textBaseline = 'middle';
  ctx.textAlign = 'right';
  ctx.fillStyle = palette['ink-3'];
  const r = disc.radius + (RING + 7) * scale;
  for (const { lat, angle } of limbTicks(view)) {
    if (Math.cos(angle) > -0.2) continue;
    const x = disc.cx + r * Math.cos(angle);
    const y = disc.cy - r * Math.sin(angle);
    const text = parallel(lat);
    if (x - ctx.measureText(text).width < 2 * scale || y < 8 * scale || y > height - 8 * scale || x > width)
      continue;
    ctx.fillText(text, x, y - Math.sin(angle) * 3 * scale);
  }
}

/** Longitudes along the equator. */
export function meridianFigures({ disc, view }: Look, scale: number): Figure[] {
  return LONGITUDES.flatMap((lon) => {
    const v = turn(view, vectorOf(0, lon));
    if (v[2] < 0.3) return [];
    const [x, y] = place(disc, v);
    return [{ text: meridian(lon), x, y: y - 9 * scale, align: 'center' as const }];
  });
}

const LONGITUDES = Array.from({ length: 12 }, (_, i) => 30 * i - 150);
