import canonicalize from 'canonicalize';
import type { FieldError } from '~/server/problem';
import { samePlace } from './same-place';
import type { OutlineGeometry, Position } from '~/kernel/cartography/outline-codec';
import { sha256 } from '~/server/secrets';

/** The most vertices of one geometry. */
export const MAX_VERTICES = 500_000;

const DEPTH = {
  Point: 0,
  MultiPoint: 1,
  LineString: 1,
  MultiLineString: 2,
  Polygon: 2,
  MultiPolygon: 3,
} as const;
const LEAST = {
  Point: 1,
  MultiPoint: 1,
  LineString: 2,
  MultiLineString: 2,
  Polygon: 4,
  MultiPolygon: 4,
} as const;

interface RawGeometry {
  readonly type: keyof typeof DEPTH;
  readonly coordinates: readonly unknown[];
}

export interface CheckedGeometry {
  readonly geometry: OutlineGeometry;
  readonly vertices: number;
  /** Identity: SHA-256 of the canonical JSON (RFC 8785) of type and coordinates. */
  readonly sha256: string;
}

/**
 * Checks positions, lengths and closure. Nothing is changed: a ring that is open, or a place that cannot be, is
 * answered as an error.
 */
export function checkGeometry({ type, coordinates }: RawGeometry): CheckedGeometry | FieldError {
  let vertices = 0;
  const isRing = type === 'Polygon' || type === 'MultiPolygon';

  const walk = (value: unknown, depth: number, path: string): FieldError | null => {
    if (depth === 0) {
      vertices++;
      return placeError(value, path);
    }
    if (!Array.isArray(value) || value.length === 0)
      return { path, read: shown(value), problem: 'a list of positions is expected' };
    for (const [i, item] of value.entries()) {
      const error = walk(item, depth - 1, `${path}.${i}`);
      if (error) return error;
    }
    return depth === 1 ? partError(value as Position[], path) : null;
  };
  const partError = (part: readonly Position[], path: string): FieldError | null => {
    if (part.length < LEAST[type]) {
      return { path, read: `${part.length} positions`, problem: `at least ${LEAST[type]} are needed` };
    }
    const [first, last] = [part[0]!, part.at(-1)!];
    return isRing && !samePlace(first, last)
      ? {
          path,
          read: shown(last),
          problem: 'the ring does not end where it starts',
          hint: 'Repeat the first position at the end.',
        }
      : null;
  };

  const error = walk(coordinates, DEPTH[type], 'coordinates');
  if (error) return error;
  if (vertices > MAX_VERTICES) {
    return {
      path: 'coordinates',
      read: `${vertices} positions`,
      problem: `at most ${MAX_VERTICES} are stored in one geometry`,
    };
  }
  const geometry = { type, coordinates } as OutlineGeometry;
  return { geometry, vertices, sha256: sha256(canonicalize(geometry)!) };
}

const shown = (value: unknown): string => (JSON.stringify(value) ?? '').slice(0, 80);

function placeError(value: unknown, path: string): FieldError | null {
  if (Array.isArray(value) && value.length > 2 && value.every(Number.isFinite)) {
    const hint = 'Leave the height out: outlines lie on the sphere.';
    return { path, read: shown(value), problem: 'a position with a height', hint };
  }
  if (!Array.isArray(value) || value.length !== 2 || !value.every(Number.isFinite)) {
    return { path, read: shown(value), problem: 'a position is [longitude, latitude] in degrees' };
  }
  const [lon, lat] = value as [number, number];
  if (Math.abs(lat) > 90) {
    return {
      path,
      read: shown(value),
      problem: 'latitude outside ±90°',
      hint: 'Latitude and longitude swapped? Longitude comes first.',
    };
  }
  if (Math.abs(lon) > 540) return { path, read: shown(value), problem: 'longitude outside ±540°' };
  return null;
}

export const isFieldError = (checked: CheckedGeometry | FieldError): checked is FieldError =>
  'problem' in checked;
