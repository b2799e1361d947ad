import { type DatedValues, detrended } from './detrend.ts';
import { pettitt } from './pettitt.ts';
import type { RandomStream } from './random.ts';

export const SIEVE_REPLICATES = 2000;

/** Years that a replicate runs before its first value, so that its beginning is like the rest. */
const RUN_IN_YEARS = 30;

/** Fewer innovations say nothing of their spread. */
const FEWEST_INNOVATIONS = 5;

export interface PettittSieveOptions {
  /** lag-1 correlation, 0 or more and below 1 */
  r1: number;
  /** a stream of this series' own */
  random: RandomStream;
  /** 2,000 by default */
  replicates?: number;
}

/** p-value of Pettitt's K where values carry over from year to year: the share of serially correlated series without any
 *  change whose K is as large.
 *
 *  Residuals e about the slope, centred; innovations u_t = e_t − r1·e_{t−1} over consecutive years, centred, times
 *  √(m/(m − 2)) for their number m. A replicate draws innovations with replacement, rebuilds e* with 30 years of run-in and
 *  takes it at the years of the series. p = (1 + #{K* ≥ K})/(replicates + 1).
 *  @returns NaN with fewer than 5 innovations
 *  @throws RangeError when r1 is outside its range or replicates is not a whole number of at least 1; else as `detrended`
 *  Source: sieve bootstrap of Bühlmann 1997, Bernoulli 3:123–148; statistic of Pettitt 1979, Appl. Stat. 28:126–135. */
export function pettittSieveP(
  series: DatedValues,
  { r1, random, replicates = SIEVE_REPLICATES }: PettittSieveOptions,
): number {
  if (!(r1 >= 0 && r1 < 1)) throw new RangeError(`pettittSieveP: r1 must lie in 0..1, below 1, got ${r1}`);
  if (!(Number.isInteger(replicates) && replicates >= 1)) {
    throw new RangeError(`pettittSieveP: replicates must be a whole number from 1, got ${replicates}`);
  }
  const innovations = innovationsOf(series, r1);
  if (innovations.length < FEWEST_INNOVATIONS) return Number.NaN;
  const { years, values } = series;
  const { k } = pettitt(values);
  const replicate = new Float64Array(values.length);
  let asLarge = 0;
  for (let round = 0; round < replicates; round++) {
    let e = 0;
    let year = years[0] - RUN_IN_YEARS;
    for (let i = 0; i < replicate.length; i++) {
      for (; year <= years[i]; year++) e = r1 * e + innovations[random.below(innovations.length)];
      replicate[i] = e;
    }
    if (pettitt(replicate).k >= k) asLarge++;
  }
  return (1 + asLarge) / (replicates + 1);
}

function innovationsOf(series: DatedValues, r1: number): Float64Array {
  const { years } = series;
  const rest = detrended(series, 'pettittSieveP');
  const mean = rest.reduce((sum, each) => sum + each, 0) / rest.length;
  const found: number[] = [];
  for (let i = 1; i < rest.length; i++) {
    if (years[i] === years[i - 1] + 1) found.push(rest[i] - mean - r1 * (rest[i - 1] - mean));
  }
  const m = found.length;
  const centre = found.reduce((sum, each) => sum + each, 0) / m;
  return Float64Array.from(found, (each) => (each - centre) * Math.sqrt(m / (m - 2)));
}
