import { expect, test } from 'vitest';
import { decodeRatios } from '@/app/components/spark-code';
import { mapRows } from '@/app/regions/[region]/map-row';
import { DEFAULT_BASIS, type ResolvedBasis } from '@/lib/basis';
import type { Ranking, RankingRow } from '@/lib/region/ranking-types';
import { rankedRow } from '../../region/region-fixtures';

/** A station whose minima fall from 3 to 1 m³/s in 20 years: −1 m³/s per decade, half the mean of 2. */
const row = rankedRow({
  id: 1,
  code: '1',
  name: 'Ambry at Stonefold',
  river: 'Ambry',
  latitude: 46.123456789,
  longitude: 14,
  areaKm2: 100,
  influence: 'natural',
  yearsUsed: 3,
  firstYear: 2000,
  lastYear: 2020,
  meanMinimum: 2,
  meanMinimumSpecific: 20,
  meanValue: 2,
  valueSlope: -1,
  valueSlopeLow: -1.5,
  valueSlopeHigh: -0.5,
  percentPerDecade: -50,
  specificPerDecade: -10,
  tau: -1,
  z: -1,
  p: 0.01,
  pAdjusted: 0.012345,
  r1: 0,
  serialFactor: 1,
  // 3 at the year 2000 on a slope of −0.1 a year
  intercept: 203,
  years: [2000, 2010, 2020],
  minima: [3, 2, 1],
  values: [3, 2, 1],
});
const { period: _, yearStart: __, ...rest } = DEFAULT_BASIS;
const basis: ResolvedBasis = {
  ...rest,
  period: [2000, 2020],
  yearStart: 4,
  asked: { period: 'common', yearStart: 'auto' },
};
const ranking = (given: Partial<RankingRow>, rankBy: ResolvedBasis['rankBy']): Ranking => ({
  basis: { ...basis, rankBy },
  rows: [{ ...row, ...given }],
  counts: { stations: 1, ranked: 1, drying: 0, unranked: 0, falling: 1, rising: 0 },
  warnings: [],
});

test('mapRows gives figure and interval in the unit of the ranking', () => {
  expect(mapRows(ranking({}, 'percent-per-decade'))[0].figure).toEqual({ value: -50, low: -75, high: -25 });
  expect(mapRows(ranking({}, 'specific-change'))[0].figure).toEqual({ value: -10, low: -15, high: -5 });
  expect(mapRows(ranking({}, 'kendall-tau'))[0].figure).toEqual({ value: -1, low: null, high: null });
});

test('mapRows gives days without flow under Drying, whatever the ranking is by', () => {
  const given = { drying: true, rank: null, zeroDaysPerDecade: 4, zeroDaysLow: 1, zeroDaysHigh: 8 };
  expect(mapRows(ranking(given, 'percent-per-decade'))[0].figure).toEqual({ value: 4, low: 1, high: 8 });
});

test('mapRows places the slope line by its height at mid-record, as a ratio to the mean', () => {
  // 203 − 0.1 × 2010 = 2, the mean itself
  expect(mapRows(ranking({}, 'percent-per-decade'))[0].line).toEqual({ percent: -50, low: -75, high: -25, middle: 1 });
  expect(mapRows(ranking({ valueSlope: null, intercept: null }, 'percent-per-decade'))[0].line).toBeNull();
  expect(mapRows(ranking({ meanValue: 0, percentPerDecade: null }, 'percent-per-decade'))[0].line).toBeNull();
});

test('mapRows keeps the minima as ratios to their mean', () => {
  const [{ spark, sparkFirst }] = mapRows(ranking({}, 'percent-per-decade'));
  const ratios = decodeRatios(spark);
  expect(sparkFirst).toBe(2000);
  expect(ratios).toHaveLength(21);
  expect([ratios[0], ratios[10], ratios[20]].map((ratio) => ratio.toFixed(1))).toEqual(['1.5', '1.0', '0.5']);
});

test('mapRows of zero-flow days gives days per decade as figure and change, with their own sign', () => {
  const days = {
    trendOf: 'zero-flow-days',
    percentPerDecade: null,
    valueSlope: 4,
    valueSlopeLow: 1,
    valueSlopeHigh: 8,
  };
  const given = { ...ranking({ ...days } as Partial<RankingRow>, 'percent-per-decade') };
  const [shown] = mapRows({ ...given, basis: { ...given.basis, index: 'zero-flow-days' } });
  expect(shown.figure).toEqual({ value: 4, low: 1, high: 8 });
  expect(shown.change).toEqual({ value: 4, low: 1, high: 8 });
});

test('mapRows of deficits gives mm per decade under a change per area', () => {
  // 100,000 m³ over 100 km² are 1 mm
  const given = ranking(
    { trendOf: 'deficit', valueSlope: 1e5, valueSlopeLow: 5e4, valueSlopeHigh: 2e5 },
    'specific-change',
  );
  const [shown] = mapRows({ ...given, basis: { ...given.basis, index: 'deficit' } });
  expect(shown.figure).toEqual({ value: 1, low: 0.5, high: 2 });
});

test('mapRows of dates draws them within half a year of their mean', () => {
  const dates = { values: [10, -30, -70], meanValue: -30, valueSlope: -40, valueSlopeLow: -60, valueSlopeHigh: -20 };
  // −30 at 2010 on a slope of −4 days a year
  const given = ranking(
    { ...dates, trendOf: 'minimum-date', percentPerDecade: null, intercept: 8010 },
    'percent-per-decade',
  );
  const [shown] = mapRows({ ...given, basis: { ...given.basis, index: 'minimum-date' } });
  const ratios = decodeRatios(shown.spark);
  // 40 of 182.5 days are 0.22 of the half-height
  expect([ratios[0], ratios[10], ratios[20]].map((ratio) => ratio.toFixed(1))).toEqual(['1.2', '1.0', '0.8']);
  expect(shown.line).toMatchObject({ percent: -21.92, middle: 1 });
});
