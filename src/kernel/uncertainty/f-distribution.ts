import { KernelError } from '../errors';

/**
 * Worst relative error of {@link fQuantile}, for 1–10 and 1–10⁶ degrees of freedom and probabilities of
 * 0.5–0.999.
 */
export const F_QUANTILE_ERROR = 1e-9;

/** 95 % point of χ² on 2 degrees of freedom: −2 ln 0.05. */
export const CHI_SQUARE_2_95 = -2 * Math.log(0.05);

/**
 * Quantile of the F distribution. On 2 degrees of freedom above it is (ν/2)((1 − p)^(−2/ν) − 1); otherwise by
 * bisection on the incomplete beta function.
 */
export function fQuantile(p: number, above: number, below: number): number {
  if (!(p > 0 && p < 1))
    throw new KernelError('OutOfRange', {
      quantity: 'p',
      value: p,
      problem: 'a probability lies between 0 and 1',
    });
  if (!(above > 0 && below > 0)) {
    throw new KernelError('OutOfRange', {
      quantity: 'degrees of freedom',
      value: `${above}, ${below}`,
      problem: 'both are above 0',
    });
  }
  if (above === 2) return (below / 2) * Math.expm1((-2 / below) * Math.log1p(-p));
  let [low, high] = [0, 1];
  for (let i = 0; i < 80; i++) {
    const middle = (low + high) / 2;
    if (incompleteBeta(above / 2, below / 2, middle) < p) low = middle;
    else high = middle;
  }
  const x = (low + high) / 2;
  return (below * x) / (above * (1 - x));
}

/**
 * Regularised incomplete beta function I_x(a, b), by its continued fraction (Abramowitz & Stegun 1964,
 * 26.5.8; Lentz's method).
 */
export function incompleteBeta(a: number, b: number, x: number): number {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  return x < (a + 1) / (a + b + 2)
    ? (front * betaFraction(a, b, x)) / a
    : 1 - (front * betaFraction(b, a, 1 - x)) / b;
}

function betaFraction(a: number, b: number, x: number): number {
  const tiny = 1e-300;
  const away = (v: number): number => (Math.abs(v) < tiny ? tiny : v);
  let d = 1 / away(1 - ((a + b) * x) / (a + 1));
  let c = 1;
  let fraction = d;
  for (let m = 1; m <= 10_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / away(1 + even * d);
    c = away(1 + even / c);
    fraction *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / away(1 + odd * d);
    c = away(1 + odd / c);
    fraction *= d * c;
    if (Math.abs(d * c - 1) < 1e-15) break;
  }
  return fraction;
}

/** ln Γ(x) for x > 0: Stirling's series (Abramowitz & Stegun 1964, 6.1.41) after recurrence up to 10. */
function logGamma(x: number): number {
  let shift = 0;
  let y = x;
  for (; y < 10; y++) shift += Math.log(y);
  const s = 1 / (y * y);
  const tail = (1 / 12 - s * (1 / 360 - s * (1 / 1260 - s * (1 / 1680 - s * (1 / 1188))))) / y;
  return (y - 0.5) * Math.log(y) - y + Math.log(2 * Math.PI) / 2 + tail - shift;
}
