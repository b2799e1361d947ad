import { describe, expect, test } from 'vitest';
import { hodgesLehmann } from '../../../lib/statistics/hodges-lehmann.ts';
import { normalQuantile } from '../../../lib/statistics/normal.ts';

describe('hodgesLehmann', () => {
  test('by hand: the median of nine differences', () => {
    // 2 4 5 1 3 4 −1 1 2 in order: −1 1 1 2 2 3 4 4 5
    expect(hodgesLehmann([1, 2, 4], [3, 5, 6]).difference).toBe(2);
    expect(hodgesLehmann([1], [2, 5]).difference).toBe(2.5);
  });

  test('limits stand at the ranks (N − C)/2 and (N + C)/2 + 1, interpolated', () => {
    // ten zeros against 1 … 10: the differences are 1 … 10, ten times each; one group of ten ties, 10·99 = 990
    const zeros = new Float64Array(10);
    const ten = Array.from({ length: 10 }, (_, i) => i + 1);
    const variance = (100 / 12) * (21 - 990 / 380);
    const reach = normalQuantile(0.975) * Math.sqrt(variance);
    const { low, high } = hodgesLehmann(zeros, ten);
    expect(low).toBe(Math.ceil((50 - reach) / 10));
    expect(high).toBe(Math.ceil((50 + reach + 1) / 10));
  });

  test('a serial factor and a higher confidence widen the interval, and the difference stays', () => {
    const [before, after] = [
      [3, 1, 4, 1, 5, 9, 2, 6, 5, 3],
      [5, 8, 9, 7, 9, 3, 2, 3, 8, 4],
    ];
    const plain = hodgesLehmann(before, after);
    for (const wider of [
      hodgesLehmann(before, after, { varianceFactor: 2 }),
      hodgesLehmann(before, after, { confidence: 0.99 }),
    ]) {
      expect(wider.difference).toBe(plain.difference);
      expect(wider.low).toBeLessThan(plain.low);
      expect(wider.high).toBeGreaterThan(plain.high);
    }
  });

  test('too few pairs for the level have no limits', () => {
    expect(hodgesLehmann([1, 2], [3, 4])).toEqual({ difference: 2, low: Number.NaN, high: Number.NaN });
  });

  test('all zero, or each part all equal: the difference at the limits too', () => {
    const [twelve, nine] = [new Float64Array(12), new Float64Array(9)];
    expect(hodgesLehmann(twelve, nine)).toEqual({ difference: 0, low: 0, high: 0 });
    expect(hodgesLehmann(twelve.fill(1), nine.fill(4))).toEqual({ difference: 3, low: 3, high: 3 });
  });

  test('a part without a value has no answer; missing values are left out', () => {
    const none = { difference: Number.NaN, low: Number.NaN, high: Number.NaN };
    expect(hodgesLehmann([], [1])).toEqual(none);
    expect(hodgesLehmann([1], [Number.NaN])).toEqual(none);
    expect(hodgesLehmann([1, Number.NaN], [2, 5, Number.NaN]).difference).toBe(2.5);
  });

  test('infinite values, levels of 0 and 1 and factors that are not positive are refused', () => {
    expect(() => hodgesLehmann([Infinity], [1])).toThrow('hodgesLehmann: x[0] must be a finite number or NaN');
    for (const confidence of [0, 1, Number.NaN]) {
      expect(() => hodgesLehmann([1], [2], { confidence })).toThrow(
        `hodgesLehmann: confidence must lie between 0 and 1, got ${confidence}`,
      );
    }
    expect(() => hodgesLehmann([1], [2], { varianceFactor: 0 })).toThrow(
      'hodgesLehmann: varianceFactor must be a positive number, got 0',
    );
  });
});
