import type { Vector3 } from '../rotations/types';
import { halvesSphere, ringArea } from './area';
import type { Inside, Polygon, Ring } from './ring';

/**
 * A place nearer to an edge than this, radians (6 µm on the ground), lies on the outline and counts as
 * inside.
 */
export const BOUNDARY_TOLERANCE_RAD = 1e-12;

const signedAreas = new WeakMap<Ring, number>();

function signedArea(ring: Ring): number {
  const known = signedAreas.get(ring);
  if (known !== undefined) return known;
  const area = ringArea(ring);
  signedAreas.set(ring, area);
  return area;
}

/**
 * Where v lies to a ring: within its smaller side (the left one of a tie), on it, or without.
 *
 * The triangles from −v to every edge add up to A − 4πw, where A is the signed area and w is how often the
 * ring winds round v and not round −v, so w follows from the sum without any special ray; edges passed both
 * ways cancel.
 */
function place(ring: Ring, v: Vector3): 'within' | 'on' | 'without' {
  let turning = 0;
  const last = ring.at(-1);
  if (!last || ring.length < 3) return 'without';
  let [ax, ay, az] = [last[0] - v[0], last[1] - v[1], last[2] - v[2]];
  for (const b of ring) {
    const [bx, by, bz] = [b[0] - v[0], b[1] - v[1], b[2] - v[2]];
    const volume = v[0] * (ay * bz - az * by) + v[1] * (az * bx - ax * bz) + v[2] * (ax * by - ay * bx);
    const product = ax * bx + ay * by + az * bz;
    if (bx * bx + by * by + bz * bz <= BOUNDARY_TOLERANCE_RAD ** 2) return 'on';
    if (product <= 0) {
      const chord = Math.hypot(bx - ax, by - ay, bz - az);
      const sine = chord * Math.sqrt(Math.max(0, 1 - (chord * chord) / 4));
      if (Math.abs(volume) <= BOUNDARY_TOLERANCE_RAD * sine) return 'on';
    }
    turning += Math.atan2(volume, product);
    [ax, ay, az] = [bx, by, bz];
  }
  return Math.round((signedArea(ring) + 2 * turning) / (4 * Math.PI)) !== 0 ? 'within' : 'without';
}

/**
 * Whether a polygon holds a unit vector, its outline included (that of its holes too). Holes are the smaller
 * sides of their rings. The areas of rings are remembered: do not change a ring that was asked about.
 */
export function contains(polygon: Polygon, v: Vector3, inside: Inside = 'smaller'): boolean {
  const [outer, ...holes] = polygon;
  if (!outer || outer.length < 3) return false;
  const side = place(outer, v);
  if (side === 'on') return true;
  const wanted = inside === 'larger' && !halvesSphere(signedArea(outer)) ? 'without' : 'within';
  return side === wanted && holes.every((hole) => place(hole, v) !== 'within');
}
