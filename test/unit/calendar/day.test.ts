import { expect, test } from 'vitest';
import {
  dateOfDay,
  dayNumber,
  daysInMonth,
  isLeapYear,
  isoDate,
  isValidDate,
  parseIsoDate,
} from '../../../lib/calendar/day.ts';

test.each([
  ['the epoch', 1970, 1, 1, 0],
  ['the day before it', 1969, 12, 31, -1],
  ['a leap day of a century divisible by 400', 2000, 2, 29, 11016],
  ['the day after it', 2000, 3, 1, 11017],
  ['the last day of a 400-year cycle', 2000, 2, 28, 11015],
  ['the first day of the Gregorian calendar', 1582, 10, 15, -141427],
])('dayNumber and dateOfDay agree on %s', (_, year, month, day, number) => {
  expect(dayNumber(year, month, day)).toBe(number);
  expect(dateOfDay(number)).toEqual({ year, month, day });
});

test.each([
  [2023, 2, 29],
  [1900, 2, 29],
  [2023, 4, 31],
  [2023, 13, 1],
  [2023, 0, 1],
  [2023, 1, 0],
  [2023, 1.5, 1],
])('isValidDate refuses %d-%d-%d, and dayNumber throws', (year, month, day) => {
  expect(isValidDate(year, month, day)).toBe(false);
  expect(() => dayNumber(year, month, day)).toThrow(RangeError);
});

test('isLeapYear keeps the rule of centuries', () => {
  expect([1896, 1900, 1904, 2000, 2023, 2024, 2100].map(isLeapYear)).toEqual([
    true,
    false,
    true,
    true,
    false,
    true,
    false,
  ]);
});

test('daysInMonth gives February its leap day', () => {
  expect(daysInMonth(2023, 2)).toBe(28);
  expect(daysInMonth(2024, 2)).toBe(29);
  expect(daysInMonth(2024, 12)).toBe(31);
});

test('isoDate pads years, months and days', () => {
  expect(isoDate(0)).toBe('1970-01-01');
  expect(isoDate(dayNumber(987, 6, 5))).toBe('0987-06-05');
  expect(() => isoDate(dayNumber(10000, 1, 1))).toThrow('isoDate: the year must lie in 0–9999, got 10000');
  expect(() => isoDate(0.5)).toThrow(RangeError);
});

test('parseIsoDate reads YYYY-MM-DD and answers NaN for everything else', () => {
  expect(parseIsoDate('2000-02-29')).toBe(11016);
  for (const text of ['', '2000-2-29', '2001-02-29', '2000-02-29T00:00', ' 2000-02-28', '20000228', '2000/02/28']) {
    expect(parseIsoDate(text), text).toBeNaN();
  }
});
