import { kendallExactP, LONGEST_EXACT } from './kendall-exact.ts';
import { twoSidedP } from './normal.ts';
import { presentValues } from './present-values.ts';

export interface MannKendallOptions {
  /** what Var S is multiplied by, for serial correlation; 1 by default */
  varianceFactor?: number;
  /** take p from the exact distribution of S where it applies: n ≤ 10, no ties, varianceFactor 1; false by default */
  exact?: boolean;
}

export interface MannKendallResult {
  /** number of values that exist */
  n: number;
  /** pairs that rise minus pairs that fall */
  s: number;
  /** Var S with the correction for ties, before `varianceFactor` */
  variance: number;
  /** (S ∓ 1)/√(varianceFactor·Var S); 0 when S or Var S is 0 */
  z: number;
  /** two-sided; 1 when all values are equal */
  p: number;
  /** Kendall's tau-b; NaN when all values are equal */
  tauB: number;
}

/** Mann–Kendall test for a monotonic trend, with the tie correction and the continuity correction.
 *  S = Σ_{i<j} sign(x_j − x_i); Var S = [n(n − 1)(2n + 5) − Σ t(t − 1)(2t + 5)]/18 over groups of t equal values.
 *  @param x  values in time order, NaN where missing (left out); left unchanged
 *  @returns  NaN in variance, z, p and tauB when fewer than two values exist
 *  @throws RangeError when a value is infinite, or varianceFactor is not a positive number
 *  Source: Mann 1945, Econometrica 13:245–259; Kendall 1975, Rank Correlation Methods; tie terms as in Gilbert 1987,
 *  Statistical Methods for Environmental Pollution Monitoring, section 16.4.
 *  Example: [10, 15, 14, 20] → S = 4 (Gilbert 1987, p. 211) */
export function mannKendall(x: ArrayLike<number>, options: MannKendallOptions = {}): MannKendallResult {
  const { varianceFactor = 1, exact = false } = options;
  if (!(varianceFactor > 0 && Number.isFinite(varianceFactor))) {
    throw new RangeError(`mannKendall: varianceFactor must be a positive number, got ${varianceFactor}`);
  }
  const values = presentValues(x, 'mannKendall');
  const n = values.length;
  const s = kendallS(values);
  if (n < 2) return { n, s, variance: Number.NaN, z: Number.NaN, p: Number.NaN, tauB: Number.NaN };

  const { variance, tiedPairs } = varianceOfS(values);
  const z = s === 0 || variance === 0 ? 0 : (s - Math.sign(s)) / Math.sqrt(varianceFactor * variance);
  const byExact = exact && varianceFactor === 1 && tiedPairs === 0 && n <= LONGEST_EXACT;
  const pairs = (n * (n - 1)) / 2;
  return {
    n,
    s,
    variance,
    z,
    p: byExact ? kendallExactP(s, n) : Math.min(1, twoSidedP(z)),
    tauB: pairs > tiedPairs ? s / Math.sqrt(pairs * (pairs - tiedPairs)) : Number.NaN,
  };
}

/** The signs are counted without a branch: on unordered values it would be guessed wrong half of the time. */
function kendallS(values: Float64Array): number {
  let s = 0;
  for (let i = 0; i < values.length; i++) {
    const earlier = values[i];
    for (let j = i + 1; j < values.length; j++) s += Number(values[j] > earlier) - Number(values[j] < earlier);
  }
  return s;
}

/** Variance of S under no trend, corrected for ties, and the number of tied pairs.
 *  @param values  without NaN; left unchanged */
export function varianceOfS(values: Float64Array): { variance: number; tiedPairs: number } {
  const sorted = values.slice().sort();
  const n = sorted.length;
  let eighteenfold = n * (n - 1) * (2 * n + 5);
  let tiedPairs = 0;
  for (let start = 0; start < n; ) {
    let end = start + 1;
    while (end < n && sorted[end] === sorted[start]) end++;
    const tied = end - start;
    eighteenfold -= tied * (tied - 1) * (2 * tied + 5);
    tiedPairs += (tied * (tied - 1)) / 2;
    start = end;
  }
  return { variance: eighteenfold / 18, tiedPairs };
}
