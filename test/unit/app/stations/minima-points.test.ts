import { describe, expect, test } from 'vitest';
import { yearTicks } from '@/app/components/year-ticks';
import { coverageText } from '@/app/regions/[region]/stations/[code]/coverage-text';
import {
  changeText,
  changeUnit,
  dateText,
  dateTicks,
  indexScale,
  valueText,
} from '@/app/regions/[region]/stations/[code]/index-scale';
import { comparedPoints, minimaPoints } from '@/app/regions/[region]/stations/[code]/minima-points';
import { placeOf } from '@/app/regions/[region]/stations/[code]/ranking-place';
import { readingText } from '@/app/regions/[region]/stations/[code]/reading-text';
import type { AnnualMinima } from '@/lib/lowflow/annual-minima-types';
import type { RankingRow } from '@/lib/region/ranking-types';

// 1999: used; 2000: usable, not used; 2001: an upper bound; 2002: no window at all
const MINIMA: AnnualMinima = {
  years: Int32Array.of(1999, 2000, 2001, 2002),
  usable: Uint8Array.of(1, 1, 0, 0),
  missingDays: Int32Array.of(0, 1, 60, 365),
  minimum: Float64Array.of(0, 0.25, 0.5, Number.NaN),
  day: Int32Array.of(10_957, 11_200, 11_500, -1),
  reason: ['', '', '60 of 365 days are missing', 'no 7 days in a row'],
  flaggedDays: Int32Array.of(0, 0, 3, 0),
  zeroDays: Float64Array.of(0, 0, 0, Number.NaN),
  meanFlow: Float64Array.of(1, 1, 1, Number.NaN),
};

describe('minimaPoints', () => {
  const points = minimaPoints(MINIMA, 4, [1999]);

  test('names years by the low-flow year and dates by the calendar', () => {
    expect(points.map((point) => point.label)).toEqual(['1999/00', '2000/01', '2001/02', '2002/03']);
    expect(points[0].date).toBe('2000-01-01');
  });

  test('keeps a minimum of zero apart from none at all', () => {
    expect(points[0].minimum).toBe(0);
    expect(points[3]).toMatchObject({ minimum: null, date: null });
  });

  test('tells used, usable and unusable years apart', () => {
    expect(points.map(({ usable, used }) => [usable, used])).toEqual([
      [true, true],
      [true, false],
      [false, false],
      [false, false],
    ]);
  });

  test('a year that the trend names but that is not usable is not used', () => {
    expect(minimaPoints(MINIMA, 4, [2001])[2].used).toBe(false);
  });
});

test('readingText says an upper bound, the reason and what is missing', () => {
  const [used, outside, bound, none] = minimaPoints(MINIMA, 4, [1999]).map((point) =>
    readingText(point, indexScale('minimum', 7, 'metric'), 7),
  );
  expect(used).toBe('1999/00: 0 m³/s, in the 7 days to 2000-01-01; 0 days missing');
  expect(outside).toMatch(/1 day missing\. Usable, but not among the years compared/);
  expect(bound).toMatch(
    /^2001\/02: at most 0\.500 m³\/s, .*60 days missing, 3 flagged\. Not used: 60 of 365 days are missing$/,
  );
  expect(none).toBe('2002/03: no minimum; 365 days missing. Not used: no 7 days in a row');
});

test('comparedPoints shows the figures of the years used, and the minima under Drying', () => {
  const points = minimaPoints(MINIMA, 4, [1999]);
  const row = { years: [1999], values: [12], drying: false };
  expect(comparedPoints(points, row, 'zero-flow-days').map(({ value }) => value)).toEqual([12, null, null, null]);
  expect(comparedPoints(points, row, 'minimum').map(({ value }) => value)).toEqual([0, 0.25, 0.5, null]);
  expect(comparedPoints(points, { ...row, drying: true }, 'q95').map(({ value }) => value)).toEqual([
    0,
    0.25,
    0.5,
    null,
  ]);
});

describe('indexScale', () => {
  test('names the axis with its unit, in the units shown', () => {
    expect(indexScale('minimum', 30, 'metric').axisName).toBe('Lowest 30-day mean of each year, m³/s');
    expect(indexScale('q95', 7, 'us').axisName).toBe('Q95 of each year, ft³/s');
    expect(indexScale('bfi', 7, 'us').axisName).toBe('Baseflow index of each year');
    expect(indexScale('minimum-date', 7, 'us').axisName).toBe('Date of the lowest 7-day mean of each year');
  });

  test('tells volumes in millions: 2,500,000 m³ are 88.3 million ft³', () => {
    expect(valueText(2.5e6, indexScale('deficit', 7, 'metric'))).toBe('2.50 million m³');
    expect(valueText(2.5e6, indexScale('deficit', 7, 'us'))).toBe('88.3 million ft³');
  });

  test('tells dates as day and month, unrolled ones too, and their change in days', () => {
    const dates = indexScale('minimum-date', 7, 'metric');
    expect(valueText(248.4, dates)).toBe('5 September');
    expect([1, 0, -5, 365, 366].map(dateText)).toEqual([
      '1 January',
      '31 December',
      '26 December',
      '31 December',
      '1 January',
    ]);
    expect([changeText(-5.2, dates), changeUnit(dates)]).toEqual(['−5.20', 'days']);
    expect(valueText(null, dates)).toBe('no figure used');
  });

  test('dateTicks are firsts of months, no more than seven', () => {
    expect(dateTicks(-20, 40)).toEqual([
      { value: 1, text: '1 Jan' },
      { value: 32, text: '1 Feb' },
    ]);
    expect(dateTicks(1, 365).length).toBeLessThanOrEqual(7);
  });
});

test('coverageText counts days by kind', () => {
  const flagged = { estimated: 4, provisional: 0, ice: 2, belowDetection: 0, suspect: 0, rejected: 0 };
  const year = {
    year: 1999,
    label: '1999/00',
    days: 366,
    missingDays: 6,
    state: 'usable',
    flagged,
    reason: '',
  } as const;
  expect(coverageText(year)).toBe('1999/00: 360 of 366 days with a value (4 estimated, 2 under ice); the year counts');
  expect(coverageText({ ...year, missingDays: 100, state: 'partial', reason: '100 days are missing' })).toMatch(
    /does not count: 100 days are missing$/,
  );
});

describe('yearTicks', () => {
  test('every tenth year where there is room for that many', () => {
    expect(yearTicks(1951, 2024, 500)).toEqual([1960, 1970, 1980, 1990, 2000, 2010, 2020]);
  });

  test('every year of a short record', () => {
    expect(yearTicks(2000, 2004, 500)).toEqual([2000, 2001, 2002, 2003, 2004]);
  });

  test('never more than fit, whatever the width', () => {
    expect(yearTicks(1900, 2024, 60).length).toBeLessThanOrEqual(3);
  });
});

test('placeOf gives the stations before and after in the ranking, and null at its ends', () => {
  const rows = ['a', 'b', 'c'].map((code) => ({ code, name: code.toUpperCase() })) as RankingRow[];
  expect(placeOf(rows, 'b')).toEqual({ previous: { code: 'a', name: 'A' }, next: { code: 'c', name: 'C' } });
  expect(placeOf(rows, 'a').previous).toBeNull();
  expect(placeOf(rows, 'c').next).toBeNull();
  expect(placeOf(rows, 'z')).toEqual({ previous: null, next: null });
});
