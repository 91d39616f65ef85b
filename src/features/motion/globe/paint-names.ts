/** Names of blocks: inside where there is room, beside where there is not, on two lines near the limb. */
import type { Extent } from './block-extent';
import type { Kept } from './paint-track';
import { placeLabels, type Box, type LabelWish } from './labels';
import { font, haloText, type Pen } from './pen';

export interface NameWish {
  readonly key: string;
  readonly name: string;
  readonly extent: Extent;
  readonly selected: boolean;
}

const SIZE = 11.5;
const LINE = 13;

interface Setting {
  readonly lines: readonly string[];
  readonly box: Box;
}

function settings(pen: Pen, { name, extent, selected }: NameWish): Setting[] {
  const { ctx, scale } = pen;
  ctx.font = font(pen, SIZE, selected ? 600 : 500);
  const width = (lines: readonly string[]) => Math.max(...lines.map((line) => ctx.measureText(line).width));
  const one = [name];
  const cut = name.lastIndexOf(' ');
  const two = cut > 0 ? [name.slice(0, cut), name.slice(cut + 1)] : one;
  const at = (lines: readonly string[], x: number, y: number): Setting => {
    const w = width(lines) + 4 * scale;
    const h = lines.length * LINE * scale;
    return { lines, box: { x: x - w / 2, y: y - h / 2, w, h } };
  };
  const w1 = width(one);
  const gap = 8 * scale;
  const middle = (extent.left + extent.right) / 2;
  const room = extent.right - extent.left;
  const tall = extent.bottom - extent.top;
  const beside = [
    at(one, extent.x, extent.bottom + gap),
    at(one, extent.x, extent.top - gap),
    at(one, middle - room / 4, extent.top - gap),
    at(one, middle + room / 4, extent.top - gap),
    at(one, extent.right + w1 / 2 + gap, extent.y),
    at(one, extent.left - w1 / 2 - gap, extent.y),
  ];
  const within = [
    at(one, extent.x, extent.y),
    at(one, extent.x, extent.y - tall / 5),
    at(one, extent.x, extent.y + tall / 5),
    at(one, extent.x - room / 6, extent.y - tall / 4),
    at(one, extent.x + room / 6, extent.y + tall / 4),
  ];
  const narrow = [at(two, extent.x, extent.y), at(two, extent.x, extent.y + tall / 6)];
  if (selected) {
    const flush = [extent.left + w1 / 2, extent.right - w1 / 2].flatMap((x) => [
      at(one, x, extent.top - gap),
      at(one, x, extent.bottom + gap),
    ]);
    const above = [1, -1].map((side) => at(one, middle + side * (w1 / 2 + 4 * scale), extent.top - gap));
    return [...beside.slice(1, 4), ...flush, ...above, beside[0] as Setting, ...beside.slice(4), ...within];
  }
  if (w1 < room * 0.8 && tall > 3 * LINE * scale) return [...within, ...beside];
  if (width(two) < room * 0.9 && tall > 4 * LINE * scale) return [...narrow, ...beside];
  return [...beside, ...narrow];
}

/** Paints names and answers the boxes they took; `memory` carries places from picture to picture. */
export function paintNames(
  pen: Pen,
  wishes: readonly NameWish[],
  { clear, avoid }: Kept,
  fits: (box: Box) => boolean,
  memory: Map<string, number>,
): Box[] {
  const { ctx, palette, scale } = pen;
  const set = new Map(wishes.map((wish) => [wish.key, settings(pen, wish)]));
  const labels: LabelWish[] = wishes.map((wish) => ({
    key: wish.key,
    priority: wish.selected ? 0 : 1 / (1 + (wish.extent.right - wish.extent.left)),
    places: (set.get(wish.key) ?? []).map(({ box }) => box),
    must: wish.selected,
  }));
  const others = wishes.map(({ key, extent: { left, right, top, bottom } }) => {
    return { key, x: left, y: top, w: right - left, h: bottom - top };
  });
  const soft = [...others, ...avoid.map((box) => ({ ...box, key: '' }))];
  const placed = placeLabels(labels, clear, fits, memory, soft);
  memory.clear();
  for (const [key, index] of placed) memory.set(key, index);
  ctx.textAlign = 'center';
  ctx.textBaseline = 'middle';
  return wishes.flatMap((wish) => {
    const index = placed.get(wish.key);
    const setting = index === undefined ? undefined : set.get(wish.key)?.[index];
    if (!setting) return [];
    ctx.font = font(pen, SIZE, wish.selected ? 600 : 500);
    const { lines, box } = setting;
    lines.forEach((line, i) => {
      const y = box.y + (i + 0.5) * LINE * scale;
      haloText(pen, line, box.x + box.w / 2, y, wish.selected ? palette['ochre-ink'] : palette.ink);
    });
    return [box];
  });
}
