import type { Vector3 } from '../rotations/types';
import { angularDistance } from './distance';
import { add, normalizeVector, scale, subtract } from './vector';

export interface Cap {
  readonly centre: Vector3;
  /** Radians in [0, π]. */
  readonly radius: number;
  readonly cosRadius: number;
}

const ROUNDS = 64;
/**
 * The radius of a bounding cap is at most this much above the least one, as a share of it (found by trial on
 * random outlines).
 */
export const CAP_EXCESS = 0.05;

/**
 * A cap that holds all the vectors and, as it is smaller than a hemisphere, every great-circle edge between
 * them and the smaller side of their ring. Where no cap of under 89° is found, or there are no vectors, it is
 * the whole sphere. Centre by Bădoiu & Clarkson (2003): step towards the farthest.
 */
export function boundingCap(vectors: readonly Vector3[]): Cap {
  let centre = vectors.reduce<Vector3>((sum, v) => add(sum, v), [0, 0, 0]);
  centre = scale(centre, 1 / Math.max(1, vectors.length));
  for (let round = 1; round <= ROUNDS; round++) {
    centre = add(centre, scale(subtract(farthest(vectors, centre), centre), 1 / (round + 1)));
  }
  const unit = normalizeVector(centre);
  const radius = vectors.reduce((most, v) => Math.max(most, angularDistance(unit, v)), 0) + 1e-15;
  if (vectors.length === 0 || radius > (89 / 180) * Math.PI)
    return { centre: [0, 0, 1], radius: Math.PI, cosRadius: -1 };
  return { centre: unit, radius, cosRadius: Math.cos(radius) };
}

function farthest(vectors: readonly Vector3[], from: Vector3): Vector3 {
  let found: Vector3 = from;
  let most = -1;
  for (const v of vectors) {
    const square = (v[0] - from[0]) ** 2 + (v[1] - from[1]) ** 2 + (v[2] - from[2]) ** 2;
    if (square > most) [most, found] = [square, v];
  }
  return found;
}
