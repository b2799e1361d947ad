import { dayNumber, daysInMonth } from '../calendar/day.ts';
import { monthOfName, namedDate } from './month-names.ts';
import { decodeText } from './text-encoding.ts';
import type { Mapping } from './types.ts';

export type DateOrder = Mapping['date']['order'];

/** Years that a flow record can hold. Outside them a year is a slip of the pen, and one such row would stretch a
 *  record over centuries. */
export const FIRST_YEAR = 1700;
export const LAST_YEAR = 2199;
const YEARS = LAST_YEAR - FIRST_YEAR + 1;

/** First day number of every month, so that a date costs one look-up. */
const monthStart = Int32Array.from({ length: YEARS * 12 }, (_, month) =>
  dayNumber(FIRST_YEAR + Math.floor(month / 12), (month % 12) + 1, 1),
);
const monthLength = Uint8Array.from({ length: YEARS * 12 }, (_, month) =>
  daysInMonth(FIRST_YEAR + Math.floor(month / 12), (month % 12) + 1),
);

/** Answers below every day number say why there is none. */
export const NO_DAY = -1_000_000_000;
const NOT_A_DATE = NO_DAY - 1;
const NO_SUCH_DAY = NO_DAY - 2;
const YEAR_OUT_OF_RANGE = NO_DAY - 3;
const SHORT_YEAR = NO_DAY - 4;
/** Not a day as the file's order has it, but one the other way round. */
const OTHER_ORDER = NO_DAY - 5;

/** Day number of a year, month and day; below NO_DAY when there is no such day. */
export function dayOfParts(year: number, month: number, day: number): number {
  if (month < 1 || month > 12 || day < 1 || day > 31) return NO_SUCH_DAY;
  if (year < FIRST_YEAR || year > LAST_YEAR) return YEAR_OUT_OF_RANGE;
  const at = (year - FIRST_YEAR) * 12 + month - 1;
  return day <= monthLength[at] ? monthStart[at] + day - 1 : NO_SUCH_DAY;
}

const isSeparator = (byte: number): boolean => byte === 45 || byte === 47 || byte === 46;

/** No two-digit years: it is not said which hundred years they stand for. */
export const NO_CENTURY = -1;

/** The year that two digits stand for, among the hundred years from `firstYear`. */
export function fullYear(twoDigits: number, firstYear: number): number {
  return firstYear + ((((twoDigits - firstYear) % 100) + 100) % 100);
}

/** Day number of a whole date in bytes: year first (`2001-03-09`, `2001/3/9`, `20010309`), year last in the given
 *  order (`9/3/2001`, `09.03.2001`), or with the month's name (`9 Mar 2001`). A time of day behind it is allowed and not
 *  used.
 *  @param start,end  the trimmed field, end exclusive
 *  @param firstYear  first of the hundred years that two-digit years stand for; NO_CENTURY refuses them
 *  @returns          below NO_DAY when it is not a date; `dateProblem` words the reason */
export function parseDate(
  bytes: Uint8Array,
  start: number,
  end: number,
  order: DateOrder,
  firstYear: number = NO_CENTURY,
): number {
  const length = end - start;
  if (length === 10 && bytes[start + 4] === 45 && bytes[start + 7] === 45) {
    const year =
      (bytes[start] - 48) * 1000 + (bytes[start + 1] - 48) * 100 + (bytes[start + 2] - 48) * 10 + bytes[start + 3] - 48;
    const month = (bytes[start + 5] - 48) * 10 + bytes[start + 6] - 48;
    const day = (bytes[start + 8] - 48) * 10 + bytes[start + 9] - 48;
    let digits = 0;
    for (let at = start; at < end; at++) if (bytes[at] - 48 >= 0 && bytes[at] - 48 <= 9) digits++;
    if (digits === 8) return dayOfParts(year, month, day);
  }
  return parseAnyDate(bytes, start, end, order, firstYear);
}

/** The three whole numbers of a date field, filled by splitDate; one for each call would cost more than the reading. */
const parts = new Int32Array(3);
const widths = new Int32Array(3);

/** Splits a date into its three numbers (`parts`, `widths`).
 *  @returns false when the field has another form */
function splitDate(bytes: Uint8Array, start: number, end: number): boolean {
  let at = start;
  for (let part = 0; part < 3; part++) {
    if (part > 0) {
      if (at >= end || !isSeparator(bytes[at])) return false;
      at++;
    }
    let value = 0;
    const first = at;
    for (; at < end && at - first < 5 && bytes[at] >= 48 && bytes[at] <= 57; at++) value = value * 10 + bytes[at] - 48;
    if (at === first || at - first > 4) return false;
    parts[part] = value;
    widths[part] = at - first;
  }
  return at === end || isTimeOfDay(bytes, at, end);
}

/** `T00:00`, ` 09:00:00`, `T00:00:00.000+01:00`, `Z`, ` 12:00:00 AM`, ` 00:00 UTC` behind a date. */
function isTimeOfDay(bytes: Uint8Array, start: number, end: number): boolean {
  if (bytes[start] === 90) return end === start + 1;
  if ((bytes[start] !== 84 && bytes[start] !== 32) || end - start < 3 || end - start > 30) return false;
  let last = end;
  while (last > start + 1 && isLetter(bytes[last - 1])) last--;
  if (end - last > 4) return false;
  for (let at = start + 1; at < last; at++) {
    const byte = bytes[at];
    const fits = (byte >= 48 && byte <= 58) || byte === 46 || byte === 43 || byte === 45 || byte === 32 || byte === 90;
    if (!fits) return false;
  }
  return bytes[start + 1] >= 48 && bytes[start + 1] <= 57;
}

