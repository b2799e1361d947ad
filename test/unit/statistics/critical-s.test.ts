import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { criticalS } from '../../../lib/statistics/critical-s.ts';
import { mannKendall, varianceOfS } from '../../../lib/statistics/mann-kendall.ts';

describe('criticalS', () => {
  test('is the first S whose p is below alpha, by hand for n = 10', () => {
    // (22 − 1)/√125 = 1.878 and (23 − 1)/√125 = 1.968, about 1.960; with factor 2 (32 − 1)/√250 = 1.961
    expect(criticalS({ n: 10, variance: 125, alpha: 0.05 })).toBe(23);
    expect(criticalS({ n: 10, variance: 125, alpha: 0.05, varianceFactor: 2 })).toBe(32);
  });

  test('takes the exact distribution where the test does', () => {
    // n = 4: P(|S| ≥ 6) = 2/24 = 0.083, P(|S| ≥ 4) = 8/24; n = 3 has no p below 2/6
    expect(criticalS({ n: 4, variance: 26 / 3, alpha: 0.1, exact: true })).toBe(5);
    expect(criticalS({ n: 3, variance: 11 / 3, alpha: 0.1, exact: true })).toBe(Number.POSITIVE_INFINITY);
  });

  test('is out of reach where no S is rejected', () => {
    expect(criticalS({ n: 2, variance: 1, alpha: 0.1 })).toBe(Number.POSITIVE_INFINITY);
    expect(criticalS({ n: 20, variance: 0, alpha: 0.1 })).toBe(Number.POSITIVE_INFINITY);
    expect(criticalS({ n: 0, variance: Number.NaN, alpha: 0.1 })).toBe(Number.POSITIVE_INFINITY);
  });

  test('rejects exactly what mannKendall rejects', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 0, max: 30 }), { minLength: 2, maxLength: 40 }),
        fc.double({ min: 0.001, max: 0.5, noNaN: true }),
        fc.double({ min: 1, max: 3, noNaN: true }),
        fc.boolean(),
        (values, alpha, factor, exact) => {
          const varianceFactor = exact ? 1 : factor;
          const { s, p } = mannKendall(values, { varianceFactor, exact });
          const { variance, tiedPairs } = varianceOfS(Float64Array.from(values));
          const critical = criticalS({ n: values.length, variance, alpha, varianceFactor, exact, tied: tiedPairs > 0 });
          expect(Math.abs(s) >= critical).toBe(p < alpha);
        },
      ),
    );
  });

  test('refuses an alpha of 0 or 1, and a factor that is not positive', () => {
    for (const alpha of [0, 1, Number.NaN]) {
      expect(() => criticalS({ n: 10, variance: 125, alpha })).toThrow(
        `criticalS: alpha must lie between 0 and 1, got ${alpha}`,
      );
    }
    expect(() => criticalS({ n: 10, variance: 125, alpha: 0.05, varianceFactor: 0 })).toThrow('got 0');
  });
});
