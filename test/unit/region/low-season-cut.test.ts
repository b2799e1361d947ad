import { expect, test } from 'vitest';
import { firstDayOfLowFlowYear } from '../../../lib/calendar/low-flow-year.ts';
import { lowSeasonCut } from '../../../lib/region/low-season-cut.ts';

const basis = { yearStart: 4, days: 7, season: null as [number, number] | null };

/** Minima of years from 1990, each so many days after 1 April. */
const after = (...offsets: number[]) => ({
  years: offsets.map((_, i) => 1990 + i),
  days: offsets.map((offset, i) => firstDayOfLowFlowYear(1990 + i, 4) + offset),
});
const repeat = (n: number, offset: number) => new Array<number>(n).fill(offset);

test('lowSeasonCut finds nothing amiss with lows in the middle of the year', () => {
  expect(lowSeasonCut(after(...repeat(20, 170)), basis)).toBeNull();
});

test('lowSeasonCut: two of 20 minima at the edge are 10 %, three are more', () => {
  expect(lowSeasonCut(after(...repeat(18, 170), 10, 10), basis)).toBeNull();
  expect(lowSeasonCut(after(...repeat(17, 170), 10, 10, 10), basis)).toBe(
    'year start cuts its low season (3 of 20 minima in the first 30 or last 15 days of the year): a start in March would do',
  );
});

test('lowSeasonCut says so when no start month would do: lows spread over the year', () => {
  const spread = after(...Array.from({ length: 36 }, (_, i) => Math.floor(i * 10.14)));
  expect(lowSeasonCut(spread, basis)).toContain('no start month would do, its lows come in every season');
});

test('lowSeasonCut counts the first 30 days and the last n + 8', () => {
  // day 29 is the 30th; 2021 is no leap year: the last 15 of 365 days begin at 350
  const share = (offset: number) => lowSeasonCut(after(...repeat(10, offset)), basis) !== null;
  expect([29, 30].map(share)).toEqual([true, false]);
  const one = (offset: number, days = 7) =>
    lowSeasonCut({ years: [2021], days: [firstDayOfLowFlowYear(2021, 4) + offset] }, { ...basis, days }) !== null;
  expect([349, 350, 364].map((offset) => one(offset))).toEqual([false, true, true]);
  expect([326, 327].map((offset) => one(offset, 30))).toEqual([false, true]);
});

test('lowSeasonCut names the start month that would do', () => {
  // lows in the first half of April: a year that starts in October has them in its middle
  expect(lowSeasonCut(after(...repeat(12, 8)), basis)).toBe(
    'year start cuts its low season (12 of 12 minima in the first 30 or last 15 days of the year): a start in October would do',
  );
});

test('lowSeasonCut sees one low counted twice: successive minima under 60 days apart', () => {
  // 2000/01 has 365 days: day 325 and then day 19 of the next year are 59 days apart, and only the latter at an edge
  const offsets = [...repeat(10, 170), 325, 19, ...repeat(10, 170)];
  const counted = lowSeasonCut(after(...offsets), basis);
  expect(counted).toContain('(1 of 21 successive minima under 60 days after the one before)');
  const apart = lowSeasonCut(after(...repeat(10, 170), 325, 20, ...repeat(10, 170)), basis);
  expect(apart).toBeNull();
});

test('lowSeasonCut does not compare minima across a year that was not usable', () => {
  const dates = after(...repeat(10, 170), 325, 19, ...repeat(10, 170));
  const gap = { ...dates, years: dates.years.map((year, i) => (i > 10 ? year + 1 : year)) };
  expect(lowSeasonCut(gap, basis)).toBeNull();
});

test('lowSeasonCut advises only months that hold the season', () => {
  // a year that starts in October would cut July–November; of those that do not, one with the lows inside is named
  const advice = lowSeasonCut(after(...repeat(12, 8)), { ...basis, season: [3, 4] });
  expect(advice).toMatch(
    /a start in (May|June|July|August|September|October|November|December|January|February) would do/,
  );
  expect(advice).not.toContain('a start in April');
});

test('lowSeasonCut says nothing without minima, and nothing of windows over 120 days', () => {
  expect(lowSeasonCut({ years: [], days: [] }, basis)).toBeNull();
  expect(lowSeasonCut(after(...repeat(12, 8)), { ...basis, days: 121 })).toBeNull();
  expect(lowSeasonCut(after(...repeat(12, 8)), { ...basis, days: 120 })).not.toBeNull();
});
