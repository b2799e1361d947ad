import { expect, test } from 'vitest';
import { resolveYearStart } from '../../../lib/region/year-start.ts';

/** Ratios of one station, wettest in `month` (1–12). */
const regime = (month: number, peak = 2) => Float64Array.from({ length: 12 }, (_, i) => (i + 1 === month ? peak : 0.9));

test('resolveYearStart is the wettest month of one station', () => {
  expect(resolveYearStart([regime(1)])).toBe(1);
  expect(resolveYearStart([regime(12)])).toBe(12);
});

test('resolveYearStart goes by the median over stations, so that one flashy station does not decide', () => {
  expect(resolveYearStart([regime(4), regime(4), regime(8, 50)])).toBe(4);
});

test('resolveYearStart takes the earliest of equal months', () => {
  expect(resolveYearStart([regime(5), regime(9)])).toBe(5);
  expect(resolveYearStart([new Float64Array(12).fill(1)])).toBe(1);
});

test('resolveYearStart leaves out months never seen', () => {
  const summerOnly = regime(6).map((ratio, i) => (i >= 3 && i < 9 ? ratio : Number.NaN));
  expect(resolveYearStart([summerOnly])).toBe(6);
  expect(resolveYearStart([summerOnly, new Float64Array(12).fill(Number.NaN)])).toBe(6);
});

test('resolveYearStart is April when nothing is known', () => {
  expect(resolveYearStart([])).toBe(4);
  expect(resolveYearStart([new Float64Array(12).fill(Number.NaN)])).toBe(4);
});

test('resolveYearStart refuses a regime that does not have twelve months', () => {
  expect(() => resolveYearStart([regime(1), new Float64Array(11)])).toThrow(
    'resolveYearStart: regimes[1] must have 12 figures, got 11',
  );
});
