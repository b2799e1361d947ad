import type { Basis } from '../basis.ts';
import { largestLag1 } from '../statistics/largest-lag1.ts';
import { cutLag1, shrinkLag1 } from '../statistics/serial-correlation.ts';
import { noTrendBits, noteTrend, type TrendBits } from '../statistics/trend-bits.ts';
import { FEWEST_FOR_REGIONAL } from './serial-terms.ts';
import { type SievedSums, takesLag1 } from './sieved-chance.ts';

export interface SettledTask {
  /** of all ranked stations: in each replicate their correlations are drawn towards their mean */
  sums: SievedSums;
  /** number of values of each station */
  lengths: ArrayLike<number>;
  /** smallest S that each station's test rejects with the serial factor of its record: for the corrections that take no
   *  lag-1 correlation */
  critical: ArrayLike<number>;
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>;
}

/** Tests every replicate of the sieve as the ranking tests: under `ar1` and `ar1-regional` with the correlations of the
 *  replicate, as noisy as those of the record are; under the others with the factor of the record. Replicates of a sieve are
 *  never tied. */
export function settledTrends(task: SettledTask): TrendBits {
  const { sums, critical, basis } = task;
  if (takesLag1(basis.serialCorrection)) return withOwnLag1(task);
  const bits = noTrendBits(sums.stations, sums.replicates);
  const least = (i: number) => (basis.serialCorrection === 'pre-whitened' ? 1 : critical[i]);
  for (let i = 0; i < sums.stations; i++) {
    for (let b = 0; b < sums.replicates; b++) noteTrend(bits, i, b, sums.s[i * sums.replicates + b], least(i));
  }
  return bits;
}

function withOwnLag1({ sums, lengths, basis }: SettledTask): TrendBits {
  const { stations, replicates, s, lag1 } = sums;
  const regional = basis.serialCorrection === 'ar1-regional' && stations >= FEWEST_FOR_REGIONAL;
  const byLength = new Map(Array.from(new Set(Array.from(lengths)), (n) => [n, largestLag1(n, basis.alpha)]));
  const largest = Array.from(lengths, (n) => byLength.get(n)!);
  const bits = noTrendBits(stations, replicates);
  const own = new Float64Array(stations);
  for (let b = 0; b < replicates; b++) {
    for (let i = 0; i < stations; i++) own[i] = lag1[i * replicates + b];
    const r1 = regional ? shrinkLag1(own, lengths) : own;
    for (let i = 0; i < stations; i++) {
      const sum = s[i * replicates + b];
      // a correlation that cannot be told counts as none
      const rejected = largest[i](sum) >= cutLag1(Number.isNaN(r1[i]) ? 0 : r1[i]);
      if (rejected) noteTrend(bits, i, b, sum, 1);
    }
  }
  return bits;
}
