import { expect, test } from 'vitest';
import { annualMinima } from '../../../lib/lowflow/annual-minima.ts';
import { yearDays } from '../../../lib/lowflow/year-days.ts';
import { seriesOf, withFlag, withGap } from '../series-of.ts';

const WHOLE = { yearStart: 4, season: null } as const;

test('yearDays counts days with a value and with each flag, year by year', () => {
  // 2001-04-01 to 2003-03-31: two years of 365 days
  const level = seriesOf([2001, 4, 1], { days: 730, flow: () => 1 });
  const series = withFlag(withFlag(withGap(level, 10, 19), 'ice', 0, 14), 'suspect', 364, 366);
  const { firstYear, values, flagged } = yearDays(series, WHOLE);
  expect([firstYear, ...values]).toEqual([2001, 355, 365]);
  // of 15 days under ice five have no value
  expect([...flagged.ice]).toEqual([10, 0]);
  expect([...flagged.suspect]).toEqual([1, 2]);
  expect([...flagged.provisional]).toEqual([0, 0]);
});

test('yearDays has the years that annualMinima has, at a record’s ends as well', () => {
  const series = withGap(seriesOf([2001, 3, 30], { days: 800, flow: (day) => 1 + day }), 0, 3);
  for (const yearStart of [1, 4, 10]) {
    const minima = annualMinima(series, { yearStart, season: null, days: 7, maxMissingDays: 18, exclude: [] });
    const { firstYear, values } = yearDays(series, { yearStart, season: null });
    expect(firstYear).toBe(minima.years[0]);
    expect(values).toHaveLength(minima.years.length);
    expect(values.reduce((sum, days) => sum + days, 0)).toBe(796);
  }
});

test('yearDays of a season counts its days alone, over the turn of the year as well', () => {
  const series = seriesOf([2001, 4, 1], { days: 730, flow: () => 1 });
  expect([...yearDays(series, { yearStart: 4, season: [6, 8] }).values]).toEqual([92, 92]);
  expect([...yearDays(series, { yearStart: 4, season: [12, 2] }).values]).toEqual([90, 90]);
});

test('yearDays of a record without a value has no years', () => {
  const nothing = { firstYear: null, values: new Uint16Array(0) };
  expect(yearDays(seriesOf([2001, 4, 1], []), WHOLE)).toMatchObject(nothing);
  expect(yearDays(seriesOf([2001, 4, 1], [Number.NaN, Number.NaN]), WHOLE)).toMatchObject(nothing);
});
