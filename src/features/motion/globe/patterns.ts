/**
 * Evidence patterns as repeating bitmaps at the device's resolution. They are fixed to the screen: a block that
 * turns slides under its pattern. Cells and marks are those of src/styles/tokens.css.
 */
import { EVIDENCE, type Evidence } from '../../../kernel/rotations/types';
import type { Palette } from './palette';

export type Patterns = Readonly<Record<Evidence, CanvasPattern | string>>;

const MARK_OPACITY = 0.72;
const STROKE = 0.7;

/** Width and height of each repeating cell in CSS pixels; fitted lines stand 5.5 apart at 45°. */
const CELLS: Readonly<Record<Evidence, readonly [number, number]>> = {
  published: [7, 7],
  fitted: [5.5 * Math.SQRT2, 5.5 * Math.SQRT2],
  posed: [9, 7],
  unconstrained: [11, 11],
};

type Marks = (ctx: CanvasRenderingContext2D, w: number, h: number) => void;

const line = (ctx: CanvasRenderingContext2D, x1: number, y1: number, x2: number, y2: number) => {
  ctx.moveTo(x1, y1);
  ctx.lineTo(x2, y2);
};

const MARKS: Readonly<Record<Evidence, Marks>> = {
  published(ctx) {
    for (const [x, y] of [
      [1.75, 1.75],
      [5.25, 5.25],
    ] as const) {
      // prettier-ignore
      ctx.beginPath();
      ctx.arc(x, y, 0.62, 0, 2 * Math.PI);
      ctx.fill();
    }
  },
  fitted(ctx, w, h) {
    ctx.beginPath();
    for (const k of [-1, 0, 1]) line(ctx, k * w - 1, h + 1, (k + 1) * w + 1, -1);
    ctx.stroke();
  },
  posed(ctx) {
    ctx.beginPath();
    line(ctx, 0.5, 1.75, 5, 1.75);
    line(ctx, 5, 5.25, 9.5, 5.25);
    line(ctx, -4, 5.25, 0.5, 5.25);
    ctx.stroke();
  },
  unconstrained(ctx) {
    ctx.beginPath();
    line(ctx, 2.75, 1.25, 2.75, 4.25);
    line(ctx, 1.25, 2.75, 4.25, 2.75);
    line(ctx, 8.25, 6.75, 8.25, 9.75);
    line(ctx, 6.75, 8.25, 9.75, 8.25);
    ctx.stroke();
  },
};

function cell(evidence: Evidence, palette: Palette, scale: number): HTMLCanvasElement {
  const [w, h] = CELLS[evidence];
  const canvas = document.createElement('canvas');
  canvas.width = Math.max(1, Math.round(w * scale));
  canvas.height = Math.max(1, Math.round(h * scale));
  const ctx = canvas.getContext('2d');
  if (!ctx) return canvas;
  ctx.fillStyle = palette[`ev-${evidence}`];
  ctx.fillRect(0, 0, canvas.width, canvas.height);
  ctx.setTransform(canvas.width / w, 0, 0, canvas.height / h, 0, 0);
  ctx.globalAlpha = MARK_OPACITY;
  ctx.fillStyle = ctx.strokeStyle = palette['ev-ink'];
  ctx.lineWidth = STROKE;
  MARKS[evidence](ctx, w, h);
  return canvas;
}

/** Patterns for a canvas whose units are device pixels, `scale` of them to a CSS pixel. */
export function buildPatterns(ctx: CanvasRenderingContext2D, palette: Palette, scale: number): Patterns {
  return Object.fromEntries(
    EVIDENCE.map((evidence) => [
      evidence,
      ctx.createPattern(cell(evidence, palette, scale), 'repeat') ?? palette[`ev-${evidence}`],
    ]),
  ) as unknown as Patterns;
}
