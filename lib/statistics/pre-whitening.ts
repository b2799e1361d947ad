import { type DatedValues, detrended, roundDetrended } from './detrend.ts';
import { normalQuantile } from './normal.ts';

/** Fewer pairs of consecutive years say nothing of a correlation between them. */
const FEWEST_PAIRS = 4;

/** Whitening by more would leave nothing but rounding. */
const LARGEST_LAG1 = 0.95;

/** Lag-1 autocorrelation of the detrended values when it is significant, so that they are to be whitened.
 *  r = (Σ over pairs of consecutive years d_t·d_{t+1}/pairs)/(Σ d²/n), d centred; with N = pairs + 1 (the number of values
 *  of a full series) it is significant at 10 % outside (−1 ∓ 1.645·√(N − 2))/(N − 1). Cut to ±0.95.
 *  @returns NaN when there is none: inside the limits, fewer than 4 pairs, or no spread about the trend
 *  @throws RangeError when lengths differ, years do not rise, or a number is not finite
 *  Source: Yue, Pilon, Phinney & Cavadias 2002, Hydrol. Process. 16:1807–1829; limits of Anderson 1942, Ann. Math. Stat.
 *  13:1–13. */
export function significantLag1(series: DatedValues): number {
  const { years } = series;
  const rest = detrended(series, 'significantLag1');
  const n = rest.length;
  // about the first value, or the mean of equal ones would differ from them in the last bit
  const mean = n === 0 ? 0 : rest[0] + rest.reduce((sum, each) => sum + (each - rest[0]), 0) / n;
  let products = 0;
  let squares = 0;
  let pairs = 0;
  for (let i = 0; i < n; i++) {
    const deviation = rest[i] - mean;
    squares += deviation * deviation;
    if (i === 0 || years[i] !== years[i - 1] + 1) continue;
    products += deviation * (rest[i - 1] - mean);
    pairs++;
  }
  if (pairs < FEWEST_PAIRS || squares === 0) return Number.NaN;
  const lag1 = products / pairs / (squares / n);
  const reach = normalQuantile(0.95) * Math.sqrt(pairs - 1);
  const inside = lag1 >= (-1 - reach) / pairs && lag1 <= (-1 + reach) / pairs;
  return inside ? Number.NaN : Math.min(LARGEST_LAG1, Math.max(-LARGEST_LAG1, lag1));
}

/** Trend-free pre-whitening: lag-1 correlation is taken out of the detrended values, and the trend laid on again.
 *  y_t = (d_t − r1·d_{t−1}) + slope·t, rounded to 9 decimals, for every year whose year before exists: the first value of
 *  the series and the first after each gap are lost. The level of y has no meaning.
 *  @param r1  as from `significantLag1`, above −1 and below 1
 *  @throws RangeError when lengths differ, years do not rise, a number is not finite or `r1` is outside its range
 *  Source: Yue et al. 2002 (as above). It does not cure false alarms, which `npm run validate` counts. */
export function preWhitened(series: DatedValues, r1: number): { years: number[]; values: number[] } {
  if (!(r1 > -1 && r1 < 1)) throw new RangeError(`preWhitened: r1 must lie between −1 and 1, got ${r1}`);
  const { years, slope } = series;
  const rest = detrended(series, 'preWhitened');
  const whitened: { years: number[]; values: number[] } = { years: [], values: [] };
  for (let i = 1; i < rest.length; i++) {
    if (years[i] !== years[i - 1] + 1) continue;
    whitened.years.push(years[i]);
    whitened.values.push(roundDetrended(rest[i] - r1 * rest[i - 1] + slope * (years[i] - years[0])));
  }
  return whitened;
}