const isLetter = (byte: number): boolean => (byte >= 65 && byte <= 90) || (byte >= 97 && byte <= 122);

function parseAnyDate(bytes: Uint8Array, start: number, end: number, order: DateOrder, firstYear: number): number {
  if (end - start === 8 && parseCompact(bytes, start)) return dayOfParts(parts[0], parts[1], parts[2]);
  if (!splitDate(bytes, start, end)) return parseNamed(bytes, start, end, firstYear);
  if (widths[0] === 4 && widths[1] <= 2 && widths[2] <= 2) return dayOfParts(parts[0], parts[1], parts[2]);
  if (widths[0] > 2 || widths[1] > 2) return NOT_A_DATE;
  if (widths[2] !== 4) {
    if (widths[2] > 2 || firstYear === NO_CENTURY) return SHORT_YEAR;
    return dayInOrder(order, (part) => fullYear(part, firstYear));
  }
  if (order === 'ymd') return OTHER_ORDER;
  const day = order === 'dmy' ? parts[0] : parts[1];
  const month = order === 'dmy' ? parts[1] : parts[0];
  if (month > 12 && day <= 12 && dayOfParts(parts[2], day, month) > NO_DAY) return OTHER_ORDER;
  return dayOfParts(parts[2], month, day);
}

/** The day that the three parts last split stand for in an order. */
function dayInOrder(order: DateOrder, year: (part: number) => number): number {
  if (order === 'ymd') return dayOfParts(year(parts[0]), parts[1], parts[2]);
  return order === 'dmy'
    ? dayOfParts(year(parts[2]), parts[1], parts[0])
    : dayOfParts(year(parts[2]), parts[0], parts[1]);
}

function parseNamed(bytes: Uint8Array, start: number, end: number, firstYear: number): number {
  if (end - start < 6 || end - start > 64) return NOT_A_DATE;
  const named = namedDate(decodeText(bytes, start, end));
  if (named === null) return NOT_A_DATE;
  if (named.short && firstYear === NO_CENTURY) return SHORT_YEAR;
  return dayOfParts(named.short ? fullYear(named.year, firstYear) : named.year, named.month, named.day);
}

function parseCompact(bytes: Uint8Array, start: number): boolean {
  let value = 0;
  for (let at = start; at < start + 8; at++) {
    if (bytes[at] < 48 || bytes[at] > 57) return false;
    value = value * 10 + bytes[at] - 48;
  }
  parts[0] = Math.floor(value / 10000);
  parts[1] = Math.floor(value / 100) % 100;
  parts[2] = value % 100;
  return true;
}

/** The orders of a date as bits, for those in which a date may be read. */
export const ORDER_BITS: Record<DateOrder, number> = { ymd: 1, dmy: 2, mdy: 4 };

/** The orders in which a date of three numbers is a day, as ORDER_BITS: 13/1/2001 can only be day first.
 *  @returns 0 for a date that says nothing of the file's order: it is no such date, or the same day in any order
 *           (5/5/2001), or its year stands in front with four digits */
export function ordersOf(bytes: Uint8Array, start: number, end: number): number {
  if (!splitDate(bytes, start, end) || widths[0] > 2 || widths[1] > 2 || widths[2] === 3) return 0;
  const short = widths[2] <= 2;
  // Two digits stand for a leap year at most: 29 February is possible in any order.
  const year = short ? () => 2000 : (part: number) => part;
  let bits = 0;
  for (const order of ['ymd', 'dmy', 'mdy'] as const) {
    if ((order !== 'ymd' || short) && dayInOrder(order, year) > NO_DAY) bits |= ORDER_BITS[order];
  }
  const alike = parts[0] === parts[1] && (!short || parts[1] === parts[2]);
  return alike ? 0 : bits;
}

/** A whole number in bytes, blanks before it allowed; −1 when it is none. For year, month and day in columns. */
export function parseWhole(bytes: Uint8Array, start: number, end: number): number {
  if (end <= start || end - start > 6) return -1;
  let value = 0;
  for (let at = start; at < end; at++) {
    if (bytes[at] < 48 || bytes[at] > 57) return -1;
    value = value * 10 + bytes[at] - 48;
  }
  return value;
}

/** A month in a column of its own, as a number or a name; −1 when it is none. */
export function parseMonth(bytes: Uint8Array, start: number, end: number): number {
  const month = parseWhole(bytes, start, end);
  if (month >= 0 || end - start < 3 || end - start > 14) return month;
  return monthOfName(decodeText(bytes, start, end)) || -1;
}

/** Why a field is not a day, in words. */
export function dateProblem(answer: number, text: string): string {
  const quoted = `“${text}”`;
  switch (answer) {
    case NO_SUCH_DAY:
      return `${quoted} is not a day of the calendar`;
    case YEAR_OUT_OF_RANGE:
      return `the year of ${quoted} lies outside ${FIRST_YEAR}–${LAST_YEAR}`;
    case SHORT_YEAR:
      return `${quoted} has a year of fewer than four digits`;
    case OTHER_ORDER:
      return `${quoted} has its day, month and year in another order than the rest of the file`;
    default:
      return text === '' ? 'the row has no date' : `${quoted} is not a date`;
  }
}
