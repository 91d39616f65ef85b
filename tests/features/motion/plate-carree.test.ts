/** Exported geometry. Areas on the sphere are d3-geo's, a library apart from the one that is tested. */
import { geoArea } from 'd3-geo';
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { describe, expect, it } from 'vitest';
import { flatten } from '~/features/motion/plate-carree';

const box = (w: number, s: number, e: number, n: number): Position[] => [[w, s], [w, n], [e, n], [e, s], [w, s]]; // prettier-ignore
const EARTH_KM2 = 6371.0088 ** 2;

/** Clockwise, as d3-geo reads the rings of RFC 7946 the other way round. */
const spherical = (geometry: Polygon | MultiPolygon): Polygon | MultiPolygon => ({
  ...geometry,
  coordinates: (geometry.type === 'Polygon'
    ? geometry.coordinates.map((ring) => ring.toReversed())
    : geometry.coordinates.map((rings) => rings.map((ring) => ring.toReversed()))) as never,
});

describe('geometry for longitude and latitude', () => {
  const hole = box(5, 5, 15, 10).toReversed();
  it.each<[string, Polygon | MultiPolygon, parts: number]>([
    ['with a hole', { type: 'Polygon', coordinates: [box(0, 0, 20, 20), hole] }, 1],
    ['over the antimeridian', { type: 'Polygon', coordinates: [box(170, -10, 190, 10)] }, 2],
    [
      'of two parts',
      { type: 'MultiPolygon', coordinates: [[box(0, 0, 20, 20), hole], [box(40, 0, 50, 9)]] },
      2,
    ],
    ['the larger side of a ring', { type: 'Polygon', coordinates: [box(0, 0, 20, 20).toReversed()] }, 1],
  ])('keeps its area and its holes: %s', (_, geometry, parts) => {
    const flat = flatten(geometry) as Polygon | MultiPolygon;
    const polygons = flat.type === 'Polygon' ? [flat.coordinates] : flat.coordinates;
    expect(polygons).toHaveLength(parts);
    const before = geoArea(geometry) * EARTH_KM2;
    const after = geoArea(spherical(flat)) * EARTH_KM2;
    // Straight edges stray from great circles by 0.006° at most; the outlines are some 10,000 km long.
    expect(Math.abs(after - before)).toBeLessThan(0.006 * 111.2 * 10_000);
  });

  it('has outer rings anticlockwise and holes clockwise (RFC 7946, 3.1.6)', () => {
    const { coordinates } = flatten({ type: 'Polygon', coordinates: [box(0, 0, 20, 20), hole] }) as Polygon;
    const turn = (ring: Position[]): number =>
      ring.slice(1).reduce((sum, [x, y], i) => sum + ring[i]![0]! * y! - x! * ring[i]![1]!, 0);
    expect(coordinates.map((ring) => Math.sign(turn(ring)))).toEqual([1, -1]);
  });
});
