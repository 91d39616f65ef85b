import type { Covariance, Matrix3, Vector3 } from '../rotations/types';

export const IDENTITY3: Matrix3 = [1, 0, 0, 0, 1, 0, 0, 0, 1];

export const addMatrices = (a: Matrix3, b: Matrix3): Matrix3 => combine(1, a, 1, b);
export const scaleMatrix = (a: Matrix3, factor: number): Matrix3 => combine(factor, a, 0, a);

function combine(p: number, a: Matrix3, q: number, b: Matrix3): Matrix3 {
  // prettier-ignore
  return [
    p * a[0] + q * b[0], p * a[1] + q * b[1], p * a[2] + q * b[2],
    p * a[3] + q * b[3], p * a[4] + q * b[4], p * a[5] + q * b[5],
    p * a[6] + q * b[6], p * a[7] + q * b[7], p * a[8] + q * b[8],
  ];
}

export const transpose = (a: Matrix3): Matrix3 => [a[0], a[3], a[6], a[1], a[4], a[7], a[2], a[5], a[8]];

export const applyMatrix = (a: Matrix3, v: Vector3): Vector3 => [
  a[0] * v[0] + a[1] * v[1] + a[2] * v[2],
  a[3] * v[0] + a[4] * v[1] + a[5] * v[2],
  a[6] * v[0] + a[7] * v[1] + a[8] * v[2],
];

export function multiplyMatrices(a: Matrix3, b: Matrix3): Matrix3 {
  const [x, y, z] = [
    applyMatrix(a, [b[0], b[3], b[6]]),
    applyMatrix(a, [b[1], b[4], b[7]]),
    applyMatrix(a, [b[2], b[5], b[8]]),
  ];
  return [x[0], y[0], z[0], x[1], y[1], z[1], x[2], y[2], z[2]];
}

/** [v]×: the matrix whose product with w is v × w. */
export const crossMatrix = ([x, y, z]: Vector3): Matrix3 => [0, -z, y, z, 0, -x, -y, x, 0];

export const outer = (a: Vector3): Covariance => [
  a[0] * a[0],
  a[0] * a[1],
  a[0] * a[2],
  a[1] * a[1],
  a[1] * a[2],
  a[2] * a[2],
];

export const toSymmetric = ([xx, xy, xz, yy, yz, zz]: Covariance): Matrix3 => [
  xx,
  xy,
  xz,
  xy,
  yy,
  yz,
  xz,
  yz,
  zz,
];
export const fromSymmetric = (m: Matrix3): Covariance => [m[0], m[1], m[2], m[4], m[5], m[8]];

export const ZERO_COVARIANCE: Covariance = [0, 0, 0, 0, 0, 0];
export const addCovariances = (a: Covariance, b: Covariance): Covariance => [
  a[0] + b[0],
  a[1] + b[1],
  a[2] + b[2],
  a[3] + b[3],
  a[4] + b[4],
  a[5] + b[5],
];
export const scaleCovariance = (c: Covariance, k: number): Covariance => [
  c[0] * k,
  c[1] * k,
  c[2] * k,
  c[3] * k,
  c[4] * k,
  c[5] * k,
];

/** J C Jᵀ. */
export const congruence = (j: Matrix3, c: Covariance): Covariance =>
  fromSymmetric(multiplyMatrices(multiplyMatrices(j, toSymmetric(c)), transpose(j)));

/** aᵀ C b. */
export const bilinear = (a: Vector3, c: Covariance, b: Vector3): number => {
  const v = applyMatrix(toSymmetric(c), b);
  return a[0] * v[0] + a[1] * v[1] + a[2] * v[2];
};

export const trace = (c: Covariance): number => c[0] + c[3] + c[5];
