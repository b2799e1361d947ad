import { normalQuantile } from './normal.ts';
import { presentValues } from './present-values.ts';
import { medianOfSorted, valueAtRank } from './quantile.ts';
import { checkFactor, varianceOfU } from './rank-sum.ts';

export interface HodgesLehmannOptions {
  /** what Var U is multiplied by, for serial correlation; 1 by default */
  varianceFactor?: number;
  /** level of the interval, between 0 and 1; 0.95 by default */
  confidence?: number;
}

export interface Difference {
  /** median of after − before over all pairs, in units of the values */
  difference: number;
  /** limits of the interval; NaN where its rank falls outside the list of differences */
  low: number;
  high: number;
}

/** Hodges–Lehmann difference of two parts of a series, after − before, with its rank-based interval.
 *  The median of all n1·n2 differences in rising order; with C = 2·z·√(varianceFactor·Var U) the limits stand at the ranks
 *  (n1·n2 − C)/2 and (n1·n2 + C)/2 + 1, interpolated: the shifts that the rank-sum test would not reject. Var U is
 *  corrected for ties within each part; those between the parts end when one is shifted.
 *  @param before  values of the one part and of the other, NaN where missing (left out); left unchanged
 *  @returns       NaN figures when a part has no value
 *  @throws RangeError when a value is infinite, varianceFactor is not a positive number, or confidence is not between 0 and
 *                 1
 *  Source: Hodges & Lehmann 1963, Ann. Math. Stat. 34:598–611; interval for large samples of Hollander & Wolfe 1973,
 *  Nonparametric Statistical Methods, chapter 4.
 *  Example: [1, 2, 4], [3, 5, 6] → 2 */
export function hodgesLehmann(
  before: ArrayLike<number>,
  after: ArrayLike<number>,
  { varianceFactor = 1, confidence = 0.95 }: HodgesLehmannOptions = {},
): Difference {
  checkFactor('hodgesLehmann', varianceFactor);
  if (!(confidence > 0 && confidence < 1)) {
    throw new RangeError(`hodgesLehmann: confidence must lie between 0 and 1, got ${confidence}`);
  }
  const first = presentValues(before, 'hodgesLehmann');
  const second = presentValues(after, 'hodgesLehmann');
  const pairs = first.length * second.length;
  if (pairs === 0) return { difference: Number.NaN, low: Number.NaN, high: Number.NaN };

  const differences = new Float64Array(pairs);
  let next = 0;
  for (const later of second) for (const earlier of first) differences[next++] = later - earlier;
  differences.sort();
  const variance = varianceOfU(first.length, second.length, [first, second]);
  const reach = 2 * normalQuantile(0.5 + confidence / 2) * Math.sqrt(varianceFactor * variance);
  return {
    difference: medianOfSorted(differences),
    low: valueAtRank(differences, (pairs - reach) / 2),
    high: valueAtRank(differences, (pairs + reach) / 2 + 1),
  };
}
