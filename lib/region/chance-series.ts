import type { Basis } from '../basis.ts';
import { criticalS } from '../statistics/critical-s.ts';
import { varianceOfS } from '../statistics/mann-kendall.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { cutLag1, lag1OfRanks } from '../statistics/serial-correlation.ts';
import { testedSeries } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';

/** The ranked stations of a region as chance is tried on them: every series over the same years. */
export interface ChanceSeries {
  codes: string[];
  /** low-flow years in which any of the stations has a value, rising */
  years: Int32Array;
  /** what was tested, turned so that falling is drier; NaN in years without a value; each as long as `years` */
  series: Float64Array[];
  /** slope of each, per year */
  slopes: Float64Array;
  /** lag-1 correlation of each as `ar1` takes it, freed of its bias, not yet cut; NaN where it cannot be told */
  lag1: Float64Array;
  /** smallest S that each station's test rejects where nothing carries over from year to year (factor 1) */
  critical: Float64Array;
  /** the same with the serial factor that the ranking used, and without ties: for replicates that carry over */
  corrected: Float64Array;
}

/** What chance reads of a row of the ranking. */
export type TestedRow = Pick<RankingRow, 'code' | 'rank' | 'years' | 'values' | 'trendOf' | 'serialFactor'>;

/** Takes the ranked stations of a ranking, in its order. */
export function chanceSeries(
  rows: readonly TestedRow[],
  basis: Pick<Basis, 'alpha' | 'serialCorrection'>,
): ChanceSeries {
  const { alpha } = basis;
  const exact = basis.serialCorrection === 'none';
  const ranked = rows.filter(({ rank }) => rank !== null);
  const tested = ranked.map(testedSeries);
  const years = Int32Array.from(new Set(tested.flatMap((each) => each.years))).sort();
  const place = new Map(Array.from(years, (year, i) => [year, i]));
  const slopes = Float64Array.from(tested, (each) => pairwiseSlopes(each.years, each.values).slope);
  return {
    codes: ranked.map(({ code }) => code),
    years,
    series: tested.map((each) => {
      const row = new Float64Array(years.length).fill(Number.NaN);
      each.years.forEach((year, i) => {
        row[place.get(year)!] = each.values[i];
      });
      return row;
    }),
    slopes,
    lag1: Float64Array.from(tested, (each, i) => lag1OfRanks({ ...each, slope: slopes[i] })),
    critical: Float64Array.from(tested, ({ values }) => {
      const { variance, tiedPairs } = varianceOfS(Float64Array.from(values));
      return criticalS({ n: values.length, variance, alpha, exact, tied: tiedPairs > 0 });
    }),
    corrected: Float64Array.from(tested, ({ values: { length: n } }, i) => {
      const variance = (n * (n - 1) * (2 * n + 5)) / 18;
      return criticalS({ n, variance, alpha, varianceFactor: ranked[i].serialFactor ?? 1, exact });
    }),
  };
}

/** Median over stations of the lag-1 correlation as `ar1` would use it, 0 to 0.95; null when none can be told. */
export function medianLag1(lag1: Float64Array): number | null {
  const told = lag1
    .filter((r) => !Number.isNaN(r))
    .map(cutLag1)
    .sort();
  if (told.length === 0) return null;
  const middle = told.length >> 1;
  return told.length % 2 === 1 ? told[middle] : (told[middle - 1] + told[middle]) / 2;
}
