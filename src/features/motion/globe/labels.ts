/**
 * Where labels stand: each tries its places in order and takes the first that covers no other label and nothing that
 * must stay readable. A label keeps the place it had in the last picture while it can, so that names don't jump while
 * the age line moves.
 */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}

export interface LabelWish {
  readonly key: string;
  /** Lower comes first. */
  readonly priority: number;
  /** Top left corner, width and height of each place it could take, the best first. */
  readonly places: readonly Box[];
  /** Shown in its best place even where that covers something. */
  readonly must?: boolean;
}

const overlap = (a: Box, b: Box): boolean =>
  a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h;

/** Index of each label's place, by key; a label without room is left out. */
export function placeLabels(
  wishes: readonly LabelWish[],
  obstacles: readonly Box[],
  bounds: Box,
  last: ReadonlyMap<string, number> = new Map(),
): Map<string, number> {
  const taken = [...obstacles];
  const placed = new Map<string, number>();
  const inside = ({ x, y, w, h }: Box) =>
    x >= bounds.x && y >= bounds.y && x + w <= bounds.x + bounds.w && y + h <= bounds.y + bounds.h;
  for (const wish of [...wishes].sort((a, b) => a.priority - b.priority)) {
    const before = last.get(wish.key);
    const order = wish.places.map((_, i) => i);
    if (before !== undefined && before < order.length) order.unshift(...order.splice(before, 1));
    const free = order.find((i) => {
      const box = wish.places[i] as Box;
      return inside(box) && !taken.some((other) => overlap(box, other));
    });
    const index = free ?? (wish.must ? 0 : undefined);
    const box = index === undefined ? undefined : wish.places[index];
    if (index === undefined || !box) continue;
    placed.set(wish.key, index);
    taken.push(box);
  }
  return placed;
}
