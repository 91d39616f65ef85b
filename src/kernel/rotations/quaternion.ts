import type { Matrix3, Quaternion, Vector3 } from './types';

/** No rotation. */
export const IDENTITY: Quaternion = [1, 0, 0, 0];

/**
 * Worst error, radians, of one product, of a rotated unit vector, and of a round trip through `exp`/`log` or
 * a matrix.
 */
export const PRODUCT_ERROR_RAD = 1e-15;
export const ROTATE_ERROR_RAD = 1.5e-15;
export const LOG_EXP_ERROR_RAD = 2e-15;
export const MATRIX_ERROR_RAD = 2e-15;

/** a · b: b first, then a. The inverse of a factor is {@link inverse}. */
export const multiply = (a: Quaternion, b: Quaternion): Quaternion => [
  a[0] * b[0] - a[1] * b[1] - a[2] * b[2] - a[3] * b[3],
  a[0] * b[1] + a[1] * b[0] + a[2] * b[3] - a[3] * b[2],
  a[0] * b[2] - a[1] * b[3] + a[2] * b[0] + a[3] * b[1],
  a[0] * b[3] + a[1] * b[2] - a[2] * b[1] + a[3] * b[0],
];

/** The rotation back: the conjugate of a unit quaternion. Its own inverse. */
export const inverse = (q: Quaternion): Quaternion => [q[0], -q[1], -q[2], -q[3]];

/** Takes away the drift of length that many products leave. @throws RangeError for the zero quaternion. */
export function normalize(q: Quaternion): Quaternion {
  const length = Math.hypot(q[0], q[1], q[2], q[3]);
  if (!(length > 0)) throw new RangeError('a quaternion of length 0 is no rotation');
  return [q[0] / length, q[1] / length, q[2] / length, q[3] / length];
}

/** v turned by q: v + 2w (q × v) + 2 q × (q × v). Inverse: {@link unrotate}. */
export function rotate(q: Quaternion, v: Vector3): Vector3 {
  const [w, x, y, z] = q;
  const tx = 2 * (y * v[2] - z * v[1]);
  const ty = 2 * (z * v[0] - x * v[2]);
  const tz = 2 * (x * v[1] - y * v[0]);
  return [
    v[0] + w * tx + (y * tz - z * ty),
    v[1] + w * ty + (z * tx - x * tz),
    v[2] + w * tz + (x * ty - y * tx),
  ];
}

/** v turned back by q. Inverse: {@link rotate}. */
export const unrotate = (q: Quaternion, v: Vector3): Vector3 => rotate(inverse(q), v);

/**
 * Rotation by |u| radians about u, right-hand rule; the identity for the zero vector. Inverse: {@link log}.
 */
export function exp(u: Vector3): Quaternion {
  const angle = Math.hypot(u[0], u[1], u[2]);
  const factor = angle > 1e-8 ? Math.sin(angle / 2) / angle : 0.5;
  return [Math.cos(angle / 2), u[0] * factor, u[1] * factor, u[2] * factor];
}

/**
 * Principal rotation vector, radians, of length ≤ π (to rounding); the same for q and −q. An exact half-turn
 * has two: the one whose last component other than 0 is positive (a northern pole). Inverse: {@link exp}.
 */
export function log(q: Quaternion): Vector3 {
  const length = Math.hypot(q[1], q[2], q[3]);
  if (length === 0) return [0, 0, 0];
  const negative = q[0] < 0 || (q[0] === 0 && (q[3] || q[2] || q[1]) < 0);
  const angle = 2 * Math.atan2(length, Math.abs(q[0]));
  const factor = (negative ? -angle : angle) / length;
  return [q[1] * factor, q[2] * factor, q[3] * factor];
}

/** Angle of the rotation, radians in [0, π]. */
export const angleOf = (q: Quaternion): number =>
  2 * Math.atan2(Math.hypot(q[1], q[2], q[3]), Math.abs(q[0]));

/** The rotation that follows `from` to make `to`: to · from⁻¹, in the coordinates of the reference. */
export const between = (from: Quaternion, to: Quaternion): Quaternion => multiply(to, inverse(from));

/** Row-major matrix of a unit quaternion, for columns of coordinates. Inverse: {@link fromMatrix}. */
export function toMatrix([w, x, y, z]: Quaternion): Matrix3 {
  // prettier-ignore
  return [
    1 - 2 * (y * y + z * z), 2 * (x * y - w * z), 2 * (x * z + w * y),
    2 * (x * y + w * z), 1 - 2 * (x * x + z * z), 2 * (y * z - w * x),
    2 * (x * z - w * y), 2 * (y * z + w * x), 1 - 2 * (x * x + y * y),
  ];
}

/**
 * Unit quaternion, w ≥ 0, of a rotation matrix: from its largest component (Shepperd 1978). Inverse: {@link
 * toMatrix}.
 */
export function fromMatrix(m: Matrix3): Quaternion {
  const squares = [
    1 + m[0] + m[4] + m[8],
    1 + m[0] - m[4] - m[8],
    1 - m[0] + m[4] - m[8],
    1 - m[0] - m[4] + m[8],
  ] as const;
  const [w, x, y, z] = squares;
  const most = Math.max(...squares);
  let q: Quaternion;
  if (most === w) q = [w, m[7] - m[5], m[2] - m[6], m[3] - m[1]];
  else if (most === x) q = [m[7] - m[5], x, m[1] + m[3], m[2] + m[6]];
  else if (most === y) q = [m[2] - m[6], m[1] + m[3], y, m[5] + m[7]];
  else q = [m[3] - m[1], m[2] + m[6], m[5] + m[7], z];
  const unit = normalize(q);
  return unit[0] < 0 ? [-unit[0], -unit[1], -unit[2], -unit[3]] : unit;
}
