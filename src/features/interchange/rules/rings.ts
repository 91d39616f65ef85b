/**
 * Checks rings of [longitude, latitude] before they become outlines: enough points, closed, in range, clear of
 * themselves and one another. Edges are great circles. Longitudes may run past 180° or jump there; vectors do not see it.
 */
import { contains, readRing, ringArea, toVector, type Inside } from '../../../kernel/sphere';
import { samePlace } from '../../ledger/same-place';
import { findCrossing, type Crossing } from './crossings';
import type { Vector3 } from '../../../kernel/rotations/types';

export type Ring = readonly (readonly number[])[];

export interface RingFault {
  readonly read: string;
  readonly problem: string;
  readonly hint: string;
}

const point = (p: readonly number[]): string => `[${p[0]}, ${p[1]}]`;

export function ringFault(ring: unknown): RingFault | null {
  if (!Array.isArray(ring))
    return {
      read: String(ring),
      problem: 'a ring is not a list of positions',
      hint: 'Save the file as GeoJSON again.',
    };
  const bad = ring.findIndex((p) => !isPosition(p));
  if (bad >= 0) {
    return {
      read: JSON.stringify(ring[bad]),
      problem: `position ${bad + 1} is not two numbers`,
      hint: 'Write [longitude, latitude].',
    };
  }
  const positions = ring as Ring;
  const first = positions[0];
  const last = positions[positions.length - 1];
  if (!first || !last || positions.length < 4) {
    return {
      read: `${positions.length} positions`,
      problem: 'a ring needs four positions or more',
      hint: 'Give at least three corners and repeat the first.',
    };
  }
  const beyond = positions.find((p) => Math.abs(p[1]!) > 90 || Math.abs(p[0]!) > 540);
  if (beyond) {
    return {
      read: point(beyond),
      problem: 'a position off the globe',
      hint: 'Positions are [longitude, latitude]: latitude within 90°.',
    };
  }
  if (!samePlace(first, last)) {
    return {
      read: `${point(first)} … ${point(last)}`,
      problem: 'the ring is not closed',
      hint: 'Repeat the first position at the end.',
    };
  }
  const crossing = findCrossing([positions]);
  return crossing ? crossingFault([positions], crossing) : degenerateFault(positions);
}

/** Faults of a polygon whose rings have none by themselves: rings that cross, holes outside their outer ring. */
export function polygonFault(rings: readonly Ring[], inside: Inside): RingFault | null {
  const crossing = rings.length > 1 ? findCrossing(rings) : null;
  if (crossing) return crossingFault(rings, crossing);
  const [outer, ...holes] = rings.map(readRing);
  const stray = outer
    ? holes.findIndex((hole) => !someOf(hole).every((v) => contains([outer], v, inside)))
    : -1;
  if (stray < 0) return null;
  return {
    read: `hole ${stray + 1}, from ${point(rings[stray + 1]![0]!)}`,
    problem: 'a hole lies outside the outline that it is in',
    hint: 'Make it a part of its own in a MultiPolygon, or take it out.',
  };
}

/** Of rings that do not cross, a few corners tell where the whole lies; one alone may touch. */
const someOf = (hole: readonly Vector3[]): Vector3[] =>
  [0, 1 / 3, 2 / 3].flatMap((share) => {
    const corner = hole[Math.floor(share * hole.length)];
    return corner ? [corner] : [];
  });

export function crossingFault(rings: readonly Ring[], { first, second }: Crossing): RingFault {
  const at = ({ ring, edge }: Crossing['first']): string => point(rings[ring]![edge]!);
  if (first.ring === second.ring) {
    return {
      read: at(first),
      problem: `the ring crosses itself: edge ${first.edge + 1} meets edge ${second.edge + 1} near ${at(second)}`,
      hint: 'Move or remove a vertex there, or split the outline into parts.',
    };
  }
  return {
    read: at(first),
    problem: `two rings of the outline cross: ${first.ring + 1} and ${second.ring + 1} near ${at(second)}`,
    hint: 'Holes lie within their outer ring, and parts keep clear of one another.',
  };
}

/** sr; some 40 m² on the Earth. */
const NOTHING_SR = 1e-12;
/** Cosine of nearly half a turn. */
const OPPOSITE = -1 + 1e-12;

/** Rings of great circles that enclose nothing, or whose edges could run anywhere. */
function degenerateFault(positions: Ring): RingFault | null {
  const vectors = positions.map((p) => toVector(p[1]!, p[0]!));
  const opposite = vectors.findIndex((v, i) => i > 0 && dot(v, vectors[i - 1]!) < OPPOSITE);
  if (opposite > 0)
    return {
      read: `${point(positions[opposite - 1]!)} to ${point(positions[opposite]!)}`,
      problem: 'an edge joins opposite points of the globe',
      hint: 'Add a vertex between them, to say which way it goes.',
    };
  if (Math.abs(ringArea(readRing(positions))) > NOTHING_SR) return null;
  return {
    read: `${positions.length} positions`,
    problem: 'the ring encloses nothing',
    hint: 'Edges are great circles: round a pole, give a vertex every 90° of longitude or less.',
  };
}

const isPosition = (p: unknown): boolean =>
  Array.isArray(p) && p.length >= 2 && Number.isFinite(p[0]) && Number.isFinite(p[1]);

const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
