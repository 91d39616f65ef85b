import { KernelError } from '../errors';
import { EARTH_RADIUS_KM, toRadians } from '../sphere/angles';
import { ByteReader, ByteWriter } from './varint';

/** Step of the grid on which longitudes and latitudes travel. */
export const OUTLINE_GRID_DEG = 0.0005;
/** Worst distance of a decoded place from the one encoded: half a step in both directions, at the equator. 39.3 m. */
export const OUTLINE_MAX_ERROR_KM = EARTH_RADIUS_KM * toRadians(OUTLINE_GRID_DEG / 2) * Math.SQRT2;

/** Order is part of the format. */
export const OUTLINE_TYPES = [
  'Point',
  'MultiPoint',
  'LineString',
  'MultiLineString',
  'Polygon',
  'MultiPolygon',
] as const;
export type OutlineType = (typeof OUTLINE_TYPES)[number];

export type Position = readonly [lon: number, lat: number, ...rest: number[]];
type Parts = readonly (readonly Position[])[];

/** The geometries of RFC 7946 without collections, positions as [longitude, latitude] in degrees. */
export type OutlineGeometry =
  | { readonly type: 'Point'; readonly coordinates: Position }
  | { readonly type: 'MultiPoint' | 'LineString'; readonly coordinates: readonly Position[] }
  | { readonly type: 'MultiLineString' | 'Polygon'; readonly coordinates: Parts }
  | { readonly type: 'MultiPolygon'; readonly coordinates: readonly Parts[] };

/** A geometry as flat arrays. A part is a ring, a line, or the points of a (Multi)Point. */
export interface OutlineShape {
  readonly type: OutlineType;
  /** Longitude, latitude of each point, degrees. */
  readonly lonLat: Float64Array;
  /** For each part the index of the point after its last. */
  readonly partEnds: Uint32Array;
  /** For each polygon the index of the part after its last ring; one entry for every other type. */
  readonly polygonEnds: Uint32Array;
}

const FORMAT = 1;

function polygonsOf(geometry: OutlineGeometry): readonly Parts[] {
  switch (geometry.type) {
    case 'Point':
      return [[[geometry.coordinates]]];
    case 'MultiPoint':
    case 'LineString':
      return [[geometry.coordinates]];
    case 'MultiLineString':
    case 'Polygon':
      return [geometry.coordinates];
    case 'MultiPolygon':
      return geometry.coordinates;
  }
}

/**
 * Layout: format 1 and the type as a byte each; then base-128 varints: number of polygons, number of parts of
 * each, number of points of each part; then for every point the zig-zag coded difference of its longitude and
 * latitude from the point before, in steps of the grid (the integer coding of Protocol Buffers).
 * Inverse, within {@link OUTLINE_MAX_ERROR_KM}: {@link decodeOutline} with {@link outlineGeometry}.
 */
export function encodeOutline(geometry: OutlineGeometry): Uint8Array {
  const polygons = polygonsOf(geometry);
  const writer = new ByteWriter();
  writer.byte(FORMAT);
  writer.byte(OUTLINE_TYPES.indexOf(geometry.type));
  writer.varint(polygons.length);
  for (const parts of polygons) writer.varint(parts.length);
  for (const parts of polygons) for (const part of parts) writer.varint(part.length);
  let x = 0;
  let y = 0;
  for (const parts of polygons) {
    for (const part of parts) {
      for (const [lon, lat] of part) {
        const nextX = Math.round(lon / OUTLINE_GRID_DEG);
        const nextY = Math.round(lat / OUTLINE_GRID_DEG);
        writer.zigzag(nextX - x);
        writer.zigzag(nextY - y);
        x = nextX;
        y = nextY;
      }
    }
  }
  return writer.bytes();
}

/** @throws {KernelError} `OutOfRange` for bytes that are no outline, or not the whole of one. */
export function decodeOutline(bytes: Uint8Array): OutlineShape {
  const reader = new ByteReader(bytes);
  const format = reader.byte();
  const type = OUTLINE_TYPES[reader.byte()];
  if (format !== FORMAT || type === undefined) {
    throw new KernelError('OutOfRange', {
      quantity: 'format',
      value: format,
      problem: 'not an encoded outline',
    });
  }
  const polygonEnds = reader.ends(reader.count());
  const partEnds = reader.ends(polygonEnds.at(-1) ?? 0);
  const lonLat = new Float64Array(reader.withinRest(2 * (partEnds.at(-1) ?? 0)));
  let x = 0;
  let y = 0;
  for (let i = 0; i < lonLat.length; i += 2) {
    x += reader.zigzag();
    y += reader.zigzag();
    lonLat[i] = x * OUTLINE_GRID_DEG;
    lonLat[i + 1] = y * OUTLINE_GRID_DEG;
  }
  return { type, lonLat, partEnds, polygonEnds };
}

/** Unit vectors x, y, z of each point, in 32-bit floats: a further 0.4 m at most. */
export function outlineVectors({ lonLat }: OutlineShape): Float32Array {
  const vectors = new Float32Array((lonLat.length / 2) * 3);
  for (let i = 0, o = 0; i < lonLat.length; i += 2, o += 3) {
    const lon = toRadians(lonLat[i]!);
    const lat = toRadians(lonLat[i + 1]!);
    const cosLat = Math.cos(lat);
    vectors[o] = cosLat * Math.cos(lon);
    vectors[o + 1] = cosLat * Math.sin(lon);
    vectors[o + 2] = Math.sin(lat);
  }
  return vectors;
}

/** The geometry of a shape. */
export function outlineGeometry({ type, lonLat, partEnds, polygonEnds }: OutlineShape): OutlineGeometry {
  const parts: Position[][] = [];
  for (let part = 0, point = 0; part < partEnds.length; part++) {
    const positions: Position[] = [];
    for (; point < partEnds[part]!; point++) positions.push([lonLat[2 * point]!, lonLat[2 * point + 1]!]);
    parts.push(positions);
  }
  switch (type) {
    case 'Point':
      return { type, coordinates: parts[0]![0]! };
    case 'MultiPoint':
    case 'LineString':
      return { type, coordinates: parts[0]! };
    case 'MultiLineString':
    case 'Polygon':
      return { type, coordinates: parts };
    case 'MultiPolygon':
      return {
        type,
        coordinates: Array.from(polygonEnds, (end, i) => parts.slice(polygonEnds[i - 1] ?? 0, end)),
      };
  }
}
