import { presentValues } from './present-values.ts';
import { selectInPlace } from './select.ts';

/** Ranks this near to a whole number are that number: (n + 1)·p carries a rounding error. */
export const RANK_TOLERANCE = 1e-9;

/** Sample quantile by plotting positions r/(n + 1), linear between order statistics (type 6).
 *  @param sorted       values in rising order, without NaN; left unchanged
 *  @param probability  share of values below the quantile, 0 to 1
 *  @returns            NaN where the sample says nothing: outside [1/(n + 1), n/(n + 1)], and for an empty sample
 *  @throws RangeError  when `probability` is not in 0..1
 *  Source: Hyndman & Fan 1996, Sample quantiles in statistical packages, Am. Stat. 50:361–365, definition 6.
 *  Example: [1, 2, 2, 3] at 0.25 → 1.25 */
export function quantileType6(sorted: ArrayLike<number>, probability: number): number {
  if (!(probability >= 0 && probability <= 1)) {
    throw new RangeError(`quantileType6: probability must lie in 0..1, got ${probability}`);
  }
  return valueAtRank(sorted, (sorted.length + 1) * probability);
}

/** `quantileType6` of values in any order, without putting all of them in order: for one quantile of many values.
 *  @param x  NaN where missing; left unchanged
 *  @throws RangeError as `quantileType6`, and for an infinite value */
export function quantileOfUnsorted(x: ArrayLike<number>, probability: number): number {
  const values = presentValues(x, 'quantileOfUnsorted');
  const last = values.length - 1;
  // the two order statistics on either side of the rank are all that is read
  const below = Math.floor((values.length + 1) * probability) - 1;
  if (below >= 0 && below <= last) selectInPlace(values, below);
  if (below + 1 >= 0 && below + 1 <= last) selectInPlace(values, below + 1, Math.max(0, below + 1), last);
  return quantileType6(values, probability);
}

/** Value at a rank that need not be whole, linear between order statistics.
 *  @param sorted  values in rising order, without NaN
 *  @param rank    1 is the smallest value
 *  @returns       NaN outside 1..n
 *  Example: [10, 20, 40] at 2.5 → 30 */
export function valueAtRank(sorted: ArrayLike<number>, rank: number): number {
  const nearest = Math.round(rank);
  const exact = Math.abs(rank - nearest) <= RANK_TOLERANCE ? nearest : rank;
  if (!(exact >= 1 && exact <= sorted.length)) return Number.NaN;
  const below = Math.floor(exact);
  const lower = sorted[below - 1];
  return exact === below ? lower : lower + (exact - below) * (sorted[below] - lower);
}

/** Median of the values that exist; the mean of the middle two when their number is even.
 *  @param x  NaN where missing; left unchanged
 *  @returns  NaN when there is no value
 *  Example: [4, NaN, 1, 2] → 2 */
export function median(x: ArrayLike<number>): number {
  return medianOfSorted(presentValues(x, 'median').sort());
}

/** `median` for values that already are in rising order, without NaN. */
export function medianOfSorted(sorted: ArrayLike<number>): number {
  if (sorted.length === 0) return Number.NaN;
  const middle = sorted.length >> 1;
  return sorted.length % 2 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
