import type { Basis } from '../basis.ts';
import { countS } from '../statistics/count-s.ts';
import { mannKendall } from '../statistics/mann-kendall.ts';
import { preWhitened, significantLag1 } from '../statistics/pre-whitening.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { type SieveTerms, sieve, sieveResiduals } from '../statistics/sieve.ts';
import { noTrendBits, noteTrend, type TrendBits } from '../statistics/trend-bits.ts';

/** A ranked station as the sieve takes it. */
export interface SievedStation {
  code: string;
  years: readonly number[];
  /** what was tested, turned so that falling is drier */
  values: readonly number[];
  /** slope per year */
  slope: number;
  /** smallest S that its test rejects with the serial factor that the ranking used */
  critical: number;
}

export interface SievedChanceTask {
  stations: readonly SievedStation[];
  /** of all ranked stations, also when only some of them are given here */
  terms: SieveTerms;
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>;
  replicates: number;
  seed: string;
}

/** Which replicates make which stations fall or rise where none has a trend, but years carry over as they do: replicates of
 *  the sieve without slope, tested as the ranking tests. The serial factor stays that of the record, which is what the
 *  count found was tested with; under `pre-whitened` every replicate is whitened anew.
 *
 *  A station with too few consecutive years for a replicate neither falls nor rises in any.
 *  Source: Bühlmann 1997, Bernoulli 3:123–148. */
export function sievedChance({ stations, terms, basis, replicates, seed }: SievedChanceTask): TrendBits {
  const bits = noTrendBits(stations.length, replicates);
  const sieved = sieve(terms, seed, replicates);
  stations.forEach(({ code, years, values, slope, critical }, i) => {
    const made = sieved.of({ years, residuals: sieveResiduals({ years, values, slope }) }, code);
    if (made === null) return;
    const replicate = new Float64Array(made.length);
    const space = new Float64Array(made.length);
    for (let b = 0; b < replicates; b++) {
      made.next(replicate);
      if (basis.serialCorrection === 'pre-whitened') noteTrend(bits, i, b, whitenedSign(replicate, basis.alpha), 1);
      else noteTrend(bits, i, b, countS(replicate, space), critical);
    }
  });
  return bits;
}

/** −1 falling, 1 rising, 0 neither: by the test on whitened values. */
function whitenedSign(replicate: Float64Array, alpha: number): number {
  const years: number[] = [];
  const values: number[] = [];
  replicate.forEach((value, year) => {
    if (Number.isNaN(value)) return;
    years.push(year);
    values.push(value);
  });
  const series = { years, values, slope: pairwiseSlopes(years, values).slope };
  const r1 = significantLag1(series);
  const { p, z } = mannKendall(Number.isNaN(r1) ? values : preWhitened(series, r1).values);
  return p < alpha ? Math.sign(z) : 0;
}
