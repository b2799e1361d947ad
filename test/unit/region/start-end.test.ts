import { expect, test } from 'vitest';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import { startEnd } from '../../../lib/region/start-end.ts';
import { trendFamily } from '../../../lib/region/trend-family.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { preWhitened } from '../../../lib/statistics/pre-whitening.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { ar1VarianceFactor } from '../../../lib/statistics/serial-correlation.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

/** A wandering series, the same on every machine; NaN in two years. */
function wandering(n: number, slope = -0.004): number[] {
  let state = 12345;
  let level = 0;
  const values = Array.from({ length: n }, (_, i) => {
    state = (state * 1103515245 + 12345) % 2147483648;
    level = 0.5 * level + state / 2147483648 - 0.5;
    return Math.round(1000 * (2 + slope * i + 0.4 * level)) / 1000;
  });
  values[3] = Number.NaN;
  values[20] = Number.NaN;
  return values;
}

function rankedAlone(values: number[], keys: Parameters<typeof basisOf>[0] = {}) {
  const basis = basisOf({ serialCorrection: 'ar1', period: [1980, 1979 + values.length], ...keys });
  const ranking = rankRegion([station('A', { first: 1980, values })], basis, YEAR_START);
  return { row: ranking.rows[0], basis: ranking.basis };
}

const f32 = (value: number | null): number => Math.fround(value ?? Number.NaN);

test('startEnd: the cell of the whole period has the ranking’s own figures', () => {
  const { row, basis } = rankedAlone(wandering(40));
  const { starts, ends, z, p, percentPerDecade, slopePerDecade } = startEnd(row, basis);
  expect([starts[0], ends[ends.length - 1]]).toEqual([1980, 2019]);
  const whole = ends.length - 1;
  expect(row.r1).toBeGreaterThan(0);
  expect(z[whole]).toBe(f32(row.z));
  expect(p[whole]).toBe(f32(row.p));
  expect(slopePerDecade[whole]).toBeCloseTo(row.valueSlope!, 6);
  expect(percentPerDecade[whole]).toBeCloseTo(row.percentPerDecade!, 4);
});

test('startEnd: a window keeps the whole period’s r1 and takes the factor for its own years', () => {
  const values = wandering(40);
  const { row, basis } = rankedAlone(values);
  const { starts, ends, z, percentPerDecade } = startEnd(row, basis);
  const [i, j] = [starts.indexOf(1990), ends.indexOf(2012)];
  const years = row.years.filter((year) => year >= 1990 && year <= 2012);
  const part = years.map((year) => values[year - 1980]);
  // 1990–2012 less the unusable year 2000
  expect(years.length).toBe(22);
  const alone = mannKendall(part, { varianceFactor: ar1VarianceFactor(22, row.r1!) });
  expect(z[i * ends.length + j]).toBe(f32(alone.z));
  const mean = part.reduce((sum, value) => sum + value, 0) / part.length;
  expect(percentPerDecade[i * ends.length + j]).toBeCloseTo((1000 * senSlope(years, part).slope) / mean, 4);
});

test.each(['all-lags', 'block-bootstrap'] as const)(
  'startEnd: %s keeps the factor of the whole period',
  (correction) => {
    const values = wandering(40);
    const { row, basis } = rankedAlone(values, { serialCorrection: correction });
    const { ends, z } = startEnd(row, basis);
    const part = values.slice(0, 30).filter((value) => !Number.isNaN(value));
    expect(z[ends.indexOf(2009)]).toBe(f32(mannKendall(part, { varianceFactor: row.serialFactor! }).z));
  },
);

test('startEnd: pre-whitened whitens each window by the whole period’s r1, about the window’s own slope', () => {
  const values = wandering(60, 0);
  const { row, basis } = rankedAlone(values, { serialCorrection: 'pre-whitened' });
  expect(row.r1).toBeGreaterThan(0.2);
  const { ends, z } = startEnd(row, basis);
  expect(z[ends.length - 1]).toBe(f32(row.z));
  const years = row.years.slice(0, 30);
  const part = row.values.slice(0, 30);
  const whitened = preWhitened({ years, values: part, slope: senSlope(years, part).slope }, row.r1!);
  expect(z[ends.indexOf(years[29])]).toBe(f32(mannKendall(whitened.values).z));
});

test('startEnd: a start in a year that is not usable has the window of the next usable one', () => {
  const { row, basis } = rankedAlone(wandering(40));
  const { starts, ends, z } = startEnd(row, basis);
  const whole = ends.length - 1;
  expect(z[starts.indexOf(1983) * ends.length + whole]).toBe(z[starts.indexOf(1984) * ends.length + whole]);
});

