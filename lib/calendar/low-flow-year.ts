import { dateOfDay, dayNumber } from './day.ts';

/** A low-flow year is 12 months from a start month, named by the calendar year in which it begins. */

/** @throws RangeError when `startMonth` is not a month 1–12 */
export function checkStartMonth(caller: string, startMonth: number): void {
  if (!Number.isInteger(startMonth) || startMonth < 1 || startMonth > 12) {
    throw new RangeError(`${caller}: startMonth must be a month 1–12, got ${startMonth}`);
  }
}

/** The low-flow year that holds a day.
 *  @param day         day number
 *  @param startMonth  first month of the low-flow year, 1–12
 *  @throws RangeError when `startMonth` is not 1–12 or `day` is not a whole number
 *  Example: 2011-03-31 with an April start lies in 2010 */
export function lowFlowYearOfDay(day: number, startMonth: number): number {
  checkStartMonth('lowFlowYearOfDay', startMonth);
  const { year, month } = dateOfDay(day);
  return month >= startMonth ? year : year - 1;
}

/** Day number of the first day of a low-flow year; that of the next year less one is its last day.
 *  @throws RangeError when `startMonth` is not 1–12 or `year` is not a whole number */
export function firstDayOfLowFlowYear(year: number, startMonth: number): number {
  checkStartMonth('firstDayOfLowFlowYear', startMonth);
  return dayNumber(year, startMonth, 1);
}

/** A low-flow year as shown: "2010/11", or "2010" when it is the calendar year.
 *  @throws RangeError when `startMonth` is not 1–12
 *  Example: lowFlowYearLabel(1999, 4) → "1999/00" */
export function lowFlowYearLabel(year: number, startMonth: number): string {
  checkStartMonth('lowFlowYearLabel', startMonth);
  if (startMonth === 1) return String(year);
  return `${year}/${String((year + 1) % 100).padStart(2, '0')}`;
}
