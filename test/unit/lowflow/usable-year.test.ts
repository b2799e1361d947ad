import { expect, test } from 'vitest';
import { annualMinima, type MinimaOptions } from '../../../lib/lowflow/annual-minima.ts';
import { seriesOf, withGap } from '../series-of.ts';

const OPTIONS: MinimaOptions = { yearStart: 1, season: null, days: 7, maxMissingDays: 18, exclude: [] };
const year = (flow: (i: number) => number, days = 365) => seriesOf([2001, 1, 1], { days, flow });
const reasonOf = (series: ReturnType<typeof year>, options: Partial<MinimaOptions> = {}) =>
  annualMinima(series, { ...OPTIONS, ...options }).reason[0];

/** High water but for a trough around day 250, so that gaps elsewhere cannot hide the low. */
const troughed = year((i) => (i >= 240 && i < 260 ? 1 : 10));

test.each([
  [17, ''],
  [18, ''],
  [19, '19 of 365 days missing, 18 allowed'],
])('rule (a): %i missing days of a year, 18 allowed', (missing, reason) => {
  expect(reasonOf(withGap(troughed, 10, 10 + missing - 1))).toBe(reason);
});

test('rule (a) compares as real numbers: 0 allowed days allow none, a season scales the allowance', () => {
  expect(reasonOf(withGap(troughed, 10, 10), { maxMissingDays: 0 })).toBe('1 of 365 days missing, 0 allowed');
  // January and February: 59 days, 18 × 59/365 = 2.9 days allowed.
  expect(reasonOf(withGap(troughed, 10, 11), { season: [1, 2], days: 1 })).toBe('');
  expect(reasonOf(withGap(troughed, 10, 12), { season: [1, 2], days: 1 })).toContain(
    '3 of 59 days missing, 2.91 allowed',
  );
});

test('rule (a): exactly the scaled allowance is allowed', () => {
  // 18 × 366/366: a product of fractions could fall a hair under 18.
  const leap = seriesOf([2004, 1, 1], { days: 366, flow: (i) => (i >= 240 && i < 260 ? 1 : 10) });
  expect(reasonOf(withGap(leap, 10, 27))).toBe('');
  expect(reasonOf(withGap(leap, 10, 28))).toBe('19 of 366 days missing, 18 allowed');
});

test.each([
  // A 30-day mean has 336 windows in the year; at most 33.6 may be lost. A gap of g days in the middle loses g + 29.
  [4, ''],
  [5, '34 of 336 30-day windows lost to missing days, 33.6 allowed'],
])('rule (b): a gap of %i days under 30-day means', (gap, reason) => {
  expect(reasonOf(withGap(troughed, 100, 100 + gap - 1), { days: 30 })).toBe(reason);
});

test('rule (b): exactly 10 % of the windows may be lost', () => {
  // 360 windows of 6 days: 36 may be lost. Single missing days far apart lose 6 each.
  const loseSixEach = (count: number) =>
    Array.from({ length: count }, (_, k) => 20 + 20 * k).reduce((series, at) => withGap(series, at, at), troughed);
  expect(reasonOf(loseSixEach(6), { days: 6 })).toBe('');
  expect(reasonOf(loseSixEach(7), { days: 6 })).toBe('42 of 360 6-day windows lost to missing days, 36 allowed');
});

/** 10 m³/s, a low of 2 m³/s on days 100–119, and one flow beside a gap that begins on day 201. */
const besideGap = (edge: number, gapDays: number) =>
  withGap(
    year((i) => (i >= 100 && i < 120 ? 2 : i === 200 ? edge : 10)),
    201,
    200 + gapDays,
  );

test.each([
  [
    2.19,
    3,
    'a gap of 3 days from 2001-07-21 may hide the low: 2.19 m³/s beside it is under 1.1 × the minimum of 2 m³/s',
  ],
  [2.2, 3, ''],
  [2.21, 3, ''],
  [2.19, 2, ''],
])('rule (c): a flow of %d m³/s beside a gap of %i days, minimum 2 m³/s', (edge, gapDays, reason) => {
  // 1.1 × 2 is 2.2 exactly in binary fractions as well, so the middle case stands on the boundary.
  expect(1.1 * 2).toBe(2.2);
  expect(reasonOf(besideGap(edge, gapDays))).toBe(reason);
});

test('rule (c) looks at the flow after a gap too, and at gaps at both ends of the year', () => {
  const low = (at: number) => year((i) => (i >= 100 && i < 120 ? 2 : i === at ? 2.1 : 10));
  expect(reasonOf(withGap(low(204), 201, 203))).toContain('a gap of 3 days from 2001-07-21 may hide the low: 2.1');
  expect(reasonOf(withGap(low(5), 0, 4))).toContain('a gap of 5 days from 2001-01-01');
  expect(reasonOf(withGap(low(359), 360, 364))).toContain('a gap of 5 days from 2001-12-27');
});

test('rule (c) does not look beyond the year, or beyond the season', () => {
  const twoYears = year((i) => (i % 365 >= 100 && i % 365 < 120 ? 2 : i === 364 ? 2.1 : 10), 730);
  // The flow of 31 December stands beside the gap but in the year before.
  expect(annualMinima(withGap(twoYears, 365, 369), OPTIONS).reason).toEqual(['', '']);
  // 2.1 m³/s on 31 May, a gap from 1 June on, the season begins on 1 June.
  const beforeSeason = withGap(
    year((i) => (i >= 180 && i < 200 ? 2 : i === 150 ? 2.1 : 10)),
    151,
    153,
  );
  expect(reasonOf(beforeSeason, { season: [6, 9], days: 3 })).toBe('');
  expect(reasonOf(beforeSeason, { season: [5, 9], days: 3 })).toContain('may hide the low');
});

test('rule (c): nothing is below a minimum of 0', () => {
  expect(
    reasonOf(
      withGap(
        year((i) => (i >= 100 && i < 200 ? 0 : 10)),
        150,
        154,
      ),
    ),
  ).toBe('');
});

test('a year that breaks several rules says all of them', () => {
  const reason = reasonOf(
    withGap(
      year(() => 3),
      50,
      99,
    ),
  );
  expect(reason.split('; ')).toEqual([
    '50 of 365 days missing, 18 allowed',
    '56 of 359 7-day windows lost to missing days, 35.9 allowed',
    'a gap of 50 days from 2001-02-20 may hide the low: 3 m³/s beside it is under 1.1 × the minimum of 3 m³/s',
  ]);
});
