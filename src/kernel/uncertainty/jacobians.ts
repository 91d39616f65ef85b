import type { Matrix3, Vector3 } from '../rotations/types';
import { addMatrices, crossMatrix, IDENTITY3, multiplyMatrices, scaleMatrix } from './matrix3';

/**
 * Worst error of each entry of a Jacobian and of the product with its inverse, for rotation vectors of up to
 * 179°.
 */
export const JACOBIAN_ERROR = 1e-12;

const SMALL = 1e-2;

/** I + a [φ]× + b [φ]×². */
const series = (phi: Vector3, a: number, b: number): Matrix3 => {
  const x = crossMatrix(phi);
  return addMatrices(IDENTITY3, addMatrices(scaleMatrix(x, a), scaleMatrix(multiplyMatrices(x, x), b)));
};

/** (1 − cos θ)/θ² and (θ − sin θ)/θ³, by series near 0. */
function coefficients(t: number): [a: number, b: number] {
  const s = t * t;
  if (t < SMALL) return [1 / 2 - s / 24 + (s * s) / 720, 1 / 6 - s / 120 + (s * s) / 5040];
  return [(2 * Math.sin(t / 2) ** 2) / s, (t - Math.sin(t)) / (s * t)];
}

/** 1/θ² − (1 + cos θ)/(2θ sin θ), by series near 0. */
function inverseCoefficient(t: number): number {
  const s = t * t;
  return t < SMALL ? 1 / 12 + s / 720 + (s * s) / 30240 : (1 - t / 2 / Math.tan(t / 2)) / s;
}

const length = (phi: Vector3): number => Math.hypot(phi[0], phi[1], phi[2]);

/**
 * Right Jacobian of the rotation group: Exp(φ + δ) ≈ Exp(φ) Exp(Jr(φ) δ) (Chirikjian 2012, Stochastic Models,
 * Information Theory, and Lie Groups 2, § 10). Inverse: {@link rightJacobianInverse}.
 */
export function rightJacobian(phi: Vector3): Matrix3 {
  const [a, b] = coefficients(length(phi));
  return series(phi, -a, b);
}

/** Log(Exp(φ) Exp(u)) ≈ φ + Jr⁻¹(φ) u, for |φ| below 2π. */
export const rightJacobianInverse = (phi: Vector3): Matrix3 =>
  series(phi, 1 / 2, inverseCoefficient(length(phi)));

/** Log(Exp(u) Exp(φ)) ≈ φ + Jl⁻¹(φ) u: the transpose of the right one's inverse. */
export const leftJacobianInverse = (phi: Vector3): Matrix3 =>
  series(phi, -1 / 2, inverseCoefficient(length(phi)));
