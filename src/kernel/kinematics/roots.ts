/** A function of age that never changes faster than a known rate. */
export interface BoundedFunction {
  readonly value: (age_ma: number) => number;
  /** Greatest change per Myr. */
  readonly rate: number;
}

/** A change of sign lies between these ages, no further apart than {@link ROOT_TOLERANCE_MYR}. */
export interface Bracket {
  readonly older_ma: number;
  readonly younger_ma: number;
  /** True where, forward in time, it goes from above 0 to 0 or below. */
  readonly falls: boolean;
}

/** Width to which a change of sign is closed in on, Myr. */
export const ROOT_TOLERANCE_MYR = 1e-6;
/** A function that goes over 0 and comes back within less than this, Myr, may be missed. */
export const SHORTEST_EXCURSION_MYR = 0.05;

/**
 * Changes of sign of a function between two ages, oldest first. A part in which the function is too far from 0
 * to reach it at its greatest rate is left out, any other is halved: no change is missed for falling between
 * two samples, down to {@link SHORTEST_EXCURSION_MYR}.
 */
export function* signChanges(
  { value, rate }: BoundedFunction,
  older_ma: number,
  younger_ma: number,
): Generator<Bracket, void> {
  yield* between(older_ma, value(older_ma), younger_ma, value(younger_ma));

  function* between(t0: number, f0: number, t1: number, f1: number): Generator<Bracket, void> {
    const [length, changes] = [t0 - t1, f0 > 0 !== f1 > 0];
    if (!changes && Math.abs(f0) + Math.abs(f1) > rate * length) return;
    const middle = (t0 + t1) / 2;
    if (length <= (changes ? ROOT_TOLERANCE_MYR : SHORTEST_EXCURSION_MYR) || middle >= t0 || middle <= t1) {
      if (changes) yield { older_ma: t0, younger_ma: t1, falls: f0 > 0 };
      return;
    }
    const f = value(middle);
    if (length > SHORTEST_EXCURSION_MYR || f0 > 0 !== f > 0) yield* between(t0, f0, middle, f);
    if (length > SHORTEST_EXCURSION_MYR || f0 > 0 === f > 0) yield* between(middle, f, t1, f1);
  }
}

/** The least value of a function with one least value between two ages, by golden section. */
export function leastBetween(
  value: (age_ma: number) => number,
  older_ma: number,
  younger_ma: number,
): { age_ma: number; value: number } {
  const golden = (Math.sqrt(5) - 1) / 2;
  let [low, high] = [younger_ma, older_ma];
  let [p, q] = [high - golden * (high - low), low + golden * (high - low)];
  let [fp, fq] = [value(p), value(q)];
  while (high - low > ROOT_TOLERANCE_MYR && p < q) {
    if (fp <= fq) {
      [high, q, fq] = [q, p, fp];
      p = high - golden * (high - low);
      fp = value(p);
    } else {
      [low, p, fp] = [p, q, fq];
      q = low + golden * (high - low);
      fq = value(q);
    }
  }
  return fp <= fq ? { age_ma: p, value: fp } : { age_ma: q, value: fq };
}
