/** Marks over the blocks: velocities, the separation line, the cursor's cross, names of seas. */
import { kilometres } from '../format';
import type { Arrow } from '../scene/arrows';
import type { Separation } from '../scene/separation';
import type { Box } from './labels';
import type { Ground } from './ground';
import { unit, type Vec } from './matrix';
import { font, haloText, type Pen, type XY } from './pen';

/** Length of a velocity of 100 mm/yr, CSS pixels, on a globe of this radius and larger in proportion. */
export const ARROW_PX = 36;
const ARROW_RADIUS = 245;
/** Slower than this, mm/yr, an arrow would be a dot. */
const STILL = 1.5;

export function paintArrows(pen: Pen, ground: Ground, arrows: readonly Arrow[]): void {
  const { ctx, palette, scale } = pen;
  const perUnit = ARROW_PX / 100 / ARROW_RADIUS;
  ctx.strokeStyle = ctx.fillStyle = palette.ink;
  ctx.lineWidth = 0.95 * scale;
  for (const { from, v } of arrows) {
    if (Math.hypot(...v) < STILL) continue;
    const foot = ground.at(from);
    const tip = ground.at(
      unit([from[0] + v[0] * perUnit, from[1] + v[1] * perUnit, from[2] + v[2] * perUnit]),
    );
    if (foot && tip) arrow(pen, foot, tip);
  }
}

function arrow({ ctx, scale }: Pen, [x1, y1]: XY, [x2, y2]: XY): void {
  const length = Math.hypot(x2 - x1, y2 - y1);
  if (length < 0.5 * scale) return;
  const [ux, uy] = [(x2 - x1) / length, (y2 - y1) / length];
  const head = Math.min(5.5 * scale, Math.max(2 * scale, length * 0.3));
  ctx.beginPath();
  ctx.moveTo(x1, y1);
  ctx.lineTo(x2, y2);
  ctx.moveTo(x2 - ux * head - uy * head * 0.42, y2 - uy * head + ux * head * 0.42);
  ctx.lineTo(x2, y2);
  ctx.lineTo(x2 - ux * head + uy * head * 0.42, y2 - uy * head - ux * head * 0.42);
  ctx.stroke();
  ctx.beginPath();
  ctx.arc(x1, y1, 1 * scale, 0, 2 * Math.PI);
  ctx.fill();
}

/** Answers the box of its figure, or none where it isn't seen. */
export function paintSeparation(pen: Pen, ground: Ground, { from, to, km }: Separation): Box[] {
  const { ctx, palette, scale } = pen;
  const [a, b] = [ground.at(from), ground.at(to)];
  if (!a || !b) return [];
  const [[x1, y1], [x2, y2]] = [a, b];
  const length = Math.hypot(x2 - x1, y2 - y1) || 1;
  const [nx, ny] = [((y1 - y2) / length) * 5 * scale, ((x2 - x1) / length) * 5 * scale];
  ctx.strokeStyle = palette.kelp;
  ctx.lineWidth = 1.3 * scale;
  ctx.beginPath();
  ctx.moveTo(x1, y1);
  ctx.lineTo(x2, y2);
  for (const [x, y] of [
    [x1, y1],
    [x2, y2],
  ] as const) {
    // prettier-ignore
    ctx.moveTo(x - nx, y - ny);
    ctx.lineTo(x + nx, y + ny);
  }
  ctx.stroke();
  const text = km < 1 ? 'in contact' : kilometres(km);
  ctx.font = font(pen, 11.5, 500);
  ctx.textAlign = 'left';
  ctx.textBaseline = 'middle';
  const right = Math.max(x1, x2) + 9 * scale;
  const middle = (y1 + y2) / 2;
  haloText(pen, text, right, middle, palette.kelp);
  return [
    {
      x: right - 2 * scale,
      y: middle - 8 * scale,
      w: ctx.measureText(text).width + 4 * scale,
      h: 16 * scale,
    },
  ];
}

/** The cross under the pointer, in kelp. */
export function paintCursor(pen: Pen, ground: Ground, v: Vec): void {
  const at = ground.at(v);
  if (!at) return;
  const { ctx, palette, scale } = pen;
  const [x, y] = at;
  const [inner, outer] = [5.5 * scale, 11 * scale];
  const trace = () => {
    ctx.beginPath();
    ctx.arc(x, y, inner, 0, 2 * Math.PI);
    for (const [dx, dy] of [
      [1, 0],
      [-1, 0],
      [0, 1],
      [0, -1],
    ] as const) {
      // prettier-ignore
      ctx.moveTo(x + dx * (inner - 2.5 * scale), y + dy * (inner - 2.5 * scale));
      ctx.lineTo(x + dx * outer, y + dy * outer);
    }
    ctx.stroke();
  };
  ctx.strokeStyle = palette.globe;
  ctx.lineWidth = 4 * scale;
  trace();
  ctx.strokeStyle = palette.kelp;
  ctx.lineWidth = 1.5 * scale;
  trace();
}

/** Names of seas and other places, in the serif. Answers the box it took. */
export function paintPlaceName(pen: Pen, ground: Ground, name: string, v: Vec): Box[] {
  const at = ground.at(v);
  if (!at) return [];
  const { ctx, palette, scale } = pen;
  ctx.font = font(pen, 13.5, 400, true);
  ctx.textAlign = 'center';
  ctx.textBaseline = 'middle';
  const [x, y] = at;
  haloText(pen, name, x, y, palette['ink-2']);
  const w = ctx.measureText(name).width;
  return [{ x: x - w / 2, y: y - 9 * scale, w, h: 18 * scale }];
}
