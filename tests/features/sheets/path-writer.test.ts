/** The quick way of writing outlines against d3-geo's own paths: no vertex further apart than the stated bound. */
import { geoPath } from 'd3-geo';
import type { MultiPolygon } from 'geojson';
import { describe, expect, it } from 'vitest';
import { pathWriter, STRAIGHT_EDGE_DEG } from '~/features/sheets/slice/path-writer';
import { fitProjection, PROJECTION_NAMES } from '~/kernel/cartography/projections';

const box = { x: 0, y: 0, width: 1190, height: 595 };
const blob = (lon: number, lat: number, r: number, n: number): MultiPolygon => {
  const ring = Array.from({ length: n }, (_, i) => [
    lon + (r * Math.sin((2 * Math.PI * i) / n)) / Math.cos((lat * Math.PI) / 180),
    lat + r * Math.cos((2 * Math.PI * i) / n),
  ]);
  return { type: 'MultiPolygon', coordinates: [[[...ring, ring[0]!]]] };
};
const points = (d: string): number[][] =>
  (d.match(/-?[\d.]+,-?[\d.]+/g) ?? []).map((pair) => pair.split(',').map(Number));
/** Greatest distance of a vertex of one path from the nearest vertex or edge of the other. */
function apart(a: number[][], b: number[][]): number {
  const toSegment = ([x, y]: number[], [p, q]: number[], [r, s]: number[]): number => {
    const [dx, dy] = [r! - p!, s! - q!];
    const t = Math.max(0, Math.min(1, ((x! - p!) * dx + (y! - q!) * dy) / (dx * dx + dy * dy || 1)));
    return Math.hypot(x! - p! - t * dx, y! - q! - t * dy);
  };
  return Math.max(...a.map((v) => Math.min(...b.map((w, i) => toSegment(v, w, b[(i + 1) % b.length]!)))));
}

describe('outlines on a map', () => {
  it.each(PROJECTION_NAMES)('%s: written and cut alike', (name) => {
    const projection = fitProjection(name, { lat: name === 'polar-stereographic' ? -90 : 12, lon: 35 }, box);
    const write = pathWriter(projection);
    const lat = name === 'polar-stereographic' ? -55 : 18;
    for (const shape of [blob(50, lat, 12, 64), blob(30, lat + 9, 20, 200), blob(-140, lat, 15, 90)]) {
      const expected = points(geoPath(projection).digits(2)(shape) ?? '');
      const drawn = points(write(shape));
      if (expected.length === 0) expect(drawn).toEqual([]);
      else expect(Math.max(apart(drawn, expected), apart(expected, drawn))).toBeLessThan(0.1);
    }
  });

  it('leaves to d3-geo what crosses the seam, holds a pole or has long edges', () => {
    const projection = fitProjection('equal-earth', { lat: 0, lon: 0 }, box);
    const write = pathWriter(projection);
    const path = geoPath(projection).digits(2);
    const square: MultiPolygon = { type: 'MultiPolygon', coordinates: [[[[0, 0], [0, 30], [40, 30], [40, 0], [0, 0]]]] }; // prettier-ignore
    const pole: MultiPolygon = {
      type: 'MultiPolygon',
      coordinates: [[Array.from({ length: 181 }, (_, i) => [2 * i, 70])]],
    };
    for (const shape of [blob(175, 10, 12, 64), square, pole]) expect(write(shape)).toBe(path(shape));
    expect(STRAIGHT_EDGE_DEG).toBeLessThan(40);
  });
});
