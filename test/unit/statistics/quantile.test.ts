import { quantileSorted } from 'd3-array';
import { median as simpleMedian } from 'simple-statistics';
import { expect, test } from 'vitest';
import { median, medianOfSorted, quantileType6, valueAtRank } from '../../../lib/statistics/quantile.ts';

const tens = [10, 20, 30, 40];

test('quantileType6 stands on the order statistics at r/(n + 1)', () => {
  expect([0.2, 0.4, 0.6, 0.8].map((p) => quantileType6(tens, p))).toEqual(tens);
});

test('quantileType6 is linear between order statistics', () => {
  expect(quantileType6(tens, 0.25)).toBeCloseTo(12.5, 12);
  expect(quantileType6(tens, 0.5)).toBeCloseTo(25, 12);
});

test('quantileType6 gives none below 1/(n + 1) and above n/(n + 1)', () => {
  expect(quantileType6(tens, 0.1999)).toBeNaN();
  expect(quantileType6(tens, 0.8001)).toBeNaN();
  expect(quantileType6(tens, 0)).toBeNaN();
  expect(quantileType6(tens, 1)).toBeNaN();
});

test('quantileType6 takes every r/(n + 1) for a rank, whatever the division leaves in the last bit', () => {
  for (const n of [1, 2, 6, 9, 28, 48, 97, 364]) {
    const sorted = Float64Array.from({ length: n }, (_, i) => i + 1);
    for (let r = 1; r <= n; r++) {
      expect(quantileType6(sorted, r / (n + 1))).toBe(r);
      expect(quantileType6(sorted, 1 - (n + 1 - r) / (n + 1))).toBe(r);
    }
  }
});

test('quantileType6 of one value is that value at 0.5 only, and of none nothing', () => {
  expect(quantileType6([7], 0.5)).toBe(7);
  expect(quantileType6([7], 0.49)).toBeNaN();
  expect(quantileType6([], 0.5)).toBeNaN();
});

test('quantileType6 refuses a probability outside 0..1 by name and value', () => {
  expect(() => quantileType6(tens, 95)).toThrow(new RangeError('quantileType6: probability must lie in 0..1, got 95'));
  expect(() => quantileType6(tens, Number.NaN)).toThrow(RangeError);
});

test('quantileType6 agrees with d3-array, whose type 7 reads the same sample at another probability', () => {
  const sorted = Array.from({ length: 37 }, (_, i) => (i * i * 31) % 101).sort((a, b) => a - b);
  const n = sorted.length;
  for (let p = 0.03; p < 0.97; p += 0.01) {
    // (n + 1)·p − 1 = (n − 1)·p7
    const other = quantileSorted(sorted, ((n + 1) * p - 1) / (n - 1));
    expect(quantileType6(sorted, p)).toBeCloseTo(other as number, 10);
  }
});

test('valueAtRank interpolates and answers NaN outside 1..n', () => {
  expect(valueAtRank([10, 20, 40], 2.5)).toBe(30);
  expect(valueAtRank([10, 20, 40], 1)).toBe(10);
  expect(valueAtRank([10, 20, 40], 3)).toBe(40);
  expect(valueAtRank([10, 20, 40], 0.999)).toBeNaN();
  expect(valueAtRank([10, 20, 40], 3.001)).toBeNaN();
  expect(valueAtRank([10, 20, 40], Number.NaN)).toBeNaN();
});

test('median takes the middle, or the mean of the middle two, of the values that exist', () => {
  expect(median([3, 1, 2])).toBe(2);
  expect(median([4, 1, 2, 3])).toBe(2.5);
  expect(median([Number.NaN, 4, 1, Number.NaN, 2])).toBe(2);
  expect(median([10, 9, 100])).toBe(10);
});

test('median of no value is NaN', () => {
  expect(median([])).toBeNaN();
  expect(median([Number.NaN])).toBeNaN();
  expect(medianOfSorted([])).toBeNaN();
});

test('median refuses an infinite value', () => {
  expect(() => median([1, Number.POSITIVE_INFINITY])).toThrow(
    new RangeError('median: x[1] must be a finite number or NaN, got Infinity'),
  );
});

test('median agrees with simple-statistics and leaves its input as it was', () => {
  const x = Array.from({ length: 58 }, (_, i) => (i * 7919) % 61);
  const copy = [...x];
  expect(median(x)).toBe(simpleMedian(x));
  expect(x).toEqual(copy);
});
