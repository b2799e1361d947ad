import type { Basis } from '../../basis.ts';
import { type ChanceSeries, chanceSeries, type TestedRow } from '../../region/chance-series.ts';
import { type SettledTask, settledTrends } from '../../region/settled-trends.ts';
import { type SievedSums, type SievedTask, sievedSums } from '../../region/sieved-chance.ts';
import { type PermutedKendallTask, permutedKendall } from '../../statistics/permuted-kendall.ts';
import type { TrendBits } from '../../statistics/trend-bits.ts';

/** The ranked stations as chance is tried on them. */
export function seriesForChance(task: {
  rows: TestedRow[];
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>;
}): ChanceSeries {
  return chanceSeries(task.rows, task.basis);
}

/** Tries some stations' series under random orders of the years. */
export function permuteYears(task: PermutedKendallTask): TrendBits {
  return permutedKendall(task);
}

/** Draws some stations' years anew, with their carry-over. */
export function sieveYears(task: SievedTask): SievedSums {
  return sievedSums(task);
}

/** Tests what was drawn of all stations. */
export function settleYears(task: SettledTask): TrendBits {
  return settledTrends(task);
}
