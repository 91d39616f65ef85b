import { inArray } from 'drizzle-orm';
import type { Geometry } from 'geojson';
import { LRUCache } from 'lru-cache';
import { database } from '~/db/client';
import { geometry } from '~/db/schema';

/** Geometries by hash never change, so they are kept by it; the size counts vertices. */
const cache = new LRUCache<string, Geometry>({
  maxSize: 2_000_000,
  sizeCalculation: (shape) => 1 + verticesIn(shape),
});

const verticesIn = (shape: Geometry): number =>
  shape.type === 'GeometryCollection' ? 0 : (shape.coordinates as unknown[]).flat(Infinity).length / 2;

/**
 * Geometries of a state's rows, by hash. The caller has opened the state, which is what gives the right to see them.
 * @returns a look-up that throws for a hash that was not asked for.
 */
export async function loadShapes(hashes: readonly string[]): Promise<(sha256: string) => Geometry> {
  const shapes = new Map<string, Geometry>();
  const missing: string[] = [];
  for (const hash of new Set(hashes)) {
    const found = cache.get(hash);
    if (found) shapes.set(hash, found);
    else missing.push(hash);
  }
  for (let i = 0; i < missing.length; i += 200) {
    const rows = await database()
      .select({ sha256: geometry.sha256, geojson: geometry.geojson })
      .from(geometry)
      .where(inArray(geometry.sha256, missing.slice(i, i + 200)));
    for (const row of rows) {
      const { type, coordinates } = row.geojson as Exclude<Geometry, { type: 'GeometryCollection' }>;
      const shape = { type, coordinates } as Geometry;
      cache.set(row.sha256, shape);
      shapes.set(row.sha256, shape);
    }
  }
  return (sha256) => {
    const shape = shapes.get(sha256);
    if (!shape) throw new Error(`geometry ${sha256} is not loaded`);
    return shape;
  };
}
