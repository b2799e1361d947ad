import { describe, expect, test } from 'vitest';
import { rankSum } from '../../../lib/statistics/rank-sum.ts';

describe('rankSum', () => {
  test('by hand: 3 values against 4, one pair of them equal', () => {
    // 5 > 1 2 4; 4 > 1 2 and = 4; 7 > all; 3 > 1 2: U = 3 + 2.5 + 3 + 2 = 10.5 of 12
    const { u, variance, z, p, before, after } = rankSum([1, 2, 4], [5, 4, 7, 3]);
    expect([before, after, u]).toEqual([3, 4, 10.5]);
    // 12/12·(8 − 2·3/(7·6)) = 7.857; z = (10.5 − 6 − .5)/√7.857
    expect(variance).toBeCloseTo(8 - 6 / 42, 14);
    expect(z).toBeCloseTo(4 / Math.sqrt(8 - 6 / 42), 14);
    expect(p).toBeCloseTo(0.1536, 3);
  });

  test('the other way round it has the other sign and the same p', () => {
    const there = rankSum([1, 2, 4], [5, 4, 7, 3]);
    const back = rankSum([5, 4, 7, 3], [1, 2, 4]);
    expect(back.z).toBe(-there.z);
    expect(back.p).toBe(there.p);
  });

  test('a serial factor of 4 halves z', () => {
    expect(rankSum([1, 2, 4], [5, 4, 7, 3], 4).z).toBeCloseTo(rankSum([1, 2, 4], [5, 4, 7, 3]).z / 2, 14);
  });

  test('missing values are left out', () => {
    expect(rankSum([1, Number.NaN, 2, 4], [5, 4, 7, Number.NaN, 3])).toEqual(rankSum([1, 2, 4], [5, 4, 7, 3]));
  });

  test('all equal, all zero and one value a part: z 0 and p 1', () => {
    expect(rankSum([0, 0, 0], [0, 0])).toMatchObject({ u: 3, variance: 0, z: 0, p: 1 });
    // U is 1 of 1: half a pair from its mean, which the continuity correction takes
    expect(rankSum([1], [2])).toMatchObject({ u: 1, z: 0, p: 1 });
  });

  test('a part without a value has no answer', () => {
    for (const [before, after] of [
      [[], [1, 2]],
      [[1, 2], [Number.NaN]],
      [[], []],
    ]) {
      expect(rankSum(before, after)).toMatchObject({ u: 0, variance: Number.NaN, z: Number.NaN, p: Number.NaN });
    }
  });

  test('infinite values and factors that are not positive are refused', () => {
    expect(() => rankSum([1, Infinity], [2])).toThrow('rankSum: x[1] must be a finite number or NaN, got Infinity');
    expect(() => rankSum([1], [-Infinity])).toThrow('rankSum: x[0] must be a finite number or NaN, got -Infinity');
    for (const factor of [0, -1, Number.NaN, Infinity]) {
      expect(() => rankSum([1], [2], factor)).toThrow(
        `rankSum: varianceFactor must be a positive number, got ${factor}`,
      );
    }
  });
});
