/** Size and middle of an outline where it lies today: they turn with it, so they are found once for each geometry. */
import type { MultiPolygon, Polygon } from 'geojson';
import type { Vector3 } from '../../../kernel/rotations/types';
import { areaKm2, boundingCap, centroid, type Inside, type Polygon as Rings } from '../../../kernel/sphere';

export interface Measured {
  readonly area_km2: number;
  /** The largest part's area and the middle of its cap; of a part that is the larger side, its centroid. */
  readonly largest_km2: number;
  readonly middle: Vector3;
}

type Sides = Partial<Record<Inside, Measured>>;
const known = new WeakMap<Polygon | MultiPolygon, Sides>();

/** @param polygons the geometry's own, as unit vectors. */
export function measured(
  geometry: Polygon | MultiPolygon,
  polygons: readonly Rings[],
  inside: Inside,
): Measured {
  const sides = known.get(geometry) ?? {};
  known.set(geometry, sides);
  return (sides[inside] ??= measure(polygons, inside));
}

function measure(polygons: readonly Rings[], inside: Inside): Measured {
  const sizes = polygons.map((polygon) => areaKm2(polygon, inside));
  const largest_km2 = Math.max(...sizes);
  const largest = polygons[sizes.indexOf(largest_km2)]!;
  return {
    area_km2: sizes.reduce((sum, size) => sum + size, 0),
    largest_km2,
    middle: inside === 'larger' ? centroid(largest, 'larger') : boundingCap(largest[0]!).centre,
  };
}
