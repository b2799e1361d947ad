import { YEARS_PER_DECADE } from '../calendar/decade.ts';
import { medianOfSorted } from '../statistics/quantile.ts';
import { cutLag1, lag1OfRanks } from '../statistics/serial-correlation.ts';
import { type SieveTerms, sieveTerms } from '../statistics/sieve.ts';
import { isOfMinus, testedSeries } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';

/** What the simulation reads of a ranked or drying station. */
export type SimulatedRow = Pick<
  RankingRow,
  | 'code'
  | 'rank'
  | 'drying'
  | 'years'
  | 'values'
  | 'meanValue'
  | 'trendOf'
  | 'valueSlope'
  | 'percentPerDecade'
  | 'tau'
  | 'areaKm2'
  | 'r1'
  | 'serialFactor'
>;

/** What was tested at a station, turned so that falling is drier, with its slope line. */
export interface TestedLine {
  years: number[];
  values: number[];
  /** per year */
  slope: number;
}

/** A row with nothing but what the simulation reads: it travels to the workers. */
export function simulatedRow(row: SimulatedRow): SimulatedRow {
  const { code, rank, drying, years, values, meanValue, trendOf, valueSlope } = row;
  const { percentPerDecade, tau, areaKm2, r1, serialFactor } = row;
  const line = { code, rank, drying, years, values, meanValue, trendOf, valueSlope };
  return { ...line, percentPerDecade, tau, areaKm2, r1, serialFactor };
}

/** The line of a ranked or drying station; null when it has no slope: fewer than two years. */
export function testedLine(row: SimulatedRow): TestedLine | null {
  const { trendOf, valueSlope } = row;
  if (valueSlope === null) return null;
  const sign = isOfMinus(trendOf) ? -1 : 1;
  return { ...testedSeries(row), slope: (sign * valueSlope) / YEARS_PER_DECADE };
}

/** How the stations of a family, ranked or drying, are resampled together: at the median of their lag-1 correlations, each
 *  as `ar1` takes it; whatever serial correction the test uses.
 *  @returns null without a station */
export function familyTerms(rows: readonly SimulatedRow[]): SieveTerms | null {
  const lines = rows.map(testedLine).filter((line) => line !== null);
  if (lines.length === 0) return null;
  const lag1 = Float64Array.from(lines, lag1OfRanks)
    .filter((r) => !Number.isNaN(r))
    .map(cutLag1)
    .sort();
  return sieveTerms(
    lines.map(({ years }) => years),
    medianOfSorted(lag1),
  );
}
