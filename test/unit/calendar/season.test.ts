import { expect, test } from 'vitest';
import { isoDate } from '../../../lib/calendar/day.ts';
import { mostSeasonDays, type Season, seasonSpan } from '../../../lib/calendar/season.ts';

test.each<[string, number, number, Season, string, string]>([
  ['a whole April year', 2010, 4, null, '2010-04-01', '2011-03-31'],
  ['a whole calendar year', 2010, 1, null, '2010-01-01', '2010-12-31'],
  ['a summer', 2010, 4, [6, 9], '2010-06-01', '2010-09-30'],
  ['a season over New Year', 2010, 4, [11, 2], '2010-11-01', '2011-02-28'],
  ['a season that ends on a leap day', 2011, 4, [12, 2], '2011-12-01', '2012-02-29'],
  ['a season wholly in the second calendar year', 2010, 10, [6, 9], '2011-06-01', '2011-09-30'],
  ['a season up to December', 2010, 10, [10, 12], '2010-10-01', '2010-12-31'],
  ['one month', 2010, 4, [3, 3], '2011-03-01', '2011-03-31'],
  ['all twelve months', 2010, 4, [4, 3], '2010-04-01', '2011-03-31'],
  ['December in a December year', 2010, 12, [12, 12], '2010-12-01', '2010-12-31'],
])('seasonSpan: %s', (_, year, startMonth, season, first, last) => {
  const span = seasonSpan(year, startMonth, season);
  expect([isoDate(span.first), isoDate(span.last)]).toEqual([first, last]);
});

test('seasonSpan refuses a season over the end of the low-flow year and says which start would do', () => {
  expect(() => seasonSpan(2010, 4, [3, 5])).toThrow('years from month 3 would hold it');
  expect(() => seasonSpan(2010, 4, [0, 5])).toThrow('seasonSpan: season must hold months 1–12, got [0, 5]');
});

test('mostSeasonDays: as many days as a season ever has', () => {
  expect(mostSeasonDays([2, 2])).toBe(29);
  expect(mostSeasonDays([6, 9])).toBe(122);
  expect(mostSeasonDays([11, 2])).toBe(121);
  expect(mostSeasonDays(null)).toBe(366);
  expect(() => mostSeasonDays([0, 5])).toThrow(RangeError);
});
