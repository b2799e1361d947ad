import { expect, test } from 'vitest';
import type { AnnualIndexName } from '../../../lib/basis.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { StationMinima } from '../../../lib/region/ranking-types.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

const none = Number.NaN;
/** Five years each, small enough for paper: no correction, so p is exact. */
const ranking = (stations: StationMinima[], index: AnnualIndexName, keys: Parameters<typeof basisOf>[0] = {}) =>
  rankRegion(
    stations,
    basisOf({ period: [2001, 2005], minYears: 3, serialCorrection: 'none', index, ...keys }),
    YEAR_START,
  );
const withFigures = (code: string, figures: number[], minima = constant(5)): StationMinima => ({
  ...station(code, { first: 2001, values: minima }),
  figures: Float64Array.from(figures),
});

test('rankRegion by zero-flow days: more days is falling and first, slope and interval keep their sign', () => {
  const days = (code: string, zeroDays: number[]) => station(code, { first: 2001, values: constant(5), zeroDays });
  const { rows, counts } = ranking(
    [days('fewer', [50, 40, 30, 20, 10]), days('more', [1, 3, 5, 7, 9]), days('never', constant(5, 0))],
    'zero-flow-days',
  );
  expect(rows.map(({ code, rank }) => [code, rank])).toEqual([
    ['more', 1],
    ['fewer', 2],
    ['never', null],
  ]);
  // 2 days a year on a mean of 5: days per decade are the figure, for a percentage says nothing; exact p 1/60
  expect(rows[0]).toMatchObject({
    index: 'zero-flow-days',
    trendOf: 'zero-flow-days',
    trend: 'falling',
    tau: -1,
    values: [1, 3, 5, 7, 9],
    meanValue: 5,
    valueSlope: 20,
    percentPerDecade: null,
    slopePerDecade: null,
    specificPerDecade: null,
    zeroDaysPerDecade: null,
    steadiness: null,
  });
  expect(rows[0].intercept! + 2 * 2003).toBeCloseTo(5, 9);
  expect(rows[0].p).toBeCloseTo(1 / 60, 12);
  expect(rows[1]).toMatchObject({ trend: 'rising', valueSlope: -100, tau: 1 });
  expect(rows[2].unrankedReason).toBe('no zero-flow day in any of its 5 usable years');
  expect(counts).toMatchObject({ ranked: 2, drying: 0, unranked: 1, falling: 1, rising: 1 });
});

test('rankRegion by zero-flow days has no Drying list: stations with zero minima are what it is for', () => {
  const dry = station('dry', { first: 2001, values: [0, 0, 0, 1, 1], zeroDays: [5, 9, 14, 0, 20] });
  const [row] = ranking([dry], 'zero-flow-days').rows;
  expect(row).toMatchObject({ rank: 1, drying: false, zeroFlowYears: 3 });
  expect(row.note).toContain('1 of 5 counts of zero-flow days are zero, so its slope is drawn towards 0');
});

test('rankRegion by mean flow is in m³/s, in percent of the mean flow, and per area', () => {
  const { minima, ...rest } = station('a', { first: 2001, values: constant(5) });
  const flows = { ...minima, meanFlow: Float64Array.of(12, 11, 10, 9, 8) };
  const [row] = ranking([{ ...rest, minima: flows }], 'mean-flow').rows;
  expect(row).toMatchObject({
    trend: 'falling',
    trendOf: 'mean-flow',
    slopePerDecade: -10,
    percentPerDecade: -100,
    specificPerDecade: -100,
    meanMinimum: 1,
    meanValue: 10,
  });
});

test('rankRegion takes figures of other indices along the years, and leaves out years that have none', () => {
  const [row] = ranking([withFigures('a', [0.5, none, 0.4, 0.3, 0.2])], 'bfi', { minCoverage: 0.5 }).rows;
  expect(row).toMatchObject({ yearsUsed: 4, years: [2001, 2003, 2004, 2005], values: [0.5, 0.4, 0.3, 0.2] });
  // a change of 0.1 in a mean of 0.35 each year but the first, which counts for two
  expect(row.valueSlope).toBeCloseTo(-0.875, 9);
  expect(row.slopePerDecade).toBeNull();
  expect(row.percentPerDecade).toBeCloseTo(-250, 9);
});

