import { holdsAt } from '../rotations/circuit';
import type { Vector3 } from '../rotations/types';
import { areaKm2, halvesSphere, ringArea } from '../sphere/area';
import { contains } from '../sphere/contains';
import type { Inside, Polygon, Ring } from '../sphere/ring';

export interface OutlinePart {
  readonly polygon: Polygon;
  /** Which side of the outer ring is meant. */
  readonly inside: Inside;
}

/**
 * What a block covers, in its present coordinates: parts that do not overlap each other, edges great circles
 * shorter than 180°. What is worked out of one is remembered by identity: do not change it after asking.
 */
export type Outline = readonly OutlinePart[];

/** An outline for a part of a block’s life: disappears_ma < age ≤ appears_ma, null where it has no such end. */
export interface DatedOutline {
  readonly outline: Outline;
  readonly appears_ma: number | null;
  readonly disappears_ma: number | null;
}

const joined = new WeakMap<readonly DatedOutline[], Map<string, Outline>>();

/**
 * The outline that holds at an age, all parts of them where several do, null where none does. The same object
 * for the same ones, so that what is remembered of it is found again.
 */
export function outlineAt(outlines: readonly DatedOutline[], age_ma: number): Outline | null {
  const holding = outlines.filter((o) => holdsAt(o.appears_ma, o.disappears_ma, age_ma));
  const [first] = holding;
  if (!first) return null;
  if (holding.length === 1) return first.outline;
  const known = joined.get(outlines) ?? new Map<string, Outline>();
  joined.set(outlines, known);
  const key = holding.map((outline) => outlines.indexOf(outline)).join(' ');
  const made = known.get(key) ?? holding.flatMap(({ outline }) => outline);
  known.set(key, made);
  return made;
}

/** Whether an outline holds a present position, its edges included. */
export const outlineHolds = (outline: Outline, present: Vector3): boolean =>
  outline.some(({ polygon, inside }) => contains(polygon, present, inside));

const areas = new WeakMap<Outline, number>();

/** Area of an outline, km². */
export function outlineAreaKm2(outline: Outline): number {
  const area =
    areas.get(outline) ?? outline.reduce((sum, { polygon, inside }) => sum + areaKm2(polygon, inside), 0);
  areas.set(outline, area);
  return area;
}

/** Every ring of a part, each turned so that what is meant lies on its left; rings of under three corners left out. */
export const ringsWithInsideLeft = ({ polygon, inside }: OutlinePart): Ring[] =>
  polygon.flatMap((ring, i) => {
    if (ring.length < 3) return [];
    const signed = ringArea(ring);
    const smaller = i === 0 && (inside === 'smaller' || halvesSphere(signed));
    return [signed > 0 === smaller ? ring : ring.toReversed()];
  });
