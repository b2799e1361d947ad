import type { Basis } from '../basis.ts';
import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { sieve } from '../statistics/sieve.ts';
import type { PairTrend } from './pair-types.ts';
import { simulateStation } from './simulate-station.ts';
import { familyTerms, type SimulatedRow } from './simulated-family.ts';
import type { YearlySeries } from './trend-family.ts';

/** As many as the certainty of a ranking takes at least: the 80th percentile of 500 is good to a few percent of itself. */
const REPLICATES = 500;

/** The trend that a series by itself would have shown in four cases of five, in percent of `mean` per decade: by a sieve of
 *  its own, as for the stations of a ranking.
 *  @param mean  what the trend's percentages are of
 *  @returns     null without a trend, where the mean is not above 0, and where too few years follow one another
 *  Source: at simulateStation. */
export function detectablePercent(
  { years, values, label = '' }: YearlySeries,
  trend: PairTrend | null,
  { mean, serialCorrection, alpha, seed }: Pick<Basis, 'serialCorrection' | 'alpha'> & { mean: number; seed: string },
): number | null {
  if (!trend || !(mean > 0)) return null;
  const row: SimulatedRow = {
    ...{ code: label, rank: null, drying: false, trendOf: 'minima', areaKm2: null, meanValue: mean },
    ...{ years: [...years], values: [...values], valueSlope: trend.slopePerDecade },
    ...{ percentPerDecade: null, tau: trend.tau, r1: trend.r1, serialFactor: trend.serialFactor },
  };
  const terms = familyTerms([row]);
  if (!terms) return null;
  const basis = { rankBy: 'percent-per-decade', index: 'minimum', serialCorrection, alpha } as const;
  const { detectable } = simulateStation(row, sieve(terms, seed, REPLICATES), basis);
  const percent = (100 * YEARS_PER_DECADE * detectable) / mean;
  return Number.isFinite(percent) ? percent : null;
}
