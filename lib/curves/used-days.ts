import type { ExcludableFlag } from '../basis.ts';
import { type Season, seasonSpan } from '../calendar/season.ts';
import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { usableFlow } from '../series/usable-flow.ts';

/** The keys of the basis that say which days a curve rests on, with `auto` resolved. */
export interface CurveOptions {
  /** first month of the low-flow year, 1–12 */
  yearStart: number;
  season: Season;
  /** flags treated as missing */
  exclude: readonly ExcludableFlag[];
}

/** Daily flows of each usable year (or its season) in the period: partial years would lean to a season.
 *  @param minima  annual minima of the same series under the same basis: they say which years are usable
 *  @param period  [first, last] low-flow years, both included, or null for all
 *  @returns       one array a usable year, m³/s, NaN where missing, which must not be changed: it may be a view */
export function flowsOfUsableYears(
  series: DailySeries,
  minima: AnnualMinima,
  options: CurveOptions,
  period: readonly [number, number] | null,
): Float64Array[] {
  const flow = usableFlow(series, options.exclude);
  const years: Float64Array[] = [];
  minima.years.forEach((year, i) => {
    if (minima.usable[i] === 0 || (period !== null && (year < period[0] || year > period[1]))) return;
    const { first, last } = seasonSpan(year, options.yearStart, options.season);
    years.push(flow.subarray(Math.max(0, first - series.firstDay), Math.max(0, last + 1 - series.firstDay)));
  });
  return years;
}
