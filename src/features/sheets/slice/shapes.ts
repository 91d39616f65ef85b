/**
 * Outlines and lines of a state, carried to an age: present positions in, GeoJSON on the sphere out. Rings are wound
 * as d3-geo reads them (clockwise round the inside), whichever way they were entered.
 */
import type { Geometry, MultiLineString, MultiPolygon, Polygon, Position } from 'geojson';
import { readRing, toLatLon, toVector, woundRing } from '../../../kernel/sphere';
import { rotate } from '../../../kernel/rotations';
import type { Quaternion, Vector3 } from '../../../kernel/rotations/types';

type Rings = readonly (readonly Vector3[])[];

/** Polygons as unit vectors, outer ring first, each ring clockwise round what it holds (holes the other way). */
export function polygonVectors(geometry: Polygon | MultiPolygon, inside: 'smaller' | 'larger'): Rings[] {
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  return polygons.map((rings) =>
    rings.map((ring, i) =>
      woundRing(readRing(ring), i === 0 && inside === 'smaller' ? 'clockwise' : 'anticlockwise'),
    ),
  );
}

const position = (v: Vector3, q: Quaternion): Position => {
  const { lat, lon } = toLatLon(rotate(q, v));
  return [lon, lat];
};

/** A MultiPolygon at an age, rings closed, great-circle edges, wound for d3-geo. */
export function carryPolygons(polygons: readonly Rings[], q: Quaternion): MultiPolygon {
  const coordinates = polygons.map((rings) =>
    rings.map((ring) => {
      const positions = ring.map((v) => position(v, q));
      return [...positions, positions[0]!];
    }),
  );
  return { type: 'MultiPolygon', coordinates };
}

/** Lines of a feature as unit vectors; areas give their rings, points nothing. */
export function lineVectors(geometry: Geometry): Vector3[][] {
  const read = (line: Position[]): Vector3[] => line.map(([lon, lat]) => toVector(lat!, lon!));
  switch (geometry.type) {
    case 'LineString':
      return [read(geometry.coordinates)];
    case 'MultiLineString':
    case 'Polygon':
      return geometry.coordinates.map(read);
    case 'MultiPolygon':
      return geometry.coordinates.flat().map(read);
    default:
      return [];
  }
}

export function carryLines(lines: readonly (readonly Vector3[])[], q: Quaternion): MultiLineString {
  return { type: 'MultiLineString', coordinates: lines.map((line) => line.map((v) => position(v, q))) };
}
