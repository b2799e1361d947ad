import { type DatedValues, detrended } from './detrend.ts';
import { averageRanks } from './ranks.ts';

/** The bias correction divides by n − 4. */
const FEWEST_VALUES = 5;

/** Upper cut of a lag-1 correlation, so that the variance factor stays finite in effect. */
export const LARGEST_LAG1 = 0.95;

/** Lag-1 autocorrelation of the average ranks R of the detrended series, freed of its bias, not yet cut.
 *  r = Σ over pairs of consecutive years (R_t − R̄)(R_{t+1} − R̄) × n/(pairs + 1), over Σ (R − R̄)²; then
 *  (n·r + 1)/(n − 4), so a result may leave −1..1.
 *  @returns NaN when there is no answer: fewer than 5 values, no two consecutive years, or no spread about the trend
 *  @throws RangeError when lengths differ, years do not rise, or a number is not finite
 *  Source: Salas et al. 1980, Applied Modeling of Hydrologic Time Series (bias); ranks as in Hamed & Rao 1998,
 *  J. Hydrol. 204:182–196. */
export function lag1OfRanks(series: DatedValues): number {
  const { years } = series;
  const ranks = averageRanks(detrended(series, 'lag1OfRanks'));
  const n = ranks.length;
  const meanRank = (n + 1) / 2;
  let products = 0;
  let squares = 0;
  let pairs = 0;
  for (let i = 0; i < n; i++) {
    const deviation = ranks[i] - meanRank;
    squares += deviation * deviation;
    if (i === 0 || years[i] !== years[i - 1] + 1) continue;
    products += deviation * (ranks[i - 1] - meanRank);
    pairs++;
  }
  if (n < FEWEST_VALUES || pairs === 0 || squares === 0) return Number.NaN;
  const lag1 = ((products / squares) * n) / (pairs + 1);
  return (n * lag1 + 1) / (n - 4);
}

/** Draws lag-1 correlations of many series towards their mean, by what of their spread is not sampling error.
 *  r̄ + v/(v + 1/n̄)·(r_i − r̄) with v = max(0, var(r_i) − 1/n̄), var over M − 1 and n̄ the mean length.
 *  @param r  as from `lag1OfRanks`, not yet cut; a NaN brings nothing in and comes out as the mean
 *  @param n  length of each series; same length as `r`
 *  @returns  same length; NaN throughout when every `r` is NaN
 *  @throws RangeError when lengths differ, a length is not positive or a correlation is infinite
 *  Source: the shrinkage estimator of Efron & Morris 1975, J. Am. Stat. Assoc. 70:311–319, with 1/n as the sampling
 *  variance of a lag-1 correlation (Bartlett 1946). */
export function shrinkLag1(r: Float64Array, n: ArrayLike<number>): Float64Array {
  if (r.length !== n.length) {
    throw new RangeError(`shrinkLag1: r and n must have the same length, got ${r.length} and ${n.length}`);
  }
  let count = 0;
  let sum = 0;
  let sumLengths = 0;
  for (let i = 0; i < r.length; i++) {
    if (!(n[i] > 0)) throw new RangeError(`shrinkLag1: n[${i}] must be positive, got ${n[i]}`);
    if (Number.isNaN(r[i])) continue;
    if (!Number.isFinite(r[i])) throw new RangeError(`shrinkLag1: r[${i}] must be a finite number or NaN, got ${r[i]}`);
    count++;
    sum += r[i];
    sumLengths += n[i];
  }
  const mean = sum / count;
  const samplingVariance = count / sumLengths;
  let squares = 0;
  for (const value of r) if (!Number.isNaN(value)) squares += (value - mean) ** 2;
  const between = count < 2 ? 0 : Math.max(0, squares / (count - 1) - samplingVariance);
  const weight = between / (between + samplingVariance);
  return r.map((value) => (Number.isNaN(value) ? mean : mean + weight * (value - mean)));
}

/** A lag-1 correlation cut to 0..0.95; NaN stays NaN. Negative ones count as none, for they would make a test bolder. */
export function cutLag1(r: number): number {
  return Math.min(LARGEST_LAG1, Math.max(0, r));
}

/** Factor by which lag-1 (first-order autoregressive) correlation of the ranks raises Var S.
 *  f = 1 + 2/(n(n − 1)(n − 2)) Σ_{k=1..n−1} (n − k)(n − k − 1)(n − k − 2)·r1^k.
 *  @param n   number of values; below 3 the factor is 1
 *  @param r1  lag-1 correlation, above −1 and below 1
 *  @throws RangeError when `n` is not a whole number of at least 0, or `r1` is outside its range
 *  Source: form of Hamed & Rao 1998, J. Hydrol. 204:182–196, with the lag-1 model after Yue & Wang 2004, Water Resour.
 *  Manag. 18:201–218.   Example: n = 4, r1 = 0.5 → 1 + 2/24·6·0.5 = 1.25 */
export function ar1VarianceFactor(n: number, r1: number): number {
  if (!(Number.isInteger(n) && n >= 0)) throw new RangeError(`ar1VarianceFactor: n must be a whole number, got ${n}`);
  if (!(r1 > -1 && r1 < 1)) throw new RangeError(`ar1VarianceFactor: r1 must lie between −1 and 1, got ${r1}`);
  if (n < 3) return 1;
  let sum = 0;
  let power = 1;
  for (let k = 1; k < n - 2; k++) {
    power *= r1;
    sum += (n - k) * (n - k - 1) * (n - k - 2) * power;
  }
  return 1 + (2 * sum) / (n * (n - 1) * (n - 2));
}
