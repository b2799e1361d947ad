import { varianceOfS } from './mann-kendall.ts';
import { normalQuantile } from './normal.ts';
import { medianOfSorted, RANK_TOLERANCE, valueAtRank } from './quantile.ts';
import { selectInPlace } from './select.ts';

export interface SenSlopeOptions {
  /** what Var S is multiplied by, for serial correlation; 1 by default */
  varianceFactor?: number;
  /** level of the interval, between 0 and 1; 0.95 by default */
  confidence?: number;
}

export interface SenSlopeResult {
  /** median of the slopes of all pairs, in units of x per unit of t */
  slope: number;
  /** median of x − slope·t */
  intercept: number;
  /** limits of the interval; NaN where its rank falls outside the list of slopes */
  low: number;
  high: number;
  /** number of pairs, and so of slopes */
  pairs: number;
}

/** Theil–Sen slope with its rank-based interval.
 *  The slope is the median of (x_j − x_i)/(t_j − t_i) over all pairs. With N' slopes in rising order and
 *  C = z·√(varianceFactor·Var S), Var S corrected for ties, the limits stand at the ranks (N' − C)/2 and (N' + C)/2 + 1,
 *  interpolated between slopes.
 *  @param t  times, rising; gaps are what they are: slopes divide by the difference in time, not in position
 *  @param x  values, same length as `t`, NaN where missing (left out); both left unchanged
 *  @returns  NaN figures and 0 pairs when fewer than two values exist
 *  @throws RangeError when lengths differ, times do not rise, a number is infinite, confidence is not between 0 and 1,
 *          or varianceFactor is not positive
 *  Source: Theil 1950; Sen 1968, J. Am. Stat. Assoc. 63:1379–1389; interval of Gilbert 1987, Statistical Methods for
 *  Environmental Pollution Monitoring, section 16.5; intercept of Conover 1980, Practical Nonparametric Statistics.
 *  Example: t = [1, 2, 4], x = [1, 2, 6] → slope 5/3 */
export function senSlope(t: ArrayLike<number>, x: ArrayLike<number>, options: SenSlopeOptions = {}): SenSlopeResult {
  return pairwiseSlopes(t, x).withInterval(options);
}

/** The slopes of all pairs, for a caller who needs the slope before it can say how wide the interval is. */
export interface PairwiseSlopes {
  /** median of the slopes; NaN when there are none */
  slope: number;
  /** the figures of `senSlope` */
  withInterval(options?: SenSlopeOptions): SenSlopeResult;
}

/** First half of `senSlope`, with the same inputs and errors: the slope; its interval on asking. */
export function pairwiseSlopes(t: ArrayLike<number>, x: ArrayLike<number>): PairwiseSlopes {
  const { times, values } = presentPairs(t, x);
  const slopes = slopesOfPairs(times, values);
  const pairs = slopes.length;
  const last = pairs - 1;
  // Only the few ranks that are read are put in their place. The middle stays, and parts the low ones from the high.
  const middle = last >> 1;
  putInPlace(slopes, middle, 0, last);
  const slope = medianOfSorted(slopes);
  return {
    slope,
    withInterval(options) {
      const reach = reachOfInterval(values, options);
      const low = (pairs - reach) / 2;
      const high = (pairs + reach) / 2 + 1;
      putInPlace(slopes, Math.floor(low + RANK_TOLERANCE) - 1, 0, middle - 1);
      putInPlace(slopes, Math.floor(high + RANK_TOLERANCE) - 1, middle + 1, last);
      return {
        slope,
        intercept: medianOfSorted(values.map((value, i) => value - slope * times[i]).sort()),
        low: valueAtRank(slopes, low),
        high: valueAtRank(slopes, high),
        pairs,
      };
    },
  };
}

/** Puts the values of two neighbouring positions in place, as far as they lie in the stretch. */
function putInPlace(slopes: Float64Array, position: number, from: number, to: number): void {
  if (position >= from && position <= to) selectInPlace(slopes, position, from, to);
  // what stands at `position` must not move again
  const next = position + 1;
  if (next >= from && next <= to) selectInPlace(slopes, next, Math.max(from, next), to);
}

/** C of the interval: how many ranks it reaches, both ways together. */
function reachOfInterval(
  values: Float64Array,
  { varianceFactor = 1, confidence = 0.95 }: SenSlopeOptions = {},
): number {
  if (!(confidence > 0 && confidence < 1)) {
    throw new RangeError(`senSlope: confidence must lie between 0 and 1, got ${confidence}`);
  }
  if (!(varianceFactor > 0 && Number.isFinite(varianceFactor))) {
    throw new RangeError(`senSlope: varianceFactor must be a positive number, got ${varianceFactor}`);
  }
  return normalQuantile(0.5 + confidence / 2) * Math.sqrt(varianceFactor * varianceOfS(values).variance);
}

function slopesOfPairs(times: Float64Array, values: Float64Array): Float64Array {
  const n = values.length;
  const slopes = new Float64Array((n * (n - 1)) / 2);
  let next = 0;
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++) slopes[next++] = (values[j] - values[i]) / (times[j] - times[i]);
  }
  return slopes;
}

function presentPairs(t: ArrayLike<number>, x: ArrayLike<number>): { times: Float64Array; values: Float64Array } {
  if (t.length !== x.length) {
    throw new RangeError(`senSlope: t and x must have the same length, got ${t.length} and ${x.length}`);
  }
  const times = new Float64Array(t.length);
  const values = new Float64Array(x.length);
  let count = 0;
  for (let i = 0; i < t.length; i++) {
    if (!Number.isFinite(t[i]) || (i > 0 && t[i] <= t[i - 1])) {
      throw new RangeError(`senSlope: t must rise, got t[${i}] = ${t[i]}${i > 0 ? ` after ${t[i - 1]}` : ''}`);
    }
    if (Number.isNaN(x[i])) continue;
    if (!Number.isFinite(x[i])) throw new RangeError(`senSlope: x[${i}] must be a finite number or NaN, got ${x[i]}`);
    times[count] = t[i];
    values[count++] = x[i];
  }
  return { times: times.subarray(0, count), values: values.subarray(0, count) };
}
