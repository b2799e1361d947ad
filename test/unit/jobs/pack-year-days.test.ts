import { expect, test } from 'vitest';
import { joinYearDays, packYearDays } from '../../../lib/jobs/pack-year-days.ts';
import { type YearDays, yearDays } from '../../../lib/lowflow/year-days.ts';
import { seriesOf, withFlag } from '../series-of.ts';

const years = (days: number, flag?: 'ice' | 'suspect'): YearDays => {
  const series = seriesOf([2001, 1, 1], { days, flow: () => 1 });
  return yearDays(flag ? withFlag(series, flag, 0, 4) : series, { yearStart: 1, season: null });
};

test('packYearDays lays stations end to end, and keeps only flags that some day carries', () => {
  const packed = packYearDays([
    { stationId: 7, years: years(400) },
    { stationId: 3, years: null },
    { stationId: 9, years: years(100, 'ice') },
  ]);
  expect(packed).toEqual({
    stationIds: Int32Array.of(7, 3, 9),
    starts: Int32Array.of(0, 2, 2, 3),
    values: Uint16Array.of(365, 35, 100),
    flagged: { ice: Uint16Array.of(0, 0, 5) },
  });
});

test('joinYearDays of packs is the pack of all their stations', () => {
  const all = [
    { stationId: 7, years: years(400, 'suspect') },
    { stationId: 3, years: null },
    { stationId: 9, years: years(100, 'ice') },
    { stationId: 1, years: years(10, 'suspect') },
  ];
  const packs = [packYearDays(all.slice(0, 1)), packYearDays(all.slice(1, 3)), packYearDays(all.slice(3))];
  expect(joinYearDays(packs)).toEqual(packYearDays(all));
  expect(joinYearDays([])).toEqual(packYearDays([]));
});
