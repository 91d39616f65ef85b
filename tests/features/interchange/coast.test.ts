/** Cutting coastlines. Expected parts follow from geometry; the coast is Natural Earth 1:50 million in world-atlas 2.0.2. */
import { readFileSync } from 'node:fs';
import { geoContains } from 'd3-geo';
import { feature, mesh } from 'topojson-client';
import type { GeometryObject, Topology } from 'topojson-specification';
import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { coastVectors, CUT_ERROR_KM, cutCoast } from '~/features/interchange/rules/cut-coast';
import { readRing } from '~/kernel/sphere';

const KM_PER_DEG = (6371.0088 * Math.PI) / 180;
const box = (w: number, s: number, e: number, n: number) => [readRing([[w, s], [e, s], [e, n], [w, n], [w, s]])]; // prettier-ignore

describe('a coast cut by an outline', () => {
  it('keeps what is inside and ends on the outline', () => {
    // Along the equator the box's sides are the meridians 10 and 20, whatever its top and bottom.
    const line = coastVectors([[[0, 0], [7, 0], [13, 0], [16, 0], [26, 0], [30, 0]]]); // prettier-ignore
    const parts = cutCoast(line, box(10, -5, 20, 5), 'smaller');
    expect(parts).toHaveLength(1);
    expect(parts[0]!.map(([lon]) => Math.round(lon * 100) / 100)).toEqual([10, 13, 16, 20]);
    for (const end of [parts[0]![0]![0] - 10, parts[0]!.at(-1)![0] - 20])
      expect(Math.abs(end) * KM_PER_DEG).toBeLessThan(CUT_ERROR_KM);
  });

  it('leaves and comes back, and takes the other side when that is meant', () => {
    const line = coastVectors([[[12, 0], [25, 1], [15, 2], [13, 3]]]); // prettier-ignore
    expect(cutCoast(line, box(10, -5, 20, 5), 'smaller')).toHaveLength(2);
    const outer = cutCoast(line, box(10, -5, 20, 5), 'larger');
    expect(outer).toHaveLength(1);
    expect(outer[0]!.every(([lon]) => lon > 19.99)).toBe(true);
  });

  it('agrees with d3-geo on every vertex of the real coast', () => {
    const file = createRequire(import.meta.url).resolve('world-atlas/land-50m.json');
    const land = JSON.parse(readFileSync(file, 'utf8')) as Topology<{ land: GeometryObject }>;
    const lines = mesh(land, land.objects.land).coordinates;
    expect(feature(land, land.objects.land).type).toMatch(/Feature/);
    const ring = [[-20, -36], [52, -36], [52, 5], [40, 12], [-20, 5], [-20, -36]]; // prettier-ignore
    const kept = cutCoast(coastVectors(lines), [readRing(ring)], 'smaller').flat();
    const round = (n: number): number => Math.round(n * 1e5) / 1e5;
    const inside = new Set(kept.map(([lon, lat]) => `${lon} ${lat}`));
    const clockwise = { type: 'Polygon' as const, coordinates: [[...ring].reverse()] };
    let checked = 0;
    for (const [lon, lat] of lines.flat() as [number, number][]) {
      if (lon < -25 || lon > 60 || Math.abs(lat) > 40) continue;
      const near = [-20, 52].some((x) => Math.abs(lon - x) < 0.01) || Math.abs(lat + 36) < 0.01;
      if (near) continue;
      expect(inside.has(`${round(lon)} ${round(lat)}`), `${lon} ${lat}`).toBe(
        geoContains(clockwise, [lon, lat]),
      );
      checked++;
    }
    expect(checked).toBeGreaterThan(2000);
  });
});
