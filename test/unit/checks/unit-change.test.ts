import { describe, expect, test } from 'vitest';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { unitChanges } from '../../../lib/checks/unit-change.ts';
import { inventedRecord } from './invented-record.ts';

const OPTIONS = { recession: 0.03, betweenYears: 0.15 };

/** A record of 1961–2020 in which the days [from, to) are in another unit. */
function mixed(from: string, to: string, factor: number, seed = 5) {
  const series = inventedRecord(seed, OPTIONS);
  const day = (iso: string) => dayNumber(Number(iso.slice(0, 4)), Number(iso.slice(5, 7)), 1) - series.firstDay;
  for (let i = Math.max(0, day(from)); i < Math.min(series.values.length, day(to)); i++) series.values[i] *= factor;
  return series;
}

const spans = (series: ReturnType<typeof mixed>) =>
  unitChanges(series).map(({ firstDay, lastDay }) => [isoDate(firstDay), isoDate(lastDay)]);

describe('unitChanges', () => {
  for (const factor of [28.3168, 35.3147, 1000, 86.4, 11.574, 0.0864]) {
    for (const one of [factor, 1 / factor]) {
      test(`finds some years ${one.toPrecision(4)} times the others`, () => {
        const [found, ...more] = unitChanges(mixed('1985-01', '1989-01', one));
        expect(more).toEqual([]);
        expect([isoDate(found.firstDay), isoDate(found.lastDay)]).toEqual(['1985-01-01', '1988-12-31']);
        expect(found.days).toBe(found.lastDay - found.firstDay + 1);
        expect(Number(found.detail.factor) / one).toBeCloseTo(1, 2);
        expect(Math.abs(Math.log(Number(found.detail.ratio) / one))).toBeLessThan(0.7);
      });
    }
  }

  test('finds a single year, a year of months other than a calendar year, and years at either end', () => {
    expect(spans(mixed('1990-01', '1991-01', 35.3147))).toEqual([['1990-01-01', '1990-12-31']]);
    expect(spans(mixed('1990-10', '1992-10', 35.3147))).toEqual([['1990-10-01', '1992-09-30']]);
    expect(spans(mixed('1961-01', '1966-01', 1000))).toEqual([['1961-01-01', '1965-12-31']]);
    expect(spans(mixed('2019-01', '2021-01', 1000))).toEqual([['2019-01-01', '2020-12-31']]);
  });

  test('takes the unit of most months for the usual one, and finds two stretches', () => {
    const series = mixed('1970-01', '1973-01', 86.4);
    const second = mixed('2000-01', '2005-01', 86.4);
    for (let i = dayNumber(2000, 1, 1) - series.firstDay; i < dayNumber(2005, 1, 1) - series.firstDay; i++) {
      series.values[i] = second.values[i];
    }
    expect(spans(series)).toEqual([
      ['1970-01-01', '1972-12-31'],
      ['2000-01-01', '2004-12-31'],
    ]);
  });

  test('tells ft³/s from ML/d where years are alike enough, and keeps still where the river’s own years differ as much', () => {
    const even = inventedRecord(9, { recession: 0.02, betweenYears: 0.05 });
    const wild = inventedRecord(9, { recession: 0.02, betweenYears: 0.6 });
    for (const { values, firstDay } of [even, wild]) {
      for (let i = dayNumber(1990, 1, 1) - firstDay; i < dayNumber(1993, 1, 1) - firstDay; i++) values[i] *= 2.4466;
    }
    expect(unitChanges(even)).toMatchObject([{ days: 1096, detail: { factor: 2.447 } }]);
    expect(unitChanges(wild)).toEqual([]);
  });

  test('is not misled by a gap between the units', () => {
    const series = mixed('2000-01', '2021-01', 1000);
    const day = dayNumber(1999, 1, 1) - series.firstDay;
    series.values.fill(Number.NaN, day, day + 365);
    expect(spans(series)).toEqual([['2000-01-01', '2020-12-31']]);
  });

  test('finds nothing in a step that no unit makes, in a river as it is, nor in a record too short or empty', () => {
    expect(unitChanges(mixed('1990-01', '2021-01', 5))).toEqual([]);
    for (let seed = 0; seed < 12; seed++) expect(unitChanges(inventedRecord(seed)), `seed ${seed}`).toEqual([]);
    expect(unitChanges(inventedRecord(1, { years: 1 }))).toEqual([]);
    expect(unitChanges({ firstDay: 0, values: new Float64Array(5000), flags: new Uint8Array(5000) })).toEqual([]);
    expect(unitChanges({ firstDay: 0, values: new Float64Array(0), flags: new Uint8Array(0) })).toEqual([]);
  });
});
