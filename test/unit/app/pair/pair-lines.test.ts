import { expect, test } from 'vitest';
import { toneOf, trendLine } from '@/app/regions/[region]/pair/pair-lines';
import type { PairTrend } from '@/lib/region/pair-types';

const trend: PairTrend = {
  ...{ slopePerDecade: -10, low: -20, high: 0, intercept: 2000, percentPerDecade: null, percentLow: null },
  ...{ percentHigh: null, z: -2, p: 0.04, tau: -0.2, r1: null, serialFactor: 1 },
};

test('trendLine runs along the slope, its interval about the middle year, in the unit shown', () => {
  const line = trendLine(trend, [1990, 1995, 2000], 2);
  // 2,000 − 1 a year, doubled
  expect(line?.fitted).toEqual([20, 0]);
  expect(line?.low).toEqual([2 * (5 + 2 * 5), 2 * (5 - 2 * 5)]);
  expect(line?.high).toEqual([10, 10]);
});

test('trendLine has no line without a trend, a slope or years', () => {
  expect(trendLine(null, [1990])).toBeNull();
  expect(trendLine({ ...trend, slopePerDecade: null }, [1990])).toBeNull();
  expect(trendLine(trend, [])).toBeNull();
});

test('toneOf is dry or wet where the trend is significant, by what the index means', () => {
  expect(toneOf(trend, 0.1)).toBe('dry');
  expect(toneOf({ ...trend, z: 2 }, 0.1)).toBe('wet');
  expect(toneOf(trend, 0.1, true)).toBe('wet');
  expect(toneOf({ ...trend, z: 2 }, 0.1, true)).toBe('dry');
  expect(toneOf(trend, 0.04)).toBe('none');
  expect(toneOf({ ...trend, p: null }, 0.1)).toBe('none');
  expect(toneOf(null, 0.1)).toBe('none');
});
