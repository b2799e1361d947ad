import { expect, test } from 'vitest';
import { slopeLine } from '../../../lib/jobs/slope-line.ts';
import type { RankingRow } from '../../../lib/region/ranking-types.ts';

const row = {
  firstYear: 1990,
  lastYear: 2010,
  valueSlope: -2,
  valueSlopeLow: -4,
  valueSlopeHigh: 1,
  // 10 m³/s in 2000 on a slope of −0.2 a year
  intercept: 10 + 0.2 * 2000,
  years: [1990, 1995, 2000, 2005, 2010],
} as RankingRow;

test('slopeLine runs through intercept + slope × year at the first and last year used', () => {
  const line = slopeLine(row)!;
  expect([line.firstYear, line.lastYear]).toEqual([1990, 2010]);
  expect(line.fitted[0]).toBeCloseTo(12, 9);
  expect(line.fitted[1]).toBeCloseTo(8, 9);
});

test('the lines of the interval turn about the median year', () => {
  const line = slopeLine(row)!;
  expect(line.low![0]).toBeCloseTo(14, 9);
  expect(line.low![1]).toBeCloseTo(6, 9);
  expect(line.high![0]).toBeCloseTo(9, 9);
  expect(line.high![1]).toBeCloseTo(11, 9);
});

test('with an even number of years they turn about the middle of the middle two', () => {
  const line = slopeLine({ ...row, years: [1990, 1992, 1998, 2010] })!;
  const pivot = 1995;
  const middle = 10 - 0.2 * (pivot - 2000);
  expect(line.low![0]).toBeCloseTo(middle - 0.4 * (1990 - pivot), 9);
});

test('there is no line without a slope, and no interval where there is none', () => {
  expect(slopeLine({ ...row, valueSlope: null })).toBeNull();
  expect(slopeLine({ ...row, firstYear: null })).toBeNull();
  expect(slopeLine({ ...row, valueSlopeLow: null })!.low).toBeNull();
});
