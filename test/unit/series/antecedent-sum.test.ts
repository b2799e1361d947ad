import { expect, test } from 'vitest';
import { antecedentSum } from '../../../lib/series/antecedent-sum.ts';

const series = (...values: number[]) => ({ firstDay: 10, values: Float64Array.from(values) });

test('antecedentSum adds the days that end with the given one, itself among them', () => {
  expect(antecedentSum(series(1, 2, 4, 8), 12, 1)).toBe(4);
  expect(antecedentSum(series(1, 2, 4, 8), 12, 3)).toBe(7);
  expect(antecedentSum(series(1, 2, 4, 8), 13, 4)).toBe(15);
});

test('antecedentSum has no answer where the record begins too late or ends too early', () => {
  expect(antecedentSum(series(1, 2, 4, 8), 12, 4)).toBeNaN();
  expect(antecedentSum(series(1, 2, 4, 8), 14, 2)).toBeNaN();
  expect(antecedentSum(series(1, 2), 9, 1)).toBeNaN();
  expect(antecedentSum(series(), 10, 1)).toBeNaN();
});

test('antecedentSum stretches over a twentieth of missing days, and not over more', () => {
  const days = (missing: number) => series(...Array.from({ length: 40 }, (_, i) => (i < missing ? Number.NaN : 3)));
  expect(antecedentSum(days(1), 49, 40)).toBeCloseTo(120, 12);
  expect(antecedentSum(days(2), 49, 40)).toBeCloseTo(120, 12);
  expect(antecedentSum(days(3), 49, 40)).toBeNaN();
});

test('antecedentSum refuses stretches of no day, of parts of days, and of more than two years', () => {
  for (const days of [0, -1, 1.5, 732, Number.NaN]) {
    expect(() => antecedentSum(series(1), 10, days)).toThrow(
      `antecedentSum: days must be a whole number 1–731, got ${days}`,
    );
  }
  expect(() => antecedentSum(series(1), 10.5, 1)).toThrow('antecedentSum: lastDay must be a day number, got 10.5');
});
