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

/** A name that would stand on other blocks by more than this share is left out. */
const MOST_COVERED = 0.5;

export const overlap = (a: Box, b: Box): boolean =>
  a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h;

const shared = (a: Box, b: Box): number =>
  Math.max(0, Math.min(a.x + a.w, b.x + b.w) - Math.max(a.x, b.x)) *
  Math.max(0, Math.min(a.y + a.h, b.y + b.h) - Math.max(a.y, b.y));

/**
 * Index of each label's place, by key; a label without room is left out. `soft` boxes (other blocks) may be covered,
 * but of the free places the one that covers least of them is taken.
 */
export function placeLabels(
  wishes: readonly LabelWish[],
  obstacles: readonly Box[],
  fits: (box: Box) => boolean,
  last: ReadonlyMap<string, number> = new Map(),
  soft: readonly (Box & { readonly key: string })[] = [],
): Map<string, number> {
  const taken = [...obstacles];
  const placed = new Map<string, number>();
  for (const wish of [...wishes].sort((a, b) => a.priority - b.priority)) {
    const before = last.get(wish.key);
    const order = wish.places.map((_, i) => i);
    if (before !== undefined && before < order.length) order.unshift(...order.splice(before, 1));
    const covered = (box: Box) =>
      soft.reduce((sum, other) => sum + (other.key === wish.key ? 0 : shared(box, other)), 0) /
      (box.w * box.h);
    const free = order
      .filter((i) => {
        const box = wish.places[i] as Box;
        return fits(box) && !taken.some((other) => overlap(box, other));
      })
      .map((i) => ({ i, cost: covered(wish.places[i] as Box) }))
      .filter(({ cost }) => wish.must || cost < MOST_COVERED)
      // What covers little is as good as free; the sort is stable, so the wish's own order decides.
      .sort((a, b) => Math.max(0.1, a.cost) - Math.max(0.1, b.cost))[0]?.i;
    const index = free ?? (wish.must ? 0 : undefined);
    const box = index === undefined ? undefined : wish.places[index];
    if (index === undefined || !box) continue;
    placed.set(wish.key, index);
    taken.push(box);
  }
  return placed;
}
