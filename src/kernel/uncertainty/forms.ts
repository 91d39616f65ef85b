import { KernelError } from '../errors';
import type { Covariance, Matrix3 } from '../rotations/types';
import { acos, toDegrees, toRadians } from '../sphere/angles';
import { CHI_SQUARE_2_95 } from './f-distribution';
import { scaleCovariance, toSymmetric, trace } from './matrix3';

/** The published form (1/κ̂) [a b c; b d e; c e f] × 10^−g rad² (Royer & Chang 1991). */
export interface PublishedForm {
  readonly kappa: number;
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly d: number;
  readonly e: number;
  readonly f: number;
  readonly g: number;
}

/** @throws {KernelError} `OutOfRange` for κ̂ ≤ 0. Inverse: {@link covarianceToPublishedForm}. */
export function publishedFormToCovariance({ kappa, a, b, c, d, e, f, g }: PublishedForm): Covariance {
  if (!(kappa > 0))
    throw new KernelError('OutOfRange', {
      quantity: 'kappa',
      value: kappa,
      problem: 'the ratio κ̂ is above 0',
    });
  return scaleCovariance([a, b, c, d, e, f], 10 ** -g / kappa);
}

/**
 * Entries times κ̂, with the power of ten that brings the greatest into [1, 10) unless g is given. Inverse:
 * {@link publishedFormToCovariance}.
 */
export function covarianceToPublishedForm(
  covariance: Covariance,
  kappa = 1,
  g = powerOf(covariance, kappa),
): PublishedForm {
  const [a, b, c, d, e, f] = scaleCovariance(covariance, kappa * 10 ** g);
  return { kappa, a, b, c, d, e, f, g };
}

function powerOf(covariance: Covariance, kappa: number): number {
  const most = Math.max(...covariance.map((entry) => Math.abs(entry * kappa)));
  return most > 0 ? -Math.floor(Math.log10(most)) : 0;
}

/**
 * Isotropic covariance of a rotation whose effect 90° from the axis of u has a 95 % cap of r degrees: σ =
 * r/√5.991.
 */
export function cap95ToCovariance(cap95_deg: number): Covariance {
  if (!(cap95_deg >= 0))
    throw new KernelError('OutOfRange', {
      quantity: 'cap95_deg',
      value: cap95_deg,
      problem: 'a radius is 0 or more',
    });
  const variance = toRadians(cap95_deg) ** 2 / CHI_SQUARE_2_95;
  return [variance, 0, 0, variance, 0, variance];
}

/**
 * The 95 % cap, degrees, of the isotropic covariance of the same trace: exact for isotropic ones. Inverse:
 * {@link cap95ToCovariance}.
 */
export const covarianceToCap95 = (covariance: Covariance): number =>
  toDegrees(Math.sqrt((CHI_SQUARE_2_95 * trace(covariance)) / 3));

export type CovarianceProblem = 'not finite' | 'not symmetric' | 'not positive semi-definite';

/** A least eigenvalue below zero by less than this share of the greatest is rounding of printed digits. */
export const DEFINITENESS_TOLERANCE = 1e-6;

/** What is wrong with six entries or a full matrix as a covariance; null where nothing is. */
export function checkCovariance(
  entries: Covariance | Matrix3,
): { problem: CovarianceProblem; least_eigenvalue: number | null } | null {
  const m: Matrix3 = entries.length === 9 ? entries : toSymmetric(entries);
  if (!m.every(Number.isFinite)) return { problem: 'not finite', least_eigenvalue: null };
  const size = Math.max(...m.map(Math.abs));
  const skew = Math.max(Math.abs(m[1] - m[3]), Math.abs(m[2] - m[6]), Math.abs(m[5] - m[7]));
  if (skew > DEFINITENESS_TOLERANCE * size) return { problem: 'not symmetric', least_eigenvalue: null };
  const [least, , greatest] = eigenvalues([m[0], m[1], m[2], m[4], m[5], m[8]]);
  return least < -DEFINITENESS_TOLERANCE * Math.abs(greatest)
    ? { problem: 'not positive semi-definite', least_eigenvalue: least }
    : null;
}

/** Eigenvalues of a symmetric matrix, ascending, by the trigonometric solution of the cubic (Smith 1961). */
export function eigenvalues([xx, xy, xz, yy, yz, zz]: Covariance): [
  least: number,
  middle: number,
  greatest: number,
] {
  const mean = (xx + yy + zz) / 3;
  const off = xy * xy + xz * xz + yz * yz;
  const spread = Math.sqrt(((xx - mean) ** 2 + (yy - mean) ** 2 + (zz - mean) ** 2 + 2 * off) / 6);
  if (spread === 0) return [mean, mean, mean];
  const [a, b, c] = [(xx - mean) / spread, (yy - mean) / spread, (zz - mean) / spread];
  const [d, e, f] = [xy / spread, xz / spread, yz / spread];
  const determinant = a * (b * c - f * f) - d * (d * c - f * e) + e * (d * f - b * e);
  const angle = acos(determinant / 2) / 3;
  const greatest = mean + 2 * spread * Math.cos(angle);
  const least = mean + 2 * spread * Math.cos(angle + (2 * Math.PI) / 3);
  return [least, 3 * mean - greatest - least, greatest];
}
