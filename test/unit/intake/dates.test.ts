import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { type DateOrder, dateProblem, NO_DAY, orderShownBy, parseDate } from '../../../lib/intake/dates.ts';

function parse(text: string, order: DateOrder = 'ymd'): string {
  const bytes = new TextEncoder().encode(text);
  const day = parseDate(bytes, 0, bytes.length, order);
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
  ['13/1/2001', 'dmy'],
  ['1/13/2001', 'mdy'],
  ['12/1/2001', 'either'],
  ['5/5/2001', 'none'],
  ['2001-01-13', 'none'],
  ['31/31/2001', 'none'],
  ['29/2/2001', 'none'],
])('orderShownBy(%s) is %s', (text, order) => {
  const bytes = new TextEncoder().encode(text);
  expect(orderShownBy(bytes, 0, bytes.length)).toBe(order);
});
