import type { AnnualIndexName } from '@/lib/basis';
import { isoDate } from '@/lib/calendar/day';
import { lowFlowYearLabel } from '@/lib/calendar/low-flow-year';
import type { AnnualMinima } from '@/lib/lowflow/annual-minima-types';
import type { RankingRow } from '@/lib/region/ranking-types';

/** One low-flow year as the figure and the table show it. */
export interface MinimaPoint {
  year: number;
  /** "1985/86", or "1985" where the year starts in January */
  label: string;
  /** m³/s; null when the year has no complete window */
  minimum: number | null;
  /** what is compared, in its own unit: the minimum unless the basis says otherwise; null where there is none */
  value: number | null;
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
    const known = Number.isNaN(minimum) ? null : minimum;
    return {
      year,
      label: lowFlowYearLabel(year, yearStart),
      minimum: known,
      value: known,
      date: minima.day[index] === -1 ? null : isoDate(minima.day[index]),
      usable,
      used: usable && used.has(year),
      missingDays: minima.missingDays[index],
      flaggedDays: minima.flaggedDays[index],
      reason: minima.reason[index],
    };
  });
}

/** The same years with the figures that are compared, where those are not the minima: of the years used, no others. */
export function comparedPoints(
  points: readonly MinimaPoint[],
  { years, values, drying }: Pick<RankingRow, 'years' | 'values' | 'drying'>,
  index: AnnualIndexName,
): MinimaPoint[] {
  // under Drying the minima are shown whatever is compared: they are what keeps the station from its place
  if (index === 'minimum' || drying) return [...points];
  const figureOf = new Map(years.map((year, i) => [year, values[i]]));
  return points.map((point) => ({ ...point, value: figureOf.get(point.year) ?? null }));
}
