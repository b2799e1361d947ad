import type { DatedValues } from './detrend.ts';
import { pettitt } from './pettitt.ts';
import { sieve, sieveResiduals, sieveTerms } from './sieve.ts';

const PETTITT_REPLICATES = 2000;

export interface PettittSieveOptions {
  /** lag-1 correlation, 0 or more and below 1 */
  r1: number;
  /** any text; with it the draws are always the same */
  seed: string;
  /** 2,000 by default */
  replicates?: number;
}

/** p-value of Pettitt's K where values carry over from year to year: the share of serially correlated series without any
 *  change, from the sieve of the series' own residuals about its slope, whose K is as large.
 *  p = (1 + #{K* ≥ K})/(replicates + 1).
 *  @returns NaN with fewer than three pairs of consecutive years
 *  @throws RangeError when r1 is outside its range or replicates is not a whole number of at least 1; else as
 *          `sieveResiduals` and `sieve`
 *  Source: sieve bootstrap, see `sieve`; statistic of Pettitt 1979, Appl. Stat. 28:126–135. */
export function pettittSieveP(
  series: DatedValues,
  { r1, seed, replicates = PETTITT_REPLICATES }: PettittSieveOptions,
): number {
  if (!(r1 >= 0 && r1 < 1)) throw new RangeError(`pettittSieveP: r1 must lie in 0..1, below 1, got ${r1}`);
  const { years, values } = series;
  if (values.length === 0) return Number.NaN;
  const residuals = sieveResiduals(series);
  const drawn = sieve(sieveTerms([years], r1), seed, replicates).of({ years, residuals }, 'change point');
  if (drawn === null) return Number.NaN;
  const { k } = pettitt(values);
  const replicate = new Float64Array(drawn.length);
  let asLarge = 0;
  for (let round = 0; round < replicates; round++) {
    drawn.next(replicate);
    if (pettitt(replicate).k >= k) asLarge++;
  }
  return (1 + asLarge) / (replicates + 1);
}
