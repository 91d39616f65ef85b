import type { MultiPolygon, Polygon } from 'geojson';
import type { Ledger } from '~/features/ledger/read';
import { loadShapes } from '~/features/ledger/shapes';
import { holdsAt } from '~/kernel/rotations/circuit';
import type { Vector3 } from '~/kernel/rotations/types';
import { boundingCap, type Cap } from '~/kernel/sphere/cap';
import { contains } from '~/kernel/sphere/contains';
import { readRing, type Inside, type Polygon as Rings } from '~/kernel/sphere/ring';
import { dot } from '~/kernel/sphere/vector';

interface Part {
  readonly rings: Rings;
  /** Holds the whole part; null where the larger side of the outer ring is meant. */
  readonly cap: Cap | null;
}

/** An outline of a block as unit vectors in present coordinates. */
export interface LoadedOutline {
  readonly block: string;
  readonly sha256: string;
  readonly inside: Inside;
  readonly parts: readonly Part[];
  /** It holds for younger_ma < age ≤ older_ma; null where it has no such end. */
  readonly older_ma: number | null;
  readonly younger_ma: number | null;
  readonly holdsAt: (age_ma: number) => boolean;
}

const loaded = new WeakMap<Ledger['outlines'], Promise<LoadedOutline[]>>();

/** All outlines of a state, read once for as long as the state stays loaded. */
export function outlinesOf({ outlines }: Pick<Ledger, 'outlines'>): Promise<LoadedOutline[]> {
  const found = loaded.get(outlines) ?? read(outlines);
  loaded.set(outlines, found);
  return found;
}

async function read(outlines: Ledger['outlines']): Promise<LoadedOutline[]> {
  const shapeOf = await loadShapes(outlines.map(({ sha256 }) => sha256));
  return outlines.map(({ block, sha256, inside, outline_older_ma, outline_younger_ma }) => {
    const { type, coordinates } = shapeOf(sha256) as Polygon | MultiPolygon;
    const polygons = type === 'Polygon' ? [coordinates] : coordinates;
    const parts = polygons.map((rings): Part => {
      const vectors = rings.map((ring) => readRing(ring));
      return { rings: vectors, cap: inside === 'smaller' ? boundingCap(vectors[0] ?? []) : null };
    });
    return {
      block,
      sha256,
      inside,
      parts,
      older_ma: outline_older_ma,
      younger_ma: outline_younger_ma,
      holdsAt: (age_ma) => holdsAt(outline_older_ma, outline_younger_ma, age_ma),
    };
  });
}

/** Whether a present position lies within an outline. */
export const holds = ({ parts, inside }: LoadedOutline, present: Vector3): boolean =>
  parts.some(
    ({ rings, cap }) =>
      (!cap || dot(cap.centre, present) >= cap.cosRadius - 1e-9) && contains(rings, present, inside),
  );
