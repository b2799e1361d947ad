import { dateOfDay, dayNumber, isLeapYear } from '../calendar/day.ts';
import { circularMean, unrolled } from '../statistics/circular.ts';

/** Days of the year that dates are told in: years of 366 days are drawn together to it. */
const DATE_YEAR_DAYS = 365;
const TURN = 2 * Math.PI;

/** Dates laid on one line. */
export interface DatesOnALine {
  /** day of the calendar year, 1 = 1 January, at most half a year from the mean date: below 1 is the year before, above
   *  365 the year after */
  values: number[];
  /** mean date, 0 to below 365; NaN without dates or where they cancel out */
  meanDay: number;
  /** 0 = spread over the whole year, 1 = always the same date; NaN without dates */
  concentration: number;
}

/** Angle of a day on the year's circle: 2π × day of the calendar year / days in it.
 *  Source: Burn 1997, J. Hydrol. 202:212–230. */
export function dateAngle(day: number): number {
  const { year } = dateOfDay(day);
  return (TURN * (day - dayNumber(year, 1, 1) + 1)) / (isLeapYear(year) ? 366 : 365);
}

/** Dates of a station's minima as numbers that a trend can be laid through: unrolled to half a year either side of
 *  their circular mean, so that late December and early January are near each other. Dates that cancel out have no
 *  mean and are told about the middle of the year.
 *  @param days  day numbers, whole
 *  Source: Burn 1997; Mardia & Jupp 2000, section 2.2. */
export function datesOnALine(days: readonly number[]): DatesOnALine {
  const angles = days.map(dateAngle);
  const { angle, concentration } = circularMean(angles);
  const about = Number.isNaN(angle) ? Math.PI : angle;
  const inDays = (radians: number) => (radians * DATE_YEAR_DAYS) / TURN;
  return { values: angles.map((each) => inDays(unrolled(each, about))), meanDay: inDays(angle), concentration };
}
