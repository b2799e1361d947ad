import { dateOfDay, dayNumber } from '../calendar/day.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { median } from '../statistics/quantile.ts';

/** Months of a record with flow enough to have a level, in order; months without are left out. */
export interface MonthlyLevels {
  /** index in the record of each month's first day that the record has, and of the day after its last */
  from: number[];
  end: number[];
  /** mean of the natural logarithm of its flows above zero, less the median of that calendar month over all years */
  level: number[];
}

/** Days with flow above zero that a month must have. */
const LEAST_DAYS = 10;
const MONTHS = 12;
/** Between these a product of flows is as exact as numbers get. */
const SMALLEST_PRODUCT = 1e-100;
const LARGEST_PRODUCT = 1e100;

/** Levels of the months of a record, freed of the seasons: on logarithms, so that a factor becomes a step. */
export function monthlyLevels({ firstDay, values }: DailySeries): MonthlyLevels {
  const from: number[] = [];
  const end: number[] = [];
  const level: number[] = [];
  const monthOf: number[] = [];
  let { year, month } = dateOfDay(firstDay);
  for (let day = 0; day < values.length; ) {
    const [nextYear, nextMonth] = month === MONTHS ? [year + 1, 1] : [year, month + 1];
    const next = Math.min(values.length, dayNumber(nextYear, nextMonth, 1) - firstDay);
    const mean = meanOfLogs(values, day, next);
    if (!Number.isNaN(mean)) {
      from.push(day);
      end.push(next);
      level.push(mean);
      monthOf.push(month - 1);
    }
    [year, month, day] = [nextYear, nextMonth, next];
  }
  const seasons = Array.from({ length: MONTHS }, (_, of) => median(level.filter((_, i) => monthOf[i] === of)));
  return { from, end, level: level.map((mean, i) => mean - seasons[monthOf[i]]) };
}

/** Mean logarithm of the flows above zero among the days from..end−1; NaN when there are too few. One logarithm for
 *  several days: they are multiplied up first, which is several times as fast. */
function meanOfLogs(values: Float64Array, from: number, end: number): number {
  let days = 0;
  let sum = 0;
  let product = 1;
  for (let day = from; day < end; day++) {
    const value = values[day];
    if (!(value > 0)) continue;
    days++;
    const next = product * value;
    if (next > SMALLEST_PRODUCT && next < LARGEST_PRODUCT) {
      product = next;
      continue;
    }
    sum += Math.log(product) + Math.log(value);
    product = 1;
  }
  return days < LEAST_DAYS ? Number.NaN : (sum + Math.log(product)) / days;
}
