/** Fills and strokes of blocks and of the coasts they carry, in device pixels. */
import type { Evidence } from '../../../kernel/rotations/types';
import type { Ground } from './ground';
import type { Palette } from './palette';
import type { Patterns } from './patterns';
import type { Shape } from './shape';

export interface DrawnBlock {
  readonly evidence: Evidence;
  /** Weakly constrained at the age shown. */
  readonly weak: boolean;
  readonly shape: Shape;
  /** Index of the pose that moves it. */
  readonly carrier: number;
}

export interface BlockStyle {
  readonly palette: Palette;
  readonly patterns: Patterns;
  /** Device pixels to a CSS pixel. */
  readonly scale: number;
}

export const OUTLINE = 0.85;
export const COAST = 0.7;
export const UNCONSTRAINED_DASH = [6, 3.2];
export const WEAK_DASH = [9, 2.4, 1.6, 2.4];
export const COAST_DASH = [2.2, 1.9];

/** Draws blocks in order; `poses` packs one 3 × 3 matrix per carrier, NaN where it has no position. */
export function paintBlocks(
  ctx: CanvasRenderingContext2D,
  ground: Ground,
  blocks: readonly DrawnBlock[],
  poses: Float64Array,
  { palette, patterns, scale }: BlockStyle,
): void {
  ctx.strokeStyle = palette.outline;
  ctx.lineWidth = OUTLINE * scale;
  ctx.lineJoin = 'round';
  const solid: number[] = [];
  const dashed = UNCONSTRAINED_DASH.map((d) => d * scale);
  const weakly = WEAK_DASH.map((d) => d * scale);
  for (const { shape, evidence, weak, carrier } of blocks) {
    if (Number.isNaN(poses[9 * carrier])) continue;
    const seen = ground.load(shape, poses, 9 * carrier);
    if (seen === 'hidden') continue;
    ctx.beginPath();
    ground.fill(ctx);
    ctx.fillStyle = patterns[evidence];
    ctx.fill();
    if (seen === 'cut') {
      ctx.beginPath();
      ground.edges(ctx, true);
    }
    ctx.setLineDash(evidence === 'unconstrained' ? dashed : weak ? weakly : solid);
    ctx.stroke();
  }
  ctx.setLineDash(solid);
}

export function paintLines(
  ctx: CanvasRenderingContext2D,
  ground: Ground,
  lines: readonly Omit<DrawnBlock, 'evidence' | 'weak'>[],
  poses: Float64Array,
  { palette, scale }: BlockStyle,
): void {
  ctx.strokeStyle = palette.coast;
  ctx.lineWidth = COAST * scale;
  ctx.setLineDash(COAST_DASH.map((d) => d * scale));
  ctx.beginPath();
  for (const { shape, carrier } of lines) {
    if (carrier < 0 || Number.isNaN(poses[9 * carrier])) continue;
    if (ground.load(shape, poses, 9 * carrier) !== 'hidden') ground.edges(ctx, false);
  }
  ctx.stroke();
  ctx.setLineDash([]);
}
