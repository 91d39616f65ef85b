import fc from 'fast-check';
import land from 'world-atlas/land-50m.json';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import type { MultiPolygon } from 'geojson';
import { describe, expect, it } from 'vitest';
import {
  decodeOutline,
  encodeOutline,
  OUTLINE_GRID_DEG,
  OUTLINE_MAX_ERROR_KM,
  outlineGeometry,
  outlineVectors,
  type OutlineGeometry,
  type Position,
} from '../../../src/kernel/cartography/outline-codec';

/** Great-circle distance by the haversine formula, km (Sinnott 1984, "Virtues of the haversine"), R = 6371.0088 km. */
function distanceKm([lonA, latA]: Position, [lonB, latB]: Position): number {
  const radians = Math.PI / 180;
  const a =
    Math.sin(((latB - latA) * radians) / 2) ** 2 +
    Math.cos(latA * radians) * Math.cos(latB * radians) * Math.sin(((lonB - lonA) * radians) / 2) ** 2;
  return 2 * 6371.0088 * Math.asin(Math.sqrt(a));
}

const position = fc.tuple(
  fc.double({ min: -360, max: 360, noNaN: true }),
  fc.double({ min: -90, max: 90, noNaN: true }),
);
const part = fc.array(position, { minLength: 1, maxLength: 30 });

const flat = (geometry: OutlineGeometry): Position[] => {
  const depth = { Point: -1, MultiPoint: 0, LineString: 0, MultiLineString: 1, Polygon: 1, MultiPolygon: 2 }[
    geometry.type
  ];
  return depth < 0
    ? [geometry.coordinates as Position]
    : ((geometry.coordinates as unknown[]).flat(depth) as Position[]);
};

describe('outline codec', () => {
  it('keeps the shape of every type and each place within the stated error', () => {
    const geometry = fc.oneof(
      position.map((coordinates): OutlineGeometry => ({ type: 'Point', coordinates })),
      part.map((coordinates): OutlineGeometry => ({ type: 'MultiPoint', coordinates })),
      part.map((coordinates): OutlineGeometry => ({ type: 'LineString', coordinates })),
      fc
        .array(part, { maxLength: 5 })
        .map((coordinates): OutlineGeometry => ({ type: 'MultiLineString', coordinates })),
      fc
        .array(part, { maxLength: 5 })
        .map((coordinates): OutlineGeometry => ({ type: 'Polygon', coordinates })),
      fc
        .array(fc.array(part, { minLength: 1, maxLength: 3 }), { maxLength: 4 })
        .map((coordinates): OutlineGeometry => ({ type: 'MultiPolygon', coordinates })),
    );
    fc.assert(
      fc.property(geometry, (given) => {
        const back = outlineGeometry(decodeOutline(encodeOutline(given)));
        expect(back.type).toBe(given.type);
        expect(structure(back.coordinates)).toEqual(structure(given.coordinates));
        const places = flat(back);
        for (const [i, place] of flat(given).entries()) {
          expect(distanceKm(place, places[i]!)).toBeLessThanOrEqual(OUTLINE_MAX_ERROR_KM + 1e-9);
        }
      }),
      { numRuns: 300 },
    );
  });

  it('states an error of half a step each way on the equator: 39.3 m', () => {
    // 6371008.8 m × 0.00025° × π/180 = 27.799 m each way, √2 of it along the diagonal (by hand).
    expect(Math.abs(OUTLINE_MAX_ERROR_KM - 0.0393135)).toBeLessThan(1e-6);
    const worst: Position = [OUTLINE_GRID_DEG / 2 - 1e-12, OUTLINE_GRID_DEG / 2 - 1e-12];
    const [back] = flat(outlineGeometry(decodeOutline(encodeOutline({ type: 'Point', coordinates: worst }))));
    expect(distanceKm(worst, back!)).toBeGreaterThan(0.99 * OUTLINE_MAX_ERROR_KM);
  });

  it('gives unit vectors of the conventional axes', () => {
    const line: OutlineGeometry = { type: 'LineString', coordinates: [[0, 0], [90, 0], [-30, 45], [17, -90]] }; // prettier-ignore
    const vectors = outlineVectors(decodeOutline(encodeOutline(line)));
    // p(φ, λ) = (cos φ cos λ, cos φ sin λ, sin φ), by hand.
    const expected = [1, 0, 0, 0, 1, 0, 0.6123724, -0.3535534, 0.7071068, 0, 0, -1];
    for (const [i, value] of expected.entries()) expect(Math.abs(vectors[i]! - value)).toBeLessThan(1e-6);
  });

  it('takes at most 0.25 of the bytes of GeoJSON for the 1:50m coastline', () => {
    const topology = land as unknown as Topology<{ land: GeometryCollection }>;
    const coast = feature(topology, topology.objects.land).features[0]!.geometry as MultiPolygon;
    const bytes = encodeOutline(coast as unknown as OutlineGeometry).length;
    expect(bytes / JSON.stringify(coast).length).toBeLessThan(0.25);
    expect(
      flat(outlineGeometry(decodeOutline(encodeOutline(coast as unknown as OutlineGeometry)))),
    ).toHaveLength(coast.coordinates.flat(2).length);
  });

  it('refuses bytes that are no outline, or only a part of one', () => {
    const whole = encodeOutline({ type: 'LineString', coordinates: [[10.5, -20.25], [11, -21], [12, 80]] }); // prettier-ignore
    for (let length = 0; length < whole.length; length++) {
      expect(() => decodeOutline(whole.slice(0, length))).toThrow(
        expect.objectContaining({ name: 'OutOfRange' }),
      );
    }
    expect(() => decodeOutline(Uint8Array.of(1, 9, 0))).toThrow(
      expect.objectContaining({ name: 'OutOfRange' }),
    );
    // A count of 2³⁰ parts in a file of a few bytes must not allocate.
    expect(() => decodeOutline(Uint8Array.of(1, 2, 0x80, 0x80, 0x80, 0x80, 4))).toThrow(
      expect.objectContaining({ name: 'OutOfRange' }),
    );
  });
});

function structure(value: unknown): unknown {
  return Array.isArray(value) && !value.every((item) => typeof item === 'number')
    ? value.map(structure)
    : 'place';
}
