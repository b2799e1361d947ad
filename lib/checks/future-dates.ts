import { isoDate } from '../calendar/day.ts';
import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';

/** Values on days that are still to come, as one stretch from the first of them to the last.
 *  @param today  day number of the day of checking, which itself is no future one
 *  @returns detail: `today`, ISO date */
export function futureDates({ firstDay, values }: DailySeries, today: number): Finding[] {
  let first = -1;
  let last = -1;
  let days = 0;
  for (let day = Math.max(0, today + 1 - firstDay); day < values.length; day++) {
    if (Number.isNaN(values[day])) continue;
    if (first < 0) first = day;
    last = day;
    days++;
  }
  if (days === 0) return [];
  return [
    { kind: 'future', firstDay: firstDay + first, lastDay: firstDay + last, days, detail: { today: isoDate(today) } },
  ];
}
