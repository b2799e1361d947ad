/** Benjamini–Hochberg adjusted p-values: p_(k)·m/k, with a running minimum from the largest, cut at 1.
 *  Rejecting those below alpha keeps the expected share of false rejections at alpha (independent or positively
 *  dependent tests).
 *  @param p  0 to 1; NaN is no test: it stays NaN and does not count in m; left unchanged
 *  @returns  same length and order as `p`
 *  @throws RangeError when a value lies outside 0..1
 *  Source: Benjamini & Hochberg 1995, J. R. Stat. Soc. B 57:289–300.
 *  Example: [0.01, 0.04, NaN, 0.03] → [0.03, 0.04, NaN, 0.04] */
export function benjaminiHochberg(p: ArrayLike<number>): Float64Array {
  const adjusted = new Float64Array(p.length).fill(Number.NaN);
  const tests: number[] = [];
  for (let i = 0; i < p.length; i++) {
    if (Number.isNaN(p[i])) continue;
    if (!(p[i] >= 0 && p[i] <= 1)) throw new RangeError(`benjaminiHochberg: p[${i}] must lie in 0..1, got ${p[i]}`);
    tests.push(i);
  }
  tests.sort((a, b) => p[b] - p[a]);
  let smallest = 1;
  tests.forEach((index, fromLargest) => {
    // the ratio first: p·m/m would leave p in the last bit
    smallest = Math.min(smallest, p[index] * (tests.length / (tests.length - fromLargest)));
    adjusted[index] = smallest;
  });
  return adjusted;
}
