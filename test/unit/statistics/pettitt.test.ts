import { expect, test } from 'vitest';
import { pettitt } from '../../../lib/statistics/pettitt.ts';

test('pettitt finds a clean step, and its sign says which part is the lower one', () => {
  // by hand: the first three ranks are 4, 5, 6, so U = 2·15 − 3·7 = 9; p = min(1, 2·exp(−6·81/(216 + 36)))
  const down = pettitt([4, 5, 6, 1, 2, 3]);
  expect(down).toMatchObject({ k: 9, u: 9, at: 2 });
  expect(down.p).toBeCloseTo(2 * Math.exp(-486 / 252), 12);
  expect(pettitt([1, 2, 3, 4, 5, 6])).toMatchObject({ k: 9, u: -9, at: 2 });
});

test('pettitt leaves missing values out and places the change among all', () => {
  const { k, at } = pettitt([4, Number.NaN, 5, 6, Number.NaN, 1, 2, 3]);
  expect([k, at]).toEqual([9, 3]);
});

test('pettitt of no value, one value and equal values', () => {
  expect(pettitt([])).toEqual({ k: Number.NaN, u: Number.NaN, at: -1, p: Number.NaN });
  expect(pettitt([Number.NaN]).at).toBe(-1);
  expect(pettitt([7])).toEqual({ k: 0, u: 0, at: 0, p: 1 });
  expect(pettitt([2, 2, 2])).toMatchObject({ k: 0, p: 1 });
});

test('pettitt refuses an infinite value and leaves its input as it is', () => {
  expect(() => pettitt([1, Number.POSITIVE_INFINITY])).toThrow('pettitt: x[1] must be a finite number');
  const x = Float64Array.of(3, 1, 2);
  pettitt(x);
  expect([...x]).toEqual([3, 1, 2]);
});
