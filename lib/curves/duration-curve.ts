import { sortAscending } from '../series/sort-ascending.ts';

/** A flow-duration curve: every flow with the share of time for which it is equalled or exceeded. */
export interface DurationCurve {
  /** flows in falling order; element r − 1 has exceedance r/(n + 1) */
  sorted: Float64Array;
  n: number;
}

/** Flow-duration curve of daily flows, all days pooled, with Weibull plotting positions.
 *  @param flows  any unit, NaN skipped; left unchanged
 *  @returns      an empty curve when there is no flow
 *  Source: Searcy, 1959, Flow-duration curves, USGS Water-Supply Paper 1542-A. */
export function durationCurve(flows: Float64Array): DurationCurve {
  const sorted = sortAscending(flows).reverse();
  return { sorted, n: sorted.length };
}

/** Exceedance of the r-th largest of n flows, r from 1: r/(n + 1), Weibull.
 *  @throws RangeError when `rank` is not a whole number in 1..n */
export function exceedanceOfRank(rank: number, n: number): number {
  if (!Number.isInteger(rank) || rank < 1 || rank > n) {
    throw new RangeError(`exceedanceOfRank: rank must be a whole number in 1..${n}, got ${rank}`);
  }
  return rank / (n + 1);
}

/** Flow that is equalled or exceeded a share `p` of the time, linear in p between the ranked flows (type 6).
 *  @param p   exceedance, 0 to 1
 *  @returns   in the curve's unit; NaN outside [1/(n + 1), n/(n + 1)], where the record says nothing
 *  @throws RangeError when `p` is not in 0..1
 *  Source: Hyndman & Fan, 1996, Sample quantiles in statistical packages, The American Statistician 50, definition 6.
 *  Example: flows 3, 2, 1: p = 0.375 → 2.5 */
export function flowAtExceedance(curve: DurationCurve, p: number): number {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`flowAtExceedance: p must lie in 0–1, got ${p}`);
  const { sorted, n } = curve;
  // Compared as exceedances and not as ranks, so that 1/(n + 1) itself is inside whatever its rounding.
  if (n === 0 || p < 1 / (n + 1) || p > n / (n + 1)) return Number.NaN;
  const rank = Math.min(n, Math.max(1, p * (n + 1)));
  const below = Math.floor(rank);
  const share = rank - below;
  const flow = sorted[below - 1];
  return share === 0 ? flow : flow + share * (sorted[below] - flow);
}
