/** Calendar days as whole numbers: days since 1970-01-01 on the proleptic Gregorian calendar, without Date objects,
 *  time zones or clocks. Day 0 is 1970-01-01, day −1 is 1969-12-31. */

/** Days of the 400-year Gregorian cycle, and from 0000-03-01 to 1970-01-01. */
const DAYS_PER_CYCLE = 146097;
const EPOCH_FROM_MARCH_YEAR_0 = 719468;

/** Seconds of a day, leap seconds aside. */
export const DAY_SECONDS = 86_400;

const MONTH_LENGTHS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

/** A day of the calendar: month 1–12, day 1–31. */
export interface CalendarDate {
  year: number;
  month: number;
  day: number;
}

/** True for a year with a 29 February. */
export function isLeapYear(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
}

/** Number of days in a month (1–12) of a year. */
export function daysInMonth(year: number, month: number): number {
  return month === 2 && isLeapYear(year) ? 29 : MONTH_LENGTHS[month - 1];
}

/** True when the three whole numbers name a day that exists: 2023-02-29 does not. */
export function isValidDate(year: number, month: number, day: number): boolean {
  return (
    Number.isInteger(year) &&
    Number.isInteger(month) &&
    Number.isInteger(day) &&
    month >= 1 &&
    month <= 12 &&
    day >= 1 &&
    day <= daysInMonth(year, month)
  );
}

/** Day number of a calendar day.
 *
 *  Years are counted from March, so that the leap day ends the year and month lengths follow (153 m + 2) / 5, five
 *  months of 31, 30, 31, 30, 31 days at a time.
 *  @throws RangeError when there is no such day
 *  Example: dayNumber(2000, 3, 1) → 11017 */
export function dayNumber(year: number, month: number, day: number): number {
  if (!isValidDate(year, month, day)) {
    throw new RangeError(`dayNumber: year, month and day must name a day that exists, got ${year}, ${month}, ${day}`);
  }
  const marchYear = month > 2 ? year : year - 1;
  const marchMonth = month > 2 ? month - 3 : month + 9;
  return (
    365 * marchYear +
    Math.floor(marchYear / 4) -
    Math.floor(marchYear / 100) +
    Math.floor(marchYear / 400) +
    Math.floor((153 * marchMonth + 2) / 5) +
    day -
    1 -
    EPOCH_FROM_MARCH_YEAR_0
  );
}

/** The calendar day of a day number; the inverse of dayNumber.
 *  @throws RangeError when `dayNo` is not a whole number
 *  Example: dateOfDay(11016) → { year: 2000, month: 2, day: 29 } */
export function dateOfDay(dayNo: number): CalendarDate {
  if (!Number.isInteger(dayNo)) throw new RangeError(`dateOfDay: the day must be a whole number, got ${dayNo}`);
  const fromMarchYear0 = dayNo + EPOCH_FROM_MARCH_YEAR_0;
  const cycle = Math.floor(fromMarchYear0 / DAYS_PER_CYCLE);
  const dayOfCycle = fromMarchYear0 - cycle * DAYS_PER_CYCLE;
  // Taking out the leap days met so far makes every year 365 days long. 1460, 36524 and 146096 are the last days of
  // the 4-, 100- and 400-year cycles, whose leap days stand at their very end.
  const yearOfCycle = Math.floor(
    (dayOfCycle - Math.floor(dayOfCycle / 1460) + Math.floor(dayOfCycle / 36524) - Math.floor(dayOfCycle / 146096)) /
      365,
  );
  const dayOfYear = dayOfCycle - (365 * yearOfCycle + Math.floor(yearOfCycle / 4) - Math.floor(yearOfCycle / 100));
  const marchMonth = Math.floor((5 * dayOfYear + 2) / 153);
  const month = marchMonth < 10 ? marchMonth + 3 : marchMonth - 9;
  return {
    year: cycle * 400 + yearOfCycle + (month <= 2 ? 1 : 0),
    month,
    day: dayOfYear - Math.floor((153 * marchMonth + 2) / 5) + 1,
  };
}

/** ISO 8601 text of a day number, years 0000 to 9999.
 *  @throws RangeError when `dayNo` is not a whole number or its year has no four digits
 *  Example: isoDate(0) → "1970-01-01" */
export function isoDate(dayNo: number): string {
  const { year, month, day } = dateOfDay(dayNo);
  if (year < 0 || year > 9999) throw new RangeError(`isoDate: the year must lie in 0–9999, got ${year}`);
  return `${String(year).padStart(4, '0')}-${month < 10 ? '0' : ''}${month}-${day < 10 ? '0' : ''}${day}`;
}

/** Day number of ISO 8601 text YYYY-MM-DD; NaN for any other text and for a day that does not exist.
 *  Example: parseIsoDate('1969-12-31') → −1; parseIsoDate('2023-02-29') → NaN */
export function parseIsoDate(text: string): number {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(text);
  if (!match) return Number.NaN;
  const [year, month, day] = [Number(match[1]), Number(match[2]), Number(match[3])];
  return isValidDate(year, month, day) ? dayNumber(year, month, day) : Number.NaN;
}
