import type { Basis, BasisKey, ResolvedBasis } from '../basis.ts';
import type { PeriodCounts } from '../region/common-periods.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { indexFiguresOf } from './index-figures.ts';
import { packedMinimaOf, type RegionMinima } from './minima.ts';
import { runTask } from './pool.ts';
import type { CommonPeriods } from './records-types.ts';
import { withInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';

const KEYS: readonly BasisKey[] = [
  ...(['yearStart', 'season', 'days', 'maxMissingDays', 'exclude', 'minYears', 'minCoverage', 'index'] as const),
];

/** Counts of every period, with the key that they stand under. */
export type KeyedPeriods = PeriodCounts & { common: [number, number] | null; key: string };

/** How many stations of a region would stay for every start and end year under a basis.
 *  @returns `key`: equal exactly when all that the counts depend on is equal, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function commonPeriodsOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ periods: CommonPeriods; key: string }> {
  return withInputs(region.id, async (inputs) => {
    const minima = await packedMinimaOf(inputs, basis);
    const { firstYear, years, ranked, complete, common, key } = await periodCountsOf(inputs, minima, basis);
    const periods = {
      basis: resolvedBasis(basis, minima.yearStart, common),
      stations: inputs.length,
      firstYear,
      lastYear: firstYear === null ? null : firstYear + years - 1,
      ranked: Array.from(ranked),
      complete: Array.from(complete),
      common,
    };
    return { periods, key };
  });
}

/** The counts as kept, or computed now in a worker. */
export async function periodCountsOf(
  stations: readonly StationInput[],
  regionMinima: RegionMinima,
  basis: Basis,
): Promise<KeyedPeriods> {
  const { packed, yearStart } = regionMinima;
  const { minYears, minCoverage, index } = basis;
  const key = resultKey('common-periods', { values: { ...basis, yearStart }, keys: KEYS }, stations, 'none');
  const counts = await cached('common-periods', key, async () => {
    const figures = await indexFiguresOf(stations, regionMinima, basis);
    return runTask('commonPeriods', { minima: packed, figures, index, rule: { minYears, minCoverage } });
  });
  return { ...counts, key };
}

/** The basis with what its `common` and `auto` come to, as the ranking resolves them. */
export function resolvedBasis(basis: Basis, yearStart: number, common: [number, number] | null): ResolvedBasis {
  const period = basis.period === 'common' ? common : basis.period;
  return { ...basis, period, yearStart, asked: { period: basis.period, yearStart: basis.yearStart } };
}
