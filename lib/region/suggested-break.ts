import { basisText, type ResolvedBasis } from '../basis.ts';
import { lowFlowYearLabel } from '../calendar/low-flow-year.ts';
import { pettitt } from '../statistics/pettitt.ts';
import { pettittSieveP } from '../statistics/pettitt-sieve.ts';
import { pairwiseSlopes } from '../statistics/sen-slope.ts';
import { cutLag1, lag1OfRanks } from '../statistics/serial-correlation.ts';
import type { SuggestedBreak } from './break-types.ts';
import { testedSeries } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';
import { probability } from './sentence-figures.ts';

/** Fewer usable years suggest nothing. */
const FEWEST_YEARS = 10;

export type SuggestionRow = Pick<RankingRow, 'code' | 'years' | 'values' | 'trendOf' | 'trend' | 'r1' | 'serialFactor'>;

/** The one change of level that a station's figures suggest, by Pettitt's K: shown, and never tested, for it was these
 *  figures that chose it. With r1 > 0 its p comes from the sieve, since carry-over makes steps by itself; else from
 *  Pettitt's approximation. That is the r1 of the ranking under `ar1` and `ar1-regional`, and the station's own as `ar1`
 *  takes it under the other corrections, which say no such r1 but cure no steps. Beside a significant trend it says that step and trend are not told
 *  apart. Draws are named by the station and its figures, so that they do not depend on the rest of the region.
 *  @returns null with fewer than 10 usable years, or none that differ
 *  Sources: at `pettitt`, `pettittSieveP`. */
export function suggestedBreak(row: SuggestionRow, basis: ResolvedBasis): SuggestedBreak | null {
  const series = testedSeries(row);
  if (series.years.length < FEWEST_YEARS) return null;
  const { k, at, p: approximate } = pettitt(series.values);
  if (!(k > 0)) return null;
  const { slope } = pairwiseSlopes(series.years, series.values);
  const told = basis.serialCorrection === 'ar1' || basis.serialCorrection === 'ar1-regional' ? row.r1 : null;
  const r1 = told ?? cutLag1(lag1OfRanks({ ...series, slope }));
  const seed = JSON.stringify([basisText(basis, ['index', 'serialCorrection']), row.code, series]);
  const resampled = r1 > 0 ? pettittSieveP({ ...series, slope }, { r1, seed }) : Number.NaN;
  const pBySieve = !Number.isNaN(resampled);
  const p = pBySieve ? resampled : approximate;
  const besideTrend = row.trend === 'falling' || row.trend === 'rising';
  const lastBefore = series.years[at];
  const words =
    `The figures themselves would part after ${lowFlowYearLabel(lastBefore, basis.yearStart)} (Pettitt’s K = ${k}, ` +
    `p ${probability(p)}${pBySieve ? ', by resampling with carry-over' : ''})` +
    `${besideTrend ? '; step or trend, not told apart' : ''}. Not tested: these figures chose the year.`;
  return { lastBefore, k, p, pBySieve, besideTrend, words };
}