test('startEnd: a window of 14 usable years has no figure, one of 15 has', () => {
  const { row, basis } = rankedAlone(constant(30).map((_, i) => i + 1));
  const { starts, ends, z } = startEnd(row, basis);
  expect(starts.length).toBe(16);
  const cell = (start: number, end: number) => z[starts.indexOf(start) * ends.length + ends.indexOf(end)];
  expect(cell(1981, 1994)).toBeNaN();
  expect(cell(1981, 1995)).toBeGreaterThan(0);
});

test('startEnd: fewer than 15 usable years have no windows, and no steadiness', () => {
  const { row, basis } = rankedAlone(
    constant(14).map((_, i) => i + 1),
    { minYears: 3 },
  );
  expect(startEnd(row, basis)).toMatchObject({ starts: [], ends: [], windows: 0, steadiness: null });
});

test('startEnd: a drying station is charted by its zero-flow days, Z below 0 where they grow', () => {
  const values = constant(40).map((_, i) => (i % 2 ? 0 : 1));
  const zeroDays = values.map((_, i) => 10 + i);
  const basis = basisOf({ serialCorrection: 'none', period: [1980, 2019] });
  const { rows, basis: resolved } = rankRegion([station('D', { first: 1980, values, zeroDays })], basis, YEAR_START);
  const { ends, z, slopePerDecade, percentPerDecade, steadiness } = startEnd(rows[0], resolved);
  expect(rows[0].trendOf).toBe('zero-days');
  const whole = ends.length - 1;
  expect([Math.sign(z[whole]), slopePerDecade[whole], steadiness]).toEqual([-1, 10, 1]);
  expect(percentPerDecade.every(Number.isNaN)).toBe(true);
});

test('startEnd: a station that is not ranked is charted with its own lag-1 correlation', () => {
  const values = wandering(18);
  const { row, basis } = rankedAlone(values);
  expect([row.rank, row.serialFactor]).toEqual([null, null]);
  const { ends, z } = startEnd(row, basis);
  const [alone] = trendFamily([{ years: row.years, values: row.values }], 'ar1');
  expect(z[ends.length - 1]).toBe(f32(alone.z));
});

test('startEnd: equal values have Z 0 and p 1, and their sign is no sign', () => {
  const { row, basis } = rankedAlone(constant(20));
  const { ends, z, p, steadiness } = startEnd(row, basis);
  expect([z[ends.length - 1], p[ends.length - 1], steadiness]).toEqual([0, 1, null]);
});

test.each([
  ['only unusable years', constant(30, Number.NaN), {}],
  ['a period outside the record', wandering(40), { period: [1900, 1940] as [number, number] }],
  ['one year', [1], {}],
  ['two years', [1, 2], {}],
])('startEnd: %s have an empty chart', (_, values, keys) => {
  const { row, basis } = rankedAlone(values, keys);
  const { starts, ends, z, windows, steadiness } = startEnd(row, basis);
  expect([starts, ends, z.length, windows, steadiness]).toEqual([[], [], 0, 0, null]);
});

test('startEnd: minYears over the period leaves the station unranked, and its chart as it is', () => {
  const { row, basis } = rankedAlone(wandering(40), { minYears: 60 });
  expect(row.rank).toBeNull();
  const { ends, z } = startEnd(row, basis);
  expect(z[ends.length - 1]).toBe(f32(rankedAlone(wandering(40)).row.z));
});

test('startEnd: all zeros have no slope, no percentage and p 1', () => {
  const { row, basis } = rankedAlone(constant(30, 0));
  const { ends, p, slopePerDecade, percentPerDecade } = startEnd(row, basis);
  const whole = ends.length - 1;
  expect([p[whole], slopePerDecade[whole] + 0, percentPerDecade[whole]]).toEqual([1, 0, Number.NaN]);
});

test('startEnd: an infinite value is refused by its place', () => {
  const { row, basis } = rankedAlone(wandering(40));
  const infinite = { ...row, values: row.values.with(7, Number.NEGATIVE_INFINITY) };
  expect(() => startEnd(infinite, basis)).toThrow('windowScores: x[7]');
});

test('startEnd: Z is below 0 where it gets drier also at a station that is not ranked', () => {
  const days = Array.from({ length: 30 }, (_, i) => 2 * i);
  const made = station('A', { first: 1980, values: constant(30), zeroDays: days });
  for (const minYears of [20, 31]) {
    const basis = basisOf({ index: 'zero-flow-days', period: null, minYears, serialCorrection: 'ar1' });
    const ranking = rankRegion([made], basis, YEAR_START);
    expect(ranking.counts.ranked).toBe(minYears === 20 ? 1 : 0);
    const { z, slopePerDecade } = startEnd(ranking.rows[0], ranking.basis);
    expect(Math.max(...z.filter((each) => !Number.isNaN(each)))).toBeLessThan(0);
    expect(slopePerDecade[z.length - 1]).not.toBeLessThan(0);
  }
});
