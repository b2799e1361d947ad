import { expect, test } from 'vitest';
import { FLAG } from '../../../lib/series/daily-series.ts';
import { derive, deriveText } from '../../../lib/series/derive.ts';

const gap = Number.NaN;
const series = (firstDay: number, values: number[], flags: number[] = values.map(() => 0)) => ({
  firstDay,
  values: Float64Array.from(values),
  flags: Uint8Array.from(flags),
});
const plain = (made: ReturnType<typeof derive>) =>
  made && { firstDay: made.firstDay, values: [...made.values], flags: [...made.flags] };

test('derive() adds terms day by day, each by its factor, where all have a value', () => {
  const made = derive([
    { series: series(10, [1, 2, gap, 4, 5]), factor: 1, lagDays: 0 },
    { series: series(11, [10, 20, 30, gap]), factor: 0.5, lagDays: 0 },
  ]);
  // day 10: no second term; 11: 2 + 5; 12: gap; 13: 4 + 15; 14: gap
  expect(plain(made)).toEqual({ firstDay: 11, values: [7, gap, 19], flags: [0, 0, 0] });
});

test('derive() takes a lagged term’s value of so many days before', () => {
  const made = derive([
    { series: series(0, [3, 2, 5]), factor: 1, lagDays: 0 },
    { series: series(0, [1, 1, 1]), factor: -1, lagDays: 1 },
  ]);
  expect(plain(made)).toEqual({ firstDay: 1, values: [1, 4], flags: [0, 0] });
  const ahead = derive([{ series: series(5, [8]), factor: 1, lagDays: -2 }]);
  expect(plain(ahead)).toEqual({ firstDay: 3, values: [8], flags: [0] });
});

test('derive() carries the flags of all values that a day comes from, and takes rejected days as missing', () => {
  const { estimated, provisional, rejected } = FLAG;
  const made = derive([
    { series: series(0, [1, 1, 1], [estimated, 0, rejected]), factor: 1, lagDays: 0 },
    { series: series(0, [2, 2, 2], [provisional, 0, 0]), factor: 1, lagDays: 0 },
  ]);
  expect(plain(made)).toEqual({ firstDay: 0, values: [3, 3], flags: [estimated | provisional, 0] });
});

test('derive() gives exactly 0 where equal flows are taken from one another in parts', () => {
  // In binary 0.3 − 0.1 − 0.2 is −2.8e-17: it would be counted as a negative flow, and not as a day without flow.
  const made = derive([
    { series: series(0, [0.3, 0.3]), factor: 1, lagDays: 0 },
    { series: series(0, [0.1, 0.1]), factor: -1, lagDays: 0 },
    { series: series(0, [0.2, 0.1999999]), factor: -1, lagDays: 0 },
  ]);
  expect(made?.values[0]).toBe(0);
  expect(made?.values[1]).toBeCloseTo(1e-7, 12);
});

test('derive() answers null where no day has all terms, and leaves its terms as they are', () => {
  const one = series(0, [1, gap]);
  const other = series(1, [1, 1]);
  expect(
    derive([
      { series: one, factor: 1, lagDays: 0 },
      { series: other, factor: 1, lagDays: 0 },
    ]),
  ).toBeNull();
  expect(
    derive([
      { series: one, factor: 1, lagDays: 0 },
      { series: series(9, [1]), factor: 1, lagDays: 0 },
    ]),
  ).toBeNull();
  expect([[...one.values], [...other.values]]).toEqual([
    [1, gap],
    [1, 1],
  ]);
});

test('derive() refuses no terms, a factor that is no number and a lag that is not whole, by name', () => {
  expect(() => derive([])).toThrow('derive: terms');
  expect(() => derive([{ series: series(0, [1]), factor: gap, lagDays: 0 }])).toThrow('derive: factor');
  expect(() => derive([{ series: series(0, [1]), factor: 1, lagDays: 0.5 }])).toThrow('derive: lagDays');
});

test('deriveText() prints a recipe in words', () => {
  const terms = [
    { code: '1041', factor: 1, lagDays: 0 },
    { code: '1043', factor: 0.8, lagDays: 2 },
    { code: '1050', factor: -1, lagDays: -1 },
  ];
  expect(deriveText({ quantity: 'flow', terms })).toBe('flow: 1041 + 0.8 × 1043 (2 days before) − 1050 (1 day after)');
  expect(deriveText({ quantity: 'potential-evaporation', terms: [{ code: 'A', factor: -2, lagDays: 0 }] })).toBe(
    'potential evaporation: −2 × A',
  );
});
