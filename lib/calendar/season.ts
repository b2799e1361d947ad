import { dayNumber } from './day.ts';
import { checkStartMonth } from './low-flow-year.ts';

/** Months [first, last], both included, inside one low-flow year; null is the whole year. */
export type Season = readonly [number, number] | null;

/** First and last day number, both included, of a low-flow year or of a season inside it.
 *  @param year        low-flow year: the calendar year in which it begins
 *  @param startMonth  first month of the low-flow year, 1–12
 *  @param season      months [a, b] that may wrap over the calendar year; null for the whole year
 *  @throws RangeError when a month is not 1–12, or the season runs over the end of the low-flow year
 *  Example: seasonSpan(2010, 4, [11, 2]) → 2010-11-01 to 2011-02-28 */
export function seasonSpan(year: number, startMonth: number, season: Season): { first: number; last: number } {
  checkStartMonth('seasonSpan', startMonth);
  if (season === null) {
    return { first: dayNumber(year, startMonth, 1), last: dayNumber(year + 1, startMonth, 1) - 1 };
  }
  const [firstMonth, lastMonth] = season;
  for (const month of season) {
    if (!Number.isInteger(month) || month < 1 || month > 12) {
      throw new RangeError(`seasonSpan: season must hold months 1–12, got [${season.join(', ')}]`);
    }
  }
  const place = (month: number) => (month - startMonth + 12) % 12;
  if (place(firstMonth) > place(lastMonth)) {
    throw new RangeError(
      `seasonSpan: season must lie inside one low-flow year, got [${season.join(', ')}] in years from month ` +
        `${startMonth}; years from month ${firstMonth} would hold it`,
    );
  }
  const afterLast = lastMonth === 12 ? 1 : lastMonth + 1;
  const calendarYear = (month: number) => (month >= startMonth ? year : year + 1);
  // The day before the first of the month that follows: leap years take care of themselves.
  const yearAfterLast = lastMonth === 12 ? calendarYear(lastMonth) + 1 : calendarYear(lastMonth);
  return {
    first: dayNumber(calendarYear(firstMonth), firstMonth, 1),
    last: dayNumber(yearAfterLast, afterLast, 1) - 1,
  };
}

/** Days of a season in a leap year: as many as it ever has. Example: mostSeasonDays([2, 2]) → 29
 *  @throws RangeError when a month is not 1–12 */
export function mostSeasonDays(season: Season): number {
  const startMonth = season === null ? 1 : season[0];
  const lengths = [2003, 2004].map((year) => {
    const { first, last } = seasonSpan(year, startMonth, season);
    return last - first + 1;
  });
  return Math.max(...lengths);
}
