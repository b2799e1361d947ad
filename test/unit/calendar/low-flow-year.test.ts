import { expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { firstDayOfLowFlowYear, lowFlowYearLabel, lowFlowYearOfDay } from '../../../lib/calendar/low-flow-year.ts';

test.each([
  ['the last day before an April start', [2011, 3, 31], 4, 2010],
  ['the April start itself', [2011, 4, 1], 4, 2011],
  ['a leap day in an April year', [2012, 2, 29], 4, 2011],
  ['New Year in a calendar year', [2011, 1, 1], 1, 2011],
  ['New Year’s Eve in a calendar year', [2011, 12, 31], 1, 2011],
  ['the last day before a December start', [2011, 11, 30], 12, 2010],
  ['a December start', [2011, 12, 1], 12, 2011],
] as const)('lowFlowYearOfDay: %s', (_, [year, month, day], startMonth, expected) => {
  expect(lowFlowYearOfDay(dayNumber(year, month, day), startMonth)).toBe(expected);
});

test('firstDayOfLowFlowYear is the first of the start month', () => {
  expect(isoDate(firstDayOfLowFlowYear(2010, 4))).toBe('2010-04-01');
  expect(firstDayOfLowFlowYear(2012, 4) - firstDayOfLowFlowYear(2011, 4)).toBe(366);
  expect(firstDayOfLowFlowYear(2012, 3) - firstDayOfLowFlowYear(2011, 3)).toBe(366);
  expect(firstDayOfLowFlowYear(2013, 3) - firstDayOfLowFlowYear(2012, 3)).toBe(365);
});

test('lowFlowYearLabel shows both calendar years, and one when they are the same', () => {
  expect(lowFlowYearLabel(2010, 4)).toBe('2010/11');
  expect(lowFlowYearLabel(1999, 4)).toBe('1999/00');
  expect(lowFlowYearLabel(2004, 12)).toBe('2004/05');
  expect(lowFlowYearLabel(2010, 1)).toBe('2010');
});

test('a start month outside 1–12 is refused by name and value', () => {
  expect(() => lowFlowYearOfDay(0, 0)).toThrow('lowFlowYearOfDay: startMonth must be a month 1–12, got 0');
  expect(() => firstDayOfLowFlowYear(2000, 13)).toThrow(RangeError);
  expect(() => lowFlowYearLabel(2000, 1.5)).toThrow(RangeError);
});
