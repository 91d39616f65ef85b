import { fQuantile } from './f-distribution';

/** By which distribution a 95 % region was drawn. */
export interface ConfidenceRule {
  /** `chi-square` where every covariance counts as known, `F` where κ̂ of one at least was estimated. */
  readonly name: 'chi-square' | 'F';
  /** Dimensions of the region: 1 latitude, 2 point, 3 rotation. */
  readonly dimensions: number;
  /** ν by Satterthwaite on the traces; null for χ². */
  readonly dof: number | null;
  /** What a squared, normalised deviation stays below in 95 %: χ² or n F(0.95; n, ν). */
  readonly quantile: number;
}

export const CONFIDENCE = 0.95;
/** χ²(0.95) on 1, 2, 3 degrees of freedom (Abramowitz & Stegun 1964, table 26.8, carried on). */
const CHI_SQUARE_95 = { 1: 3.841458820694124, 2: 5.991464547107979, 3: 7.814727903251179 } as const;

/**
 * The rule for a sum of independent parts of which some were scaled by an estimated κ̂: effective degrees of
 * freedom ν = (Σ trᵢ)²/Σ (trᵢ²/νᵢ) (Satterthwaite 1946), parts of known scale counting νᵢ = ∞.
 */
export function confidenceRule(
  dimensions: 1 | 2 | 3,
  parts: readonly { trace: number; dof: number | null }[],
): ConfidenceRule {
  const whole = parts.reduce((sum, part) => sum + part.trace, 0);
  const spread = parts.reduce((sum, { trace, dof }) => sum + (dof ? trace ** 2 / dof : 0), 0);
  if (!(spread > 0))
    return { name: 'chi-square', dimensions, dof: null, quantile: CHI_SQUARE_95[dimensions] };
  const dof = whole ** 2 / spread;
  return { name: 'F', dimensions, dof, quantile: dimensions * fQuantile(CONFIDENCE, dimensions, dof) };
}
