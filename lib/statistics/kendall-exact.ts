/** Longest series whose exact distribution is offered; beyond it the normal approximation is close enough. */
export const LONGEST_EXACT = 10;

/** Exact two-sided p-value of Kendall's S when no values are tied: min(1, 2·P(S ≥ |s|)) over all orders alike likely.
 *  @param s  the statistic, −n(n − 1)/2 to n(n − 1)/2
 *  @param n  number of values, 2 to 10
 *  @throws RangeError when `n` or `s` lies outside these
 *  Source: Kendall 1970, Rank Correlation Methods, Appendix Table 1. Counts of orders by inversions are the
 *  coefficients of Π_{k=1..n} (1 + q + … + q^(k−1)).
 *  Example: s = 6, n = 4 → 1/12 */
export function kendallExactP(s: number, n: number): number {
  if (!(Number.isInteger(n) && n >= 2 && n <= LONGEST_EXACT)) {
    throw new RangeError(`kendallExactP: n must be a whole number 2..${LONGEST_EXACT}, got ${n}`);
  }
  const pairs = (n * (n - 1)) / 2;
  if (!(Number.isInteger(s) && Math.abs(s) <= pairs)) {
    throw new RangeError(`kendallExactP: s must be a whole number within ±${pairs} for n = ${n}, got ${s}`);
  }
  const orders = ordersByInversions(n);
  // S = pairs − 2·inversions, so S ≥ |s| means at most (pairs − |s|)/2 inversions
  const most = Math.floor((pairs - Math.abs(s)) / 2);
  let upper = 0;
  let all = 0;
  for (let inversions = 0; inversions <= pairs; inversions++) {
    all += orders[inversions];
    if (inversions <= most) upper += orders[inversions];
  }
  return Math.min(1, (2 * upper) / all);
}

function ordersByInversions(n: number): Float64Array {
  let counts = Float64Array.of(1);
  for (let k = 2; k <= n; k++) {
    const next = new Float64Array(counts.length + k - 1);
    for (let i = 0; i < counts.length; i++) {
      for (let added = 0; added < k; added++) next[i + added] += counts[i];
    }
    counts = next;
  }
  return counts;
}
