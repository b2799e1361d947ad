import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import {
  type DateOrder,
  dateProblem,
  fullYear,
  NO_DAY,
  ORDER_BITS,
  ordersOf,
  parseDate,
} from '../../../lib/intake/dates.ts';

function parse(text: string, order: DateOrder = 'ymd', firstYear?: number): string {
  const bytes = new TextEncoder().encode(text);
  const day = parseDate(bytes, 0, bytes.length, order, firstYear);
  return day > NO_DAY ? isoDate(day) : dateProblem(day, text);
}

test.each([
  ['2001-03-09', 'ymd', '2001-03-09'],
  ['2001/3/9', 'ymd', '2001-03-09'],
  ['2001.03.09', 'ymd', '2001-03-09'],
  ['20010309', 'ymd', '2001-03-09'],
  ['1999/12/31', 'ymd', '1999-12-31'],
  ['2000-02-29', 'ymd', '2000-02-29'],
  ['9/3/2001', 'dmy', '2001-03-09'],
  ['9/3/2001', 'mdy', '2001-09-03'],
  ['09.03.2001', 'dmy', '2001-03-09'],
  ['12/31/1999', 'mdy', '1999-12-31'],
  ['2001-03-09T00:00:00Z', 'ymd', '2001-03-09'],
  ['2001-03-09 09:00', 'ymd', '2001-03-09'],
  ['9/3/2001 0:00', 'dmy', '2001-03-09'],
  ['3/9/2001 12:00:00 AM', 'mdy', '2001-03-09'],
  ['2001-03-09 00:00 UTC', 'ymd', '2001-03-09'],
  ['03-Jan-2001', 'ymd', '2001-01-03'],
  ['3 janv. 2001', 'ymd', '2001-01-03'],
  ['3. März 2001', 'ymd', '2001-03-03'],
  ['1er août 1999', 'ymd', '1999-08-01'],
  ['3 de enero de 2001', 'ymd', '2001-01-03'],
  ['15/fev/1987', 'ymd', '1987-02-15'],
  ['January 3, 2001', 'ymd', '2001-01-03'],
  ['2001-Dec-31', 'ymd', '2001-12-31'],
  ['03-Jan-2001 09:00', 'ymd', '2001-01-03'],
  // Whatever the order, a year in front is a year.
  ['2001-03-09', 'dmy', '2001-03-09'],
  ['1700-01-01', 'ymd', '1700-01-01'],
  ['2199-12-31', 'ymd', '2199-12-31'],
] as const)('parseDate reads %s (%s) as %s', (text, order, iso) => {
  expect(parse(text, order)).toBe(iso);
});

test.each([
  ['2001-02-31', 'ymd', /not a day of the calendar/],
  ['1900-02-29', 'ymd', /not a day of the calendar/],
  ['2001-13-01', 'ymd', /not a day of the calendar/],
  ['2001-00-10', 'ymd', /not a day of the calendar/],
  ['20010230', 'ymd', /not a day of the calendar/],
  ['31/2/2001', 'dmy', /not a day of the calendar/],
  ['1699-12-31', 'ymd', /outside 1700–2199/],
  ['2200-01-01', 'ymd', /outside 1700–2199/],
  ['9/3/01', 'dmy', /fewer than four digits/],
  ['9/3/2001', 'ymd', /another order/],
  ['13/1/2001', 'mdy', /another order/],
  ['2001-03', 'ymd', /is not a date/],
  ['2001-03-0x', 'ymd', /is not a date/],
  ['2001-03-09 noon', 'ymd', /is not a date/],
  ['Total', 'ymd', /is not a date/],
  ['', 'ymd', /has no date/],
] as const)('parseDate refuses “%s” (%s): %s', (text, order, reason) => {
  expect(parse(text, order)).toMatch(reason);
});

test('parseDate agrees with the calendar on every day from 1896 to 1905, over a year 1900 without leap day', () => {
  for (let day = dayNumber(1896, 1, 1); day <= dayNumber(1905, 12, 31); day++)
    expect(parse(isoDate(day))).toBe(isoDate(day));
});

test.each([
  ['01-Feb-2001', 'ymd', /^2001-02-01$/],
  ['30-Feb-2001', 'ymd', /not a day of the calendar/],
  ['03-Foo-2001', 'ymd', /is not a date/],
  // "jui" may begin juin or juillet.
  ['03-jui-2001', 'ymd', /is not a date/],
  ['03-Jan-01', 'ymd', /fewer than four digits/],
  ['13/1/01', 'dmy', /fewer than four digits/],
] as const)('parseDate of “%s” (%s), with a month’s name or a short year: %s', (text, order, answer) => {
  expect(parse(text, order)).toMatch(answer);
});

test.each([
  ['03-Jan-29', 'ymd', '2029-01-03'],
  ['03-Jan-30', 'ymd', '1930-01-03'],
  ['3/1/29', 'dmy', '2029-01-03'],
  ['3/1/30', 'mdy', '1930-03-01'],
  ['98/3/1', 'ymd', '1998-03-01'],
  ['29.02.00', 'dmy', '2000-02-29'],
])('parseDate of %s (%s), the hundred years from 1930, is %s', (text, order, iso) => {
  expect(parse(text, order as DateOrder, 1930)).toBe(iso);
});

test('fullYear gives every pair of digits its one year among a hundred, whatever the first', () => {
  for (const first of [1899, 1900, 1930, 2000]) {
    const years = Array.from({ length: 100 }, (_, pair) => fullYear(pair, first));
    expect([...years].sort()).toEqual(Array.from({ length: 100 }, (_, at) => first + at));
    expect(years.every((year, pair) => year % 100 === pair)).toBe(true);
  }
});

test.each([
  ['13/1/2001', ['dmy']],
  ['1/13/2001', ['mdy']],
  ['12/1/2001', ['dmy', 'mdy']],
  ['5/5/2001', []],
  ['2001-01-13', []],
  ['31/31/2001', []],
  ['29/2/2001', []],
  ['13/1/98', ['dmy']],
  ['1/2/98', ['dmy', 'mdy']],
  ['1/2/3', ['ymd', 'dmy', 'mdy']],
  ['98/1/13', ['ymd']],
  ['7/7/7', []],
  ['03-Jan-2001', []],
] as const)('ordersOf(%s) are %j', (text, orders) => {
  const bytes = new TextEncoder().encode(text);
  const bits = orders.reduce((sum, order) => sum | ORDER_BITS[order], 0);
  expect(ordersOf(bytes, 0, bytes.length)).toBe(bits);
});
