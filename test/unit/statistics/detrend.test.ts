import { expect, test } from 'vitest';
import { detrended } from '../../../lib/statistics/detrend.ts';

test('detrended takes slope × years since the first one out of values, over real years', () => {
  const rest = detrended({ years: [1990, 1991, 1995], values: [3, 2.5, 0.5], slope: -0.5 }, 'here');
  expect([...rest]).toEqual([3, 3, 3]);
});

test('detrended rounds to 9 decimals, so that 0.1 + 0.2 and 0.3 stay tied', () => {
  const rest = detrended({ years: [1, 2], values: [0.1 + 0.2, 0.3], slope: 0 }, 'here');
  expect(rest[0]).toBe(rest[1]);
});

test('detrended of no value is empty, and of one value, which has no slope, NaN', () => {
  expect([...detrended({ years: [], values: [], slope: Number.NaN }, 'here')]).toEqual([]);
  expect([...detrended({ years: [1], values: [4], slope: Number.NaN }, 'here')]).toEqual([Number.NaN]);
});

test.each([
  [{ years: [1], values: [1, 2], slope: 0 }, 'here: years and values must have the same length, got 1 and 2'],
  [{ years: [1, 1], values: [1, 2], slope: 0 }, 'here: years must rise, got 1 after 1'],
  [{ years: [1, Number.NaN], values: [1, 2], slope: 0 }, 'here: years must rise, got NaN after 1'],
  [{ years: [1, 2], values: [1, Number.NaN], slope: 0 }, 'here: values[1] must be a finite number, got NaN'],
  [{ years: [1, 2], values: [Infinity, 1], slope: 0 }, 'here: values[0] must be a finite number, got Infinity'],
  [{ years: [1, 2], values: [1, 2], slope: -Infinity }, 'here: slope must be a finite number, got -Infinity'],
])('detrended refuses %j in the name of its caller', (series, message) => {
  expect(() => detrended(series, 'here')).toThrow(new RangeError(message));
});
