import { lowFlowYearOfDay } from '../calendar/low-flow-year.ts';
import type { DailySeries } from '../series/daily-series.ts';

/** Low-flow years of the first and last day with a value, whatever its flag; null when there is none. */
export function valuedYears(series: DailySeries, yearStart: number): { first: number; last: number } | null {
  const { values, firstDay } = series;
  let first = 0;
  while (first < values.length && Number.isNaN(values[first])) first += 1;
  if (first === values.length) return null;
  let last = values.length - 1;
  while (Number.isNaN(values[last])) last -= 1;
  return { first: lowFlowYearOfDay(firstDay + first, yearStart), last: lowFlowYearOfDay(firstDay + last, yearStart) };
}
