import { dateOfDay, dayNumber } from '../calendar/day.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { pettitt } from '../statistics/pettitt.ts';
import type { Finding } from './finding.ts';

/** A step is told at this level. */
export const STEP_ALPHA = 0.01;
/** Days of a calendar year that may be missing for its mean to count. */
const MISSING_DAYS = 18;

/** A step in the mean of calendar years by Pettitt's test at the 1 % level: a moved gauge, a new weir or rating, a dam, or
 *  a change of climate. It says nothing against any one day, so none is suspect. The test takes years for independent:
 *  long memory and a straight trend also set it off, which is why it asks for a look and gives no verdict.
 *  @returns at most one finding, on the first day of the later part, with no day at fault; detail: `meanBefore` and
 *           `meanAfter`, m³/s, `yearsBefore` and `yearsAfter`, `k` and `p` */
export function annualStep(series: DailySeries): Finding[] {
  const { years, means } = annualMeans(series);
  const { k, at, p } = pettitt(means);
  if (!(p < STEP_ALPHA)) return [];
  const day = dayNumber(years[at + 1], 1, 1);
  return [
    {
      ...{ kind: 'step', firstDay: day, lastDay: day, days: 0 },
      detail: {
        meanBefore: meanOf(means.slice(0, at + 1)),
        meanAfter: meanOf(means.slice(at + 1)),
        ...{ yearsBefore: at + 1, yearsAfter: means.length - at - 1, k, p },
      },
    },
  ];
}

/** Means of the calendar years that are complete enough. */
function annualMeans({ firstDay, values }: DailySeries): { years: number[]; means: number[] } {
  const years: number[] = [];
  const means: number[] = [];
  if (values.length === 0) return { years, means };
  const lastYear = dateOfDay(firstDay + values.length - 1).year;
  for (let { year } = dateOfDay(firstDay); year <= lastYear; year++) {
    const [first, next] = [dayNumber(year, 1, 1), dayNumber(year + 1, 1, 1)];
    const [from, to] = [Math.max(0, first - firstDay), Math.min(values.length, next - firstDay)];
    let days = 0;
    let sum = 0;
    for (let day = from; day < to; day++) {
      if (Number.isNaN(values[day])) continue;
      days++;
      sum += values[day];
    }
    if (days < next - first - MISSING_DAYS || !Number.isFinite(sum)) continue;
    years.push(year);
    means.push(sum / days);
  }
  return { years, means };
}

const meanOf = (x: readonly number[]): number => x.reduce((sum, value) => sum + value, 0) / x.length;
