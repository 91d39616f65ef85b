/** Fills and strokes of blocks and of the coasts they carry, on the globe's disc in device pixels. */
import { type Evidence } from '../../../kernel/rotations/types';
import { type Clipper, type Disc } from './clip';
import { type Palette } from './palette';
import { type Patterns } from './patterns';
import { type Shape } from './shape';

export interface DrawnBlock {
  readonly code: string;
  readonly evidence: Evidence;
  readonly shape: Shape;
}

export interface BlockStyle {
  readonly palette: Palette;
  readonly patterns: Patterns;
  /** Device pixels to a CSS pixel. */
  readonly scale: number;
  readonly level: number;
  /** Evidence switched off in the legend leaves its blocks as bare outlines. */
  readonly bare?: ReadonlySet<Evidence>;
}

export const OUTLINE = 0.85;
export const COAST = 0.7;
export const UNCONSTRAINED_DASH = [6, 3.2];
export const COAST_DASH = [2.2, 1.9];

/** Draws blocks in order; `matrices` packs one 3 × 3 view matrix per block, NaN where it has no position. */
export function paintBlocks(
  ctx: CanvasRenderingContext2D,
  clipper: Clipper,
  disc: Disc,
  blocks: readonly DrawnBlock[],
  matrices: Float64Array,
  style: BlockStyle,
): void {
  const { palette, patterns, scale, level } = style;
  ctx.strokeStyle = palette.outline;
  ctx.lineWidth = OUTLINE * scale;
  ctx.lineJoin = 'round';
  const solid: number[] = [];
  const dashed = UNCONSTRAINED_DASH.map((d) => d * scale);
  blocks.forEach((block, i) => {
    if (Number.isNaN(matrices[9 * i])) return;
    const seen = clipper.load(block.shape, level, matrices, 9 * i);
    if (seen === 'hidden') return;
    ctx.beginPath();
    clipper.fill(ctx, disc);
    if (!style.bare?.has(block.evidence)) {
      ctx.fillStyle = patterns[block.evidence];
      ctx.fill();
    }
    if (seen === 'cut') {
      ctx.beginPath();
      clipper.stroke(ctx, disc);
    }
    ctx.setLineDash(block.evidence === 'unconstrained' ? dashed : solid);
    ctx.stroke();
  });
  ctx.setLineDash(solid);
}

export interface DrawnLines {
  readonly shape: Shape;
  /** Index into the matrices of the block that carries the lines. */
  readonly carrier: number;
}

export function paintLines(
  ctx: CanvasRenderingContext2D,
  clipper: Clipper,
  disc: Disc,
  lines: readonly DrawnLines[],
  matrices: Float64Array,
  { palette, scale, level }: BlockStyle,
): void {
  ctx.strokeStyle = palette.coast;
  ctx.lineWidth = COAST * scale;
  ctx.setLineDash(COAST_DASH.map((d) => d * scale));
  ctx.beginPath();
  for (const { shape, carrier } of lines) {
    if (carrier < 0 || Number.isNaN(matrices[9 * carrier])) continue;
    if (clipper.load(shape, level, matrices, 9 * carrier) !== 'hidden') clipper.stroke(ctx, disc, false);
  }
  ctx.stroke();
  ctx.setLineDash([]);
}
