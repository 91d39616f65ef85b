/** An outline under edit: its corners as unit vectors in the block's present coordinates, first not repeated. */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { readRing, ringArea, toLatLon } from '../../../kernel/sphere';
import { findCrossing } from '../../interchange/rules/crossings';
import { turn, turnBack, unit, vectorOf, type Vec } from './matrix';

export type Corners = readonly Vec[];

/** Degrees are kept to four decimals: 11 m. */
const rounded = (deg: number): number => Math.round(deg * 1e4) / 1e4;

export const added = (corners: Corners, v: Vec): Corners => [...corners, v];
export const moved = (corners: Corners, i: number, v: Vec): Corners =>
  corners.map((c, k) => (k === i ? v : c));
export const removed = (corners: Corners, i: number): Corners => corners.filter((_, k) => k !== i);

/** A new corner in the middle of the edge from corner i to the next. */
export function split(corners: Corners, i: number): Corners {
  const next = corners[(i + 1) % corners.length];
  const from = corners[i];
  return from && next ? [...corners.slice(0, i + 1), middle(from, next), ...corners.slice(i + 1)] : corners;
}

export const middle = (a: Vec, b: Vec): Vec => unit([a[0] + b[0], a[1] + b[1], a[2] + b[2]]);

/** A corner moved by degrees east and north, not past a pole. */
export function nudged(v: Vec, east: number, north: number): Vec {
  const { lat, lon } = toLatLon(v);
  const to = Math.max(-89.9, Math.min(89.9, lat + north));
  return vectorOf(to, lon + east / Math.max(0.02, Math.cos((to * Math.PI) / 180)));
}

/** From where a corner is seen at an age to the block's present coordinates; `pose` carries the block to that age. Inverse: {@link seen}. */
export const present = (v: Vec, pose: ArrayLike<number> | null): Vec => (pose ? turnBack(pose, v) : v);
export const seen = (v: Vec, pose: ArrayLike<number> | null): Vec => (pose ? turn(pose, v) : v);

/** Positions that corners were read from. */
const asRead = new WeakMap<Vec, Position>();

export const toPosition = (v: Vec): Position => {
  const { lat, lon } = toLatLon(v);
  return asRead.get(v) ?? [rounded(lon), rounded(lat)];
};

/** What keeps the corners from being an outline, in words; null where nothing does. */
export function outlineFault(corners: Corners): string | null {
  if (corners.length < 3) return 'An outline needs three corners or more.';
  const ring = corners.map(toPosition);
  return findCrossing([ring]) ? 'The outline crosses itself.' : null;
}

/** A drawn outline as GeoJSON: closed, anticlockwise. */
export function toPolygon(corners: Corners): Polygon {
  const ring = corners.map(toPosition);
  if (ringArea(readRing(ring)) < 0) ring.reverse();
  return { type: 'Polygon', coordinates: [[...ring, ring[0]!]] };
}

/** Rings of each part: the outer one first, then its holes. */
export type Rings = readonly (readonly Corners[])[];

/** Rings of an outline that is there; corners left where they are keep their positions to the last digit. */
export function ringsOf(geometry: Polygon | MultiPolygon): Rings {
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  return polygons.map((rings) => rings.map((ring) => ring.slice(0, -1).map(keptCorner)));
}

function keptCorner(position: Position): Vec {
  const corner = vectorOf(position[1]!, position[0]!);
  asRead.set(corner, position);
  return corner;
}

/** Inverse of {@link ringsOf}. */
export function toGeometry(rings: Rings): Polygon | MultiPolygon {
  const parts = rings.map((part) => part.map((ring) => closed(ring.map(toPosition))));
  return parts.length === 1
    ? { type: 'Polygon', coordinates: parts[0]! }
    : { type: 'MultiPolygon', coordinates: parts };
}

const closed = (ring: Position[]): Position[] => [...ring, ring[0]!];

export interface RingPlace {
  readonly part: number;
  readonly ring: number;
}

export const ringAt = (rings: Rings, { part, ring }: RingPlace): Corners => rings[part]?.[ring] ?? [];

export const withRing = (rings: Rings, at: RingPlace, corners: Corners): Rings =>
  rings.map((part, p) => (p === at.part ? part.map((ring, r) => (r === at.ring ? corners : ring)) : part));

/** "Part 2, hole 1" for each ring, in their order. */
export const ringNames = (rings: Rings): { readonly at: RingPlace; readonly name: string }[] =>
  rings.flatMap((part, p) =>
    part.map((_, r) => ({
      at: { part: p, ring: r },
      name: `Part ${p + 1}${r > 0 ? `, hole ${r}` : ''}`,
    })),
  );
