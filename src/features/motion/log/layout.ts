/** Where the log's strips stand, CSS pixels. All share one age axis. */
export type StripId = 'age' | 'rotations' | 'latitude' | 'speed';

export interface Strip {
  readonly id: StripId;
  readonly x: number;
  readonly width: number;
}

/**
 * How the headings stand: in full; low, title and unit on one line, for a phone; plain, without legends or rule, for
 * reading only, the chart's edition below its column.
 */
export type Heading = 'full' | 'low' | 'plain';

export interface LogLayout {
  readonly heading: Heading;
  readonly width: number;
  readonly height: number;
  /** Height of the headings; the rule below them. */
  readonly head: number;
  /** y of 0 Ma and of the oldest age. */
  readonly top: number;
  readonly bottom: number;
  readonly oldest: number;
  readonly strips: readonly Strip[];
}

/** Height of each kind of heading. */
export const HEADS: Readonly<Record<Heading, number>> = { full: 85, low: 62, plain: 57 };
const BELOW_HEAD = 7;
const FOOT: Readonly<Record<Heading, number>> = { full: 12, low: 12, plain: 26 };
const AGE = 88;
export const LINK_PITCH = 43;
const LINK_MARGIN = 12;
const SPEED = { least: 84, most: 150, share: 0.2 } as const;

interface Asked {
  readonly width: number;
  readonly height: number;
  readonly oldest: number;
  readonly heading?: Heading;
  /** Instead of the heading's own height. */
  readonly head?: number;
  readonly links: number;
  readonly strips: readonly StripId[];
}

/** Latitude takes what the others leave; a lone strip takes all. */
export function layoutOf({
  width,
  height,
  oldest,
  heading = 'full',
  head = HEADS[heading],
  links,
  strips,
}: Asked): LogLayout {
  const room = width - AGE;
  const others = strips.filter((id) => id !== 'age');
  const fixed: Partial<Record<StripId, number>> = {
    age: AGE,
    rotations: Math.min(room / 2, LINK_MARGIN + LINK_PITCH * Math.max(3, links)),
    speed: Math.min(SPEED.most, Math.max(SPEED.least, SPEED.share * width)),
  };
  if (others.length === 1 && others[0]) fixed[others[0]] = room;
  const taken = strips.reduce((sum, id) => sum + (fixed[id] ?? 0), 0);
  let x = 0;
  const placed = strips.map((id): Strip => {
    const strip = { id, x, width: fixed[id] ?? Math.max(80, width - taken) };
    x += strip.width;
    return strip;
  });
  return {
    heading,
    width,
    height,
    head,
    top: head + BELOW_HEAD,
    bottom: height - FOOT[heading],
    oldest,
    strips: placed,
  };
}

/** To a hundredth of a pixel: server and browser may differ in a sine's last digit, and both draw the same page. */
export const hundredth = (px: number): number => Math.round(px * 100) / 100;

/** y of an age. Inverse: `ageAt`. */
export const yOf = ({ top, bottom, oldest }: LogLayout, age: number): number =>
  hundredth(top + (age / oldest) * (bottom - top));

export const ageAt = ({ top, bottom, oldest }: LogLayout, y: number): number =>
  Math.min(oldest, Math.max(0, ((y - top) / (bottom - top)) * oldest));