test('rankRegion puts stations with a third or more zero Q95 under Drying, and names what is zero', () => {
  const dry = { ...withFigures('dry', [0, 0, 1, 2, 1]) };
  const [row] = ranking([dry], 'q95').rows;
  expect(row).toMatchObject({ drying: true, index: 'zero-flow-days', trendOf: 'zero-days' });
  expect(row.unrankedReason).toBe(
    '2 of 5 annual Q95 are zero, a third or more: listed under Drying, by zero-flow days',
  );
});

test('rankRegion by deficit: a larger one is falling; a station without any is not ranked; zeros are said', () => {
  const { rows } = ranking(
    [
      withFigures('grows', [1e6, 2e6, 3e6, 4e6, 5e6]),
      withFigures('shrinks', [5e6, 4e6, 0, 0, 0]),
      withFigures('none', constant(5, 0)),
    ],
    'deficit',
  );
  expect(rows.map(({ code, trend }) => [code, trend])).toEqual([
    ['grows', 'falling'],
    ['shrinks', 'rising'],
    ['none', null],
  ]);
  expect(rows[0]).toMatchObject({ percentPerDecade: (100 * 1e7) / 3e6, valueSlope: 1e7, slopePerDecade: null });
  expect(rows[1].note).toContain('3 of 5 deficit volumes are zero, so its slope is mostly 0 and says little');
  expect(rows[2].unrankedReason).toBe('no day below its Q90 in any of its 5 usable years');
});

test('rankRegion by date lays dates about their mean, so that a drift over New Year has one sign', () => {
  // 27 December, 30 December, 2 January, 5 January, 8 January: later by 3 days a year
  const dayOfYear = [240, 243, 246, 249, 252];
  const [row] = ranking([station('a', { first: 2001, values: constant(5), dayOfYear })], 'minimum-date').rows;
  expect(row).toMatchObject({ trend: 'rising', trendOf: 'minimum-date', percentPerDecade: null, tau: 1 });
  // leap years shift the calendar by a day
  expect(row.valueSlope! / 30).toBeGreaterThan(0.9);
  expect(row.valueSlope! / 30).toBeLessThan(1.1);
  expect(Math.abs(row.values[4] - row.values[0])).toBeLessThan(15);
});

test('rankRegion by date says when the lows come in more than one season', () => {
  const dayOfYear = [10, 190, 12, 195, 14];
  const [row] = ranking([station('a', { first: 2001, values: constant(5), dayOfYear })], 'minimum-date').rows;
  expect(row.note).toMatch(/come in more than one season \(concentration of dates 0\.[0-4]\d\)/);
});

test('rankRegion finds the common period among years that have a figure', () => {
  const figures = [none, none, ...constant(30, 1).map((_, i) => 2 - i / 100)];
  const long = {
    ...station('a', { first: 1971, values: constant(32) }),
    figures: Float64Array.from(figures),
  };
  const basis = basisOf({ index: 'bfi', minCoverage: 1 });
  expect(rankRegion([long], basis, YEAR_START).basis.period).toEqual([1973, 2002]);
});

test('rankRegion refuses figures that do not run along the years, and an index without any', () => {
  expect(() => ranking([withFigures('a', [1, 2])], 'q95')).toThrow(
    'annualFigures: fromRecord must hold the q95 of 5 years, got 2',
  );
  expect(() => ranking([station('a', { first: 2001, values: constant(5) })], 'bfi')).toThrow(RangeError);
});

test('rankRegion says when a station has usable years, but none with a figure', () => {
  const { rows, counts } = ranking([withFigures('a', constant(5, none))], 'bfi');
  expect(rows[0].unrankedReason).toBe('no usable year with a baseflow index in 2001–2005');
  expect(counts).toMatchObject({ stations: 1, ranked: 0, unranked: 1 });
});

test('rankRegion of one station with equal figures has no trend under any index that may be constant', () => {
  for (const index of ['q95', 'bfi', 'deficit', 'mean-flow'] as const) {
    const [row] = ranking([withFigures('a', constant(5, 2))], index).rows;
    expect(row, index).toMatchObject({ rank: 1, trend: 'none', valueSlope: 0, z: 0, p: 1, tau: null });
    expect(Object.is(row.valueSlope, 0), index).toBe(true);
  }
});

test('rankRegion refuses an infinite figure by name', () => {
  expect(() => ranking([withFigures('a', [1, 2, Number.POSITIVE_INFINITY, 4, 5])], 'q95')).toThrow(/Infinity/);
});
