import { kendallExactP, LONGEST_EXACT } from './kendall-exact.ts';
import { twoSidedP } from './normal.ts';

export interface CriticalSOptions {
  /** number of values */
  n: number;
  /** Var S of these values, corrected for ties, before `varianceFactor` */
  variance: number;
  /** two-sided, between 0 and 1 */
  alpha: number;
  /** what Var S is multiplied by; 1 by default */
  varianceFactor?: number;
  /** take p from the exact distribution where `mannKendall` does: n ≤ 10, no ties, varianceFactor 1; false by default */
  exact?: boolean;
  /** whether values are tied; only read with `exact` */
  tied?: boolean;
}

/** The smallest positive S that the Mann–Kendall test rejects: p < alpha from here on, by the same p as `mannKendall`.
 *  For values that are put in another order Var S stays, so that S alone tells.
 *  @returns a whole number; Infinity when no S of `n` values is rejected
 *  @throws RangeError when `alpha` does not lie between 0 and 1, or `varianceFactor` is not positive
 *  Source: Kendall 1975, Rank Correlation Methods.
 *  Example: n = 10, variance 125, alpha 0.05 → 23, since (22 − 1)/√125 = 1.878 and (23 − 1)/√125 = 1.968 */
export function criticalS(options: CriticalSOptions): number {
  const { n, variance, alpha, varianceFactor = 1, exact = false, tied = false } = options;
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`criticalS: alpha must lie between 0 and 1, got ${alpha}`);
  if (!(varianceFactor > 0)) throw new RangeError(`criticalS: varianceFactor must be positive, got ${varianceFactor}`);
  const largest = (n * (n - 1)) / 2;
  if (!(variance > 0)) return Number.POSITIVE_INFINITY;
  const byExact = exact && !tied && varianceFactor === 1 && n <= LONGEST_EXACT;
  const deviation = Math.sqrt(varianceFactor * variance);
  const rejected = (s: number) => (byExact ? kendallExactP(s, n) : Math.min(1, twoSidedP((s - 1) / deviation))) < alpha;
  // p falls as S grows: halve the stretch in which it crosses alpha
  let [kept, found] = [0, largest + 1];
  while (found - kept > 1) {
    const middle = (kept + found) >> 1;
    if (rejected(middle)) found = middle;
    else kept = middle;
  }
  return found > largest ? Number.POSITIVE_INFINITY : found;
}
