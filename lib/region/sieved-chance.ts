import type { Basis } from '../basis.ts';
import { countS } from '../statistics/count-s.ts';
import { mannKendall } from '../statistics/mann-kendall.ts';
import { preWhitened, significantLag1 } from '../statistics/pre-whitening.ts';
import { replicateSlopes } from '../statistics/replicate-slopes.ts';
import { lag1OfRanks } from '../statistics/serial-correlation.ts';
import { type Replicates, type SieveTerms, sieve, sieveResiduals } from '../statistics/sieve.ts';

/** A ranked station as the sieve takes it. */
export interface SievedStation {
  code: string;
  years: readonly number[];
  /** what was tested, turned so that falling is drier */
  values: readonly number[];
  /** slope per year */
  slope: number;
}

export interface SievedTask {
  stations: readonly SievedStation[];
  /** of all ranked stations, also when only some of them are given here */
  terms: SieveTerms;
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>;
  replicates: number;
  seed: string;
}

/** What the test needs of every replicate of some stations: station i has the entries i·replicates to (i + 1)·replicates − 1.
 *  Whether it finds a trend may hang on all stations of a replicate: see settledTrends. */
export interface SievedSums {
  replicates: number;
  stations: number;
  /** S; under `pre-whitened` −1, 0 or 1 for falling, neither, rising by the test on whitened values */
  s: Int32Array;
  /** lag-1 correlation, freed of its bias and not yet cut, where the test takes one anew: `ar1` and `ar1-regional`; NaN
   *  elsewhere, and where it cannot be told */
  lag1: Float32Array;
}

/** Whether a serial correction takes its lag-1 correlation from each series. */
export const takesLag1 = (correction: Basis['serialCorrection']): boolean =>
  correction === 'ar1' || correction === 'ar1-regional';

/** Replicates of stations where none has a trend but years carry over as they do: those of the sieve without slope.
 *
 *  A station with too few consecutive years for a replicate keeps S = 0.
 *  Source: Bühlmann 1997, Bernoulli 3:123–148. */
export function sievedSums({ stations, terms, basis, replicates, seed }: SievedTask): SievedSums {
  const sums: SievedSums = {
    replicates,
    stations: stations.length,
    s: new Int32Array(stations.length * replicates),
    lag1: new Float32Array(stations.length * replicates).fill(Number.NaN),
  };
  const sieved = sieve(terms, seed, replicates);
  stations.forEach(({ code, years, values, slope }, i) => {
    const made = sieved.of({ years, residuals: sieveResiduals({ years, values, slope }) }, code);
    if (made) readReplicates(made, years, basis, sums, i * replicates);
  });
  return sums;
}

function readReplicates(
  made: Replicates,
  years: readonly number[],
  { alpha, serialCorrection }: SievedTask['basis'],
  { replicates, s, lag1 }: SievedSums,
  at: number,
): void {
  const replicate = new Float64Array(made.length);
  const space = new Float64Array(made.length);
  const places = years.map((year) => year - years[0]);
  const values = new Float64Array(years.length);
  const slopes = replicateSlopes(made.length, places, Number.POSITIVE_INFINITY);
  const needsSlope = takesLag1(serialCorrection) || serialCorrection === 'pre-whitened';
  for (let b = 0; b < replicates; b++) {
    made.next(replicate);
    s[at + b] = countS(replicate, space);
    if (!needsSlope) continue;
    const slope = slopes.read(replicate);
    for (let i = 0; i < places.length; i++) values[i] = replicate[places[i]];
    const series = { years, values, slope };
    if (serialCorrection === 'pre-whitened') s[at + b] = whitenedSign(series, alpha);
    else lag1[at + b] = lag1OfRanks(series);
  }
}

/** −1 falling, 1 rising, 0 neither: by the test on whitened values. */
function whitenedSign(series: Parameters<typeof significantLag1>[0], alpha: number): number {
  const r1 = significantLag1(series);
  const { p, z } = mannKendall(Number.isNaN(r1) ? series.values : preWhitened(series, r1).values);
  return p < alpha ? Math.sign(z) : 0;
}

/** Sums of several parts of the stations, one after the other. */
export function joinSums(parts: readonly SievedSums[]): SievedSums {
  const replicates = parts[0]?.replicates ?? 0;
  const stations = parts.reduce((sum, part) => sum + part.stations, 0);
  const joined = {
    replicates,
    stations,
    s: new Int32Array(stations * replicates),
    lag1: new Float32Array(stations * replicates),
  };
  let at = 0;
  for (const { s, lag1 } of parts) {
    joined.s.set(s, at);
    joined.lag1.set(lag1, at);
    at += s.length;
  }
  return joined;
}
