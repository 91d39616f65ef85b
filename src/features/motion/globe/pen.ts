/** A canvas to draw on in device pixels, with what every painter needs. */
import type { Clipper, Disc } from './clip';
import type { Vec } from './matrix';
import type { Palette } from './palette';

export interface Pen {
  readonly ctx: CanvasRenderingContext2D;
  readonly palette: Palette;
  /** Device pixels to a CSS pixel. */
  readonly scale: number;
  readonly clipper: Clipper;
}

export type XY = readonly [x: number, y: number];

/** Where a view vector falls on the canvas. Inverse on the visible half: `viewOf`. */
export const place = ({ cx, cy, radius }: Disc, v: Vec): XY => [cx + radius * v[0], cy - radius * v[1]];

/** The view vector under a canvas point; outside the disc the nearest point of the limb. */
export function viewOf({ cx, cy, radius }: Disc, [x, y]: XY): { v: Vec; onGlobe: boolean } {
  const vx = (x - cx) / radius;
  const vy = (cy - y) / radius;
  const r2 = vx * vx + vy * vy;
  if (r2 <= 1) return { v: [vx, vy, Math.sqrt(1 - r2)], onGlobe: true };
  const r = Math.sqrt(r2);
  return { v: [vx / r, vy / r, 0], onGlobe: false };
}

export function font(
  { palette, scale }: Pick<Pen, 'palette' | 'scale'>,
  size: number,
  weight = 400,
  serif = false,
): string {
  return `${serif ? 'italic ' : ''}${weight} ${size * scale}px ${serif ? palette.serif : palette.sans}`;
}

/** Text over a halo of the ground it stands on. */
export function haloText(
  { ctx, palette, scale }: Pen,
  text: string,
  x: number,
  y: number,
  colour: string,
): void {
  ctx.lineJoin = 'round';
  ctx.lineWidth = 3 * scale;
  ctx.strokeStyle = palette.globe;
  ctx.strokeText(text, x, y);
  ctx.fillStyle = colour;
  ctx.fillText(text, x, y);
}

export function dash({ ctx, scale }: Pen, pattern: readonly number[]): void {
  ctx.setLineDash(pattern.map((d) => d * scale));
}
