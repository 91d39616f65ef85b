import type { Vector3 } from '../rotations/types';
import { halvesSphere, ringArea } from './area';
import { arcNormal } from './arc';
import { boundingCap } from './cap';
import { angularDistance } from './distance';
import { eachEdge, type Inside, type Polygon, type Ring } from './ring';
import { add, negate, norm, normalizeVector, scale, subtract } from './vector';

/**
 * ∫ x dA over the left side of a ring = ½ Σ (length of edge) (unit normal of edge), by Stokes' theorem; the
 * right side has the same with the other sign, as the whole sphere has none.
 */
function leftMoment(ring: Ring): Vector3 {
  let sum: Vector3 = [0, 0, 0];
  eachEdge(ring, (a, b) => {
    sum = add(sum, scale(arcNormal(a, b), angularDistance(a, b) / 2));
  });
  return sum;
}

function smallerMoment(ring: Ring): Vector3 {
  return ringArea(ring) < 0 ? negate(leftMoment(ring)) : leftMoment(ring);
}

/**
 * Centre of area of a polygon, a unit vector; where none is defined (a band round the sphere), the centre of
 * its bounding cap.
 */
export function centroid(polygon: Polygon, inside: Inside = 'smaller'): Vector3 {
  const [outer, ...holes] = polygon;
  if (!outer) return [0, 0, 1];
  const larger = inside === 'larger' && !halvesSphere(ringArea(outer));
  const whole = larger ? negate(smallerMoment(outer)) : smallerMoment(outer);
  const moment = holes.reduce((rest, hole) => subtract(rest, smallerMoment(hole)), whole);
  return norm(moment) > 1e-13 ? normalizeVector(moment) : boundingCap(outer).centre;
}
