import { normalQuantile } from './normal.ts';
import { ar1VarianceFactor, LARGEST_LAG1 } from './serial-correlation.ts';

/** Halvings of 0..0.95: to the last digits of a correlation kept in 32 bits. */
const HALVINGS = 30;

/** For the Mann–Kendall test of untied series of one length, with the factor for lag-1 correlation: up to which correlation an
 *  S is still rejected. So S and r1 of a million replicates are tested by one comparison each.
 *  @param n      number of values
 *  @param alpha  two-sided, between 0 and 1
 *  @returns      from |S| to the largest r1 at which it is rejected, 0 to 0.95; −1 when it is not rejected even at 0
 *  @throws RangeError when `alpha` does not lie between 0 and 1
 *  Source: ar1VarianceFactor; it grows with r1. */
export function largestLag1(n: number, alpha: number): (s: number) => number {
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`largestLag1: alpha must lie between 0 and 1, got ${alpha}`);
  const variance = (n * (n - 1) * (2 * n + 5)) / 18;
  const deviates = normalQuantile(1 - alpha / 2);
  const known = new Map<number, number>();
  const find = (s: number): number => {
    const rejected = (r: number) => s > 0 && s - 1 > deviates * Math.sqrt(ar1VarianceFactor(n, r) * variance);
    if (!rejected(0)) return -1;
    if (rejected(LARGEST_LAG1)) return LARGEST_LAG1;
    let low = 0;
    let high = LARGEST_LAG1;
    for (let halving = 0; halving < HALVINGS; halving++) {
      const middle = (low + high) / 2;
      if (rejected(middle)) low = middle;
      else high = middle;
    }
    return low;
  };
  return (s) => {
    const size = Math.abs(s);
    let largest = known.get(size);
    if (largest === undefined) {
      largest = find(size);
      known.set(size, largest);
    }
    return largest;
  };
}
