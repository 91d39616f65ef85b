import type { Vector3 } from '../rotations/types';
import { GRID } from './edge-tree';

/**
 * Signs of determinants of vectors on the grid of {@link GRID}, never turned by rounding and never 0, so that
 * what is counted with them adds up round every ring.
 *
 * Of the two outlines the second is taken as shifted by δ = (ε, ε², ε³), ε smaller than any number (Edelsbrunner
 * & Mücke 1990, Simulation of simplicity): edges in common and corners on edges then fall to one side or cross
 * once, and an area changes by nothing.
 */

/** Above this a determinant of unit vectors has its sign in double precision: 4 u × 6 products, with room. */
const SURE = 2e-15;

/** Side of a place c of the second outline to the great circle a → b of the first: 1 left, −1 right. */
export function sideToFixed(a: Vector3, b: Vector3, c: Vector3): 1 | -1 {
  const rough = determinant(a, b, c);
  if (Math.abs(rough) > SURE) return rough > 0 ? 1 : -1;
  const [p, q] = [toIntegers(a), toIntegers(b)];
  const normal = crossOf(p, q);
  return signOf([dotOf(normal, toIntegers(c)), ...normal]);
}

/** Side of a place a of the first outline to the great circle c → d of the second: 1 left, −1 right. */
export function sideToShifted(c: Vector3, d: Vector3, a: Vector3): 1 | -1 {
  const rough = determinant(c, d, a);
  if (Math.abs(rough) > SURE) return rough > 0 ? 1 : -1;
  const [p, q, r] = [toIntegers(c), toIntegers(d), toIntegers(a)];
  const shift = crossOf([q[0] - p[0], q[1] - p[1], q[2] - p[2]], r);
  return signOf([dotOf(crossOf(p, q), r), ...shift]);
}

const determinant = (a: Vector3, b: Vector3, c: Vector3): number =>
  a[0] * (b[1] * c[2] - b[2] * c[1]) +
  a[1] * (b[2] * c[0] - b[0] * c[2]) +
  a[2] * (b[0] * c[1] - b[1] * c[0]);

type Integers = readonly [bigint, bigint, bigint];

const toIntegers = (v: Vector3): Integers => [BigInt(v[0] / GRID), BigInt(v[1] / GRID), BigInt(v[2] / GRID)];

const crossOf = (a: Integers, b: Integers): Integers => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

const dotOf = (a: Integers, b: Integers): bigint => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** Of the first that is not 0; 1 where a shift leaves even that open. */
const signOf = (terms: readonly bigint[]): 1 | -1 =>
  (terms.find((term) => term !== 0n) ?? 1n) > 0n ? 1 : -1;

/**
 * How an edge a → b of the first outline passes an edge c → d of the second: 1 from its right to its left, so
 * into what lies left of it, −1 out of it, 0 not at all. The second passes the first the other way.
 */
export function passing(a: Vector3, b: Vector3, c: Vector3, d: Vector3): 1 | 0 | -1 {
  const from = sideToShifted(c, d, a);
  if (sideToShifted(c, d, b) === from) return 0;
  if (sideToFixed(a, b, c) === from || sideToFixed(a, b, d) !== from) return 0;
  return from === 1 ? -1 : 1;
}
