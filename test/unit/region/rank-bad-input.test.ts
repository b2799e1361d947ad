/** A ranking of what no record should be, or of terms that no region can meet: an answer that says so, or a refusal. */
import { expect, test } from 'vitest';
import { parseBasis, SERIAL_CORRECTIONS } from '../../../lib/basis.ts';
import { rankRegion } from '../../../lib/region/rank-stations.ts';
import type { StationMinima } from '../../../lib/region/ranking-types.ts';
import { basisOf, constant, station, YEAR_START } from './region-fixtures.ts';

const FIRST = 1981;
const YEARS = 40;
const fixed = basisOf({ period: [1981, 2020] });
const ranking = (stations: StationMinima[], basis = fixed) => rankRegion(stations, basis, YEAR_START);

/** Invented minima that differ from year to year. */
const varied = (code: string, shift = 0) =>
  station(code, {
    first: FIRST,
    values: Array.from({ length: YEARS }, (_, i) => 2 + (((i + shift) * 7919) % 97) / 50 - 0.01 * i),
  });

test.each(SERIAL_CORRECTIONS)(
  'rankRegion under %s ranks a station whose minima are all equal, without a trend',
  (how) => {
    const equal = station('equal', { first: FIRST, values: constant(YEARS, 1.5) });
    const { rows } = ranking([equal, varied('other')], basisOf({ ...fixed, serialCorrection: how }));
    expect(rows.find(({ code }) => code === 'equal')).toMatchObject({
      slopePerDecade: 0,
      slopeLow: 0,
      slopeHigh: 0,
      percentPerDecade: 0,
      z: 0,
      p: 1,
      pAdjusted: 1,
      tau: null,
      trend: 'none',
      serialFactor: 1,
      unrankedReason: null,
    });
  },
);

test.each(SERIAL_CORRECTIONS)('rankRegion under %s lists a station whose minima are all zero under Drying', (how) => {
  const zero = station('zero', { first: FIRST, values: constant(YEARS, 0), zeroDays: constant(YEARS, 365) });
  const { rows, counts } = ranking([zero], basisOf({ ...fixed, serialCorrection: how }));
  expect(counts).toMatchObject({ ranked: 0, drying: 1 });
  expect(rows[0]).toMatchObject({ drying: true, rank: null, zeroDaysPerDecade: 0, p: 1, trend: 'none' });
  expect(rows[0].unrankedReason).toContain('40 of 40');
});

test('rankRegion says of a station without a usable year, and of one with two, how many there are', () => {
  const nothing = station('nothing', { first: FIRST, values: constant(YEARS, Number.NaN) });
  const two = station('two', { first: FIRST, values: [1, 2] });
  const { rows, counts } = ranking([two, nothing]);
  expect(counts).toMatchObject({ stations: 2, ranked: 0, unranked: 2 });
  for (const [row, years] of [
    [rows[0], 0],
    [rows[1], 2],
  ] as const) {
    expect(row).toMatchObject({ yearsUsed: years, rank: null, z: null, p: null, slopePerDecade: null, trend: null });
    expect(row.unrankedReason).toMatch(years === 0 ? /^no usable year/ : /^2 usable years/);
  }
});

test('rankRegion of two stations with two values each has no common period and says so', () => {
  const short = (code: string) => station(code, { first: FIRST, values: [1, 2] });
  const { basis, counts, warnings } = ranking([short('a'), short('b')], basisOf({ period: 'common' }));
  expect(basis.period).toBeNull();
  expect(counts.ranked).toBe(0);
  expect(warnings.length).toBeGreaterThan(0);
});

test.each(SERIAL_CORRECTIONS)('rankRegion under %s of one station: first of one, its p its own', (how) => {
  const { rows, counts } = ranking([varied('alone')], basisOf({ ...fixed, serialCorrection: how }));
  expect(counts).toMatchObject({ stations: 1, ranked: 1 });
  expect(rows[0].rank).toBe(1);
  expect(rows[0].pAdjusted).toBe(rows[0].p);
});

test('rankRegion of a period outside every record ranks nobody, each with the reason', () => {
  const { rows, counts, basis } = ranking([varied('a'), varied('b')], basisOf({ period: [1900, 1940] }));
  expect(basis.period).toEqual([1900, 1940]);
  expect(counts).toMatchObject({ ranked: 0, unranked: 2 });
  for (const row of rows) {
    expect(row).toMatchObject({ yearsUsed: 0, firstYear: null, p: null });
    expect(row.unrankedReason).toBe('no usable year in 1900–1940');
  }
});

test('rankRegion with minYears over the length of the period ranks nobody, and says what was asked for', () => {
  const { rows, counts } = ranking([varied('a')], basisOf({ period: [1981, 1990], minYears: 20 }));
  expect(counts.ranked).toBe(0);
  expect(rows[0].unrankedReason).toContain('20');
  const common = ranking([varied('a')], basisOf({ period: 'common', minYears: 500 }));
  expect(common.basis.period).toBeNull();
  expect(common.counts.ranked).toBe(0);
});

test('parseBasis refuses an alpha of 0 or 1, and rankRegion given one all the same calls nothing or everything a trend', () => {
  for (const alpha of [0, 1, Number.NaN, Number.POSITIVE_INFINITY]) {
    expect(() => parseBasis({ alpha })).toThrow(/Basis key "alpha" cannot be .*: a number 0.001–0.5/);
  }
  const stations = [varied('a'), varied('b', 3), station('equal', { first: FIRST, values: constant(YEARS) })];
  expect(ranking(stations, { ...fixed, alpha: 0 }).counts).toMatchObject({ ranked: 3, falling: 0, rising: 0 });
  const { rows } = ranking(stations, { ...fixed, alpha: 1 });
  for (const { p, trend } of rows) expect(trend === 'none').toBe(p === 1);
});

test.each([Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])(
  'rankRegion refuses a minimum of %d and names station and year; outside the period it plays no part',
  (value) => {
    const values = Array.from({ length: YEARS }, (_, i) => (i === 5 ? value : i));
    const spoilt = station('spoilt', { first: FIRST, values });
    expect(() => ranking([varied('a'), spoilt])).toThrow(
      new RangeError(`rankRegion: minimum of spoilt in 1986 must be a finite number, got ${value}`),
    );
    expect(ranking([spoilt], basisOf({ period: [1990, 2020] })).counts.ranked).toBe(1);
  },
);
