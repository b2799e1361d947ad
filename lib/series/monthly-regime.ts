import type { ExcludableFlag } from '../basis.ts';
import { dateOfDay, daysInMonth } from '../calendar/day.ts';
import type { DailySeries } from './daily-series.ts';
import { usableFlow } from './usable-flow.ts';

/** Share of each calendar month in the year's flow: the month's mean over the mean of the monthly means.
 *
 *  A month's mean is over all its observed days of the whole record. The divisor is the mean over the months that were
 *  seen, all twelve in any record of a year or more.
 *  @param exclude  flags treated as missing
 *  @param flow     the usable flow, where the caller has it already
 *  @returns        12 ratios, January first; NaN for a month never seen, and for all when the river never flows */
export function monthlyRegime(
  series: DailySeries,
  exclude: readonly ExcludableFlag[],
  flow: Float64Array = usableFlow(series, exclude),
): Float64Array {
  const sums = new Float64Array(12);
  const counts = new Float64Array(12);
  for (let i = 0; i < flow.length; ) {
    const { year, month, day } = dateOfDay(series.firstDay + i);
    const end = Math.min(flow.length, i + daysInMonth(year, month) - day + 1);
    let sum = 0;
    let count = 0;
    for (; i < end; i += 1) {
      const value = flow[i];
      if (Number.isNaN(value)) continue;
      sum += value;
      count += 1;
    }
    sums[month - 1] += sum;
    counts[month - 1] += count;
  }
  const means = sums.map((sum, month) => sum / counts[month]);
  const seen = means.filter((mean) => !Number.isNaN(mean));
  const yearMean = seen.reduce((total, mean) => total + mean, 0) / seen.length;
  return means.map((mean) => (yearMean > 0 ? mean / yearMean : Number.NaN));
}
