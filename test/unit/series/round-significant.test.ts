import { expect, test } from 'vitest';
import { roundSignificant } from '../../../lib/series/round-significant.ts';

test('roundSignificant makes equal what only binary fractions tell apart', () => {
  expect(roundSignificant((0.1 * 7 + 1e-17) / 7, 10)).toBe(0.1);
  expect(roundSignificant(0.1 + 0.2, 10)).toBe(0.3);
  expect(roundSignificant(123456.78916, 10)).toBe(123456.7892);
  expect(roundSignificant(-2 / 3, 10)).toBe(-0.6666666667);
});

test('roundSignificant leaves 0 as 0 and NaN as NaN', () => {
  expect(Object.is(roundSignificant(-0, 10), 0)).toBe(true);
  expect(roundSignificant(Number.NaN, 10)).toBeNaN();
});
