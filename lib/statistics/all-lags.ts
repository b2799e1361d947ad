import { type DatedValues, detrended } from './detrend.ts';
import { normalQuantile } from './normal.ts';
import { averageRanks } from './ranks.ts';

/** Below this there is no lag whose correlation the factor counts. */
const FEWEST_VALUES = 4;

export interface AllLags {
  /** what Var S is multiplied by */
  factor: number;
  /** the lags that counted, in years, rising */
  lags: number[];
}

/** Factor by which serial correlation at all significant lags changes Var S.
 *  f = 1 + 2/(n(n − 1)(n − 2)) Σ_k (n − k)(n − k − 1)(n − k − 2)·ρ_k over the lags k = 1..n − 1 with |ρ_k| > 1.96/√n;
 *  ρ_k is the autocorrelation of the average ranks of the detrended series. With gaps, ρ_k is taken over pairs of values k
 *  years apart, × n/(pairs + k), which is 1 in a full series. Negative correlations count as well, so that f may be below
 *  1; where it is not above 0 the method has no answer, and the factor is 1.
 *  @returns factor 1 and no lags for fewer than 4 values or none that differ about the trend
 *  @throws RangeError when lengths differ, years do not rise, or a number is not finite
 *  Source: Hamed & Rao 1998, A modified Mann-Kendall trend test for autocorrelated data, J. Hydrol. 204:182–196, as
 *  published. It gives too many false alarms, which `npm run validate` counts. */
export function allLagsVarianceFactor(series: DatedValues): AllLags {
  const { years } = series;
  const ranks = averageRanks(detrended(series, 'allLagsVarianceFactor'));
  const n = ranks.length;
  const deviations = ranks.map((rank) => rank - (n + 1) / 2);
  const squares = deviations.reduce((sum, each) => sum + each * each, 0);
  if (n < FEWEST_VALUES || squares === 0) return { factor: 1, lags: [] };

  const limit = normalQuantile(0.975) / Math.sqrt(n);
  const lags: number[] = [];
  let sum = 0;
  for (let lag = 1; lag < n; lag++) {
    const { products, pairs } = laggedProducts(years, deviations, lag);
    const correlation = ((products / squares) * n) / (pairs + lag);
    if (!(Math.abs(correlation) > limit)) continue;
    lags.push(lag);
    sum += (n - lag) * (n - lag - 1) * (n - lag - 2) * correlation;
  }
  const factor = 1 + (2 * sum) / (n * (n - 1) * (n - 2));
  return factor > 0 ? { factor, lags } : { factor: 1, lags: [] };
}

/** Σ of products of values that lie `lag` years apart, and the number of such pairs. */
function laggedProducts(years: ArrayLike<number>, deviations: Float64Array, lag: number) {
  let products = 0;
  let pairs = 0;
  let earlier = 0;
  for (let later = 0; later < deviations.length; later++) {
    while (years[earlier] < years[later] - lag) earlier++;
    if (years[earlier] !== years[later] - lag) continue;
    products += deviations[later] * deviations[earlier];
    pairs++;
  }
  return { products, pairs };
}
