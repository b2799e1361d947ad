import { expect, test } from 'vitest';
import { isOfMinus, percentOfMean, testedSeries } from '../../../lib/region/index-facts.ts';
import { rankingFigure } from '../../../lib/region/ranking-figure.ts';
import { rankedRow } from './region-fixtures.ts';

test('rankingFigure of flows is what the basis names', () => {
  const row = rankedRow({ percentPerDecade: -6.2, specificPerDecade: -1.24, tau: -0.4 });
  expect(rankingFigure(row, 'percent-per-decade')).toBe(-6.2);
  expect(rankingFigure(row, 'specific-change')).toBe(-1.24);
  expect(rankingFigure(row, 'kendall-tau')).toBe(-0.4);
  expect(rankingFigure({ ...row, percentPerDecade: null }, 'percent-per-decade')).toBeNull();
});

test('rankingFigure puts what is drier first: more zero-flow days and larger deficits are below 0', () => {
  const days = rankedRow({ trendOf: 'zero-flow-days', percentPerDecade: null, valueSlope: 3, tau: -0.4 });
  expect(rankingFigure(days, 'percent-per-decade')).toBe(-3);
  expect(rankingFigure(days, 'specific-change')).toBe(-3);
  // tau is that of minus the days already
  expect(rankingFigure(days, 'kendall-tau')).toBe(-0.4);
  const deficit = rankedRow({ trendOf: 'deficit', percentPerDecade: 12, valueSlope: 5e5, areaKm2: 250 });
  expect(rankingFigure(deficit, 'percent-per-decade')).toBe(-12);
  // 500,000 m³ over 250 km² are 2 mm
  expect(rankingFigure(deficit, 'specific-change')).toBe(-2);
  expect(rankingFigure({ ...deficit, areaKm2: null }, 'specific-change')).toBeNull();
});

test('rankingFigure of dates is days per decade, of a baseflow index its change, where a percentage or area says nothing', () => {
  const date = rankedRow({ trendOf: 'minimum-date', percentPerDecade: null, valueSlope: -5 });
  expect(rankingFigure(date, 'percent-per-decade')).toBe(-5);
  const bfi = rankedRow({ trendOf: 'bfi', percentPerDecade: -4, specificPerDecade: null, valueSlope: -0.02 });
  expect(rankingFigure(bfi, 'percent-per-decade')).toBe(-4);
  expect(rankingFigure(bfi, 'specific-change')).toBe(-0.02);
});

test('isOfMinus holds for zero days, zero-flow days and deficits only', () => {
  const all = [
    'minima',
    'zero-days',
    'q95',
    'mean-flow',
    'zero-flow-days',
    'bfi',
    'minimum-date',
    'deficit',
    null,
  ] as const;
  expect(all.filter(isOfMinus)).toEqual(['zero-days', 'zero-flow-days', 'deficit']);
});

test('testedSeries turns what is drier when it grows, and leaves a 0 a 0', () => {
  const series = { years: [2000, 2001, 2002], values: [0, 3, 5] };
  expect(testedSeries({ ...series, trendOf: 'zero-flow-days' }).values).toEqual([0, -3, -5]);
  expect(testedSeries({ ...series, trendOf: 'minima' }).values).toEqual([0, 3, 5]);
});

test('percentOfMean gives none of a mean that is not above 0, of days and of dates', () => {
  expect(percentOfMean(-0.5, 'q95', 2)).toBe(-25);
  expect(percentOfMean(-0.5, 'q95', 0)).toBeNull();
  expect(percentOfMean(-0.5, 'q95', null)).toBeNull();
  expect(percentOfMean(null, 'q95', 2)).toBeNull();
  expect(percentOfMean(3, 'zero-flow-days', 2)).toBeNull();
  expect(percentOfMean(3, 'minimum-date', 200)).toBeNull();
});
