import { isoDate } from '@/lib/calendar/day';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { AnnualMinima } from '@/lib/lowflow/annual-minima-types';

/** One low-flow year as the figure and the table show it. */
export interface MinimaPoint {
  year: number;
  /** "1985/86", or "1985" where the year starts in January */
  label: string;
  /** m³/s; null when the year has no complete window */
  minimum: number | null;
  /** ISO date of the minimum; null when there is none */
  date: string | null;
  usable: boolean;
  /** usable, and one of the years that the trend rests on */
  used: boolean;
  missingDays: number;
  flaggedDays: number;
  reason: string;
}

/** Years of a record, one entry each, with the missing answers of the arrays as null.
 *  @param usedYears  the years that the trend rests on */
export function minimaPoints(minima: AnnualMinima, yearStart: number, usedYears: readonly number[]): MinimaPoint[] {
  const used = new Set(usedYears);
  return Array.from(minima.years, (year, index) => {
    const minimum = minima.minimum[index];
    const usable = minima.usable[index] === 1;
    return {
      year,
      label: lowFlowYearLabel(year, yearStart),
      minimum: Number.isNaN(minimum) ? null : minimum,
      date: minima.day[index] === -1 ? null : isoDate(minima.day[index]),
      usable,
      used: usable && used.has(year),
      missingDays: minima.missingDays[index],
      flaggedDays: minima.flaggedDays[index],
      reason: minima.reason[index],
    };
  });
}
