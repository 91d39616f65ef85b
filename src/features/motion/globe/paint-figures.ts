/** Figures of the graticule, where no name or mark stands. */
import type { Ground } from './ground';
import { overlap, type Box } from './labels';
import { font, haloText, type Pen } from './pen';

const SIZE = 10.5;

export function paintFigures(pen: Pen, ground: Ground, taken: readonly Box[]): void {
  const { ctx, palette, scale } = pen;
  ctx.font = font(pen, SIZE);
  ctx.textBaseline = 'middle';
  for (const { text, x, y, align } of ground.figures(scale)) {
    const w = ctx.measureText(text).width;
    const left = align === 'right' ? x - w : x - w / 2;
    const box = { x: left, y: y - 7 * scale, w, h: 14 * scale };
    if (left < 0 || taken.some((other) => overlap(box, other))) continue;
    ctx.textAlign = align;
    haloText(pen, text, x, y, palette['ink-3']);
  }
}
