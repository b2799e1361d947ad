import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { largestLag1 } from '../../../lib/statistics/largest-lag1.ts';
import { twoSidedP } from '../../../lib/statistics/normal.ts';
import { ar1VarianceFactor } from '../../../lib/statistics/serial-correlation.ts';

test('largestLag1 parts the correlations at which an S is rejected from those at which it is not', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 3, max: 70 }),
      fc.integer({ min: -600, max: 600 }),
      fc.double({ min: 0, max: 0.95, noNaN: true }),
      fc.constantFrom(0.01, 0.05, 0.1, 0.5),
      (n, s, r1, alpha) => {
        const variance = (n * (n - 1) * (2 * n + 5)) / 18;
        const z = s === 0 ? 0 : (Math.abs(s) - 1) / Math.sqrt(ar1VarianceFactor(n, r1) * variance);
        const p = twoSidedP(z);
        fc.pre(Math.abs(p - alpha) > 1e-7);
        expect(largestLag1(n, alpha)(s) >= r1).toBe(p < alpha);
      },
    ),
  );
});

test('largestLag1 is −1 where nothing is rejected and 0.95 where everything is', () => {
  expect(largestLag1(40, 0.1)(0)).toBe(-1);
  expect(largestLag1(40, 0.1)(-20)).toBe(-1);
  expect(largestLag1(4, 0.01)(6)).toBe(-1);
  expect(largestLag1(40, 0.5)(-780)).toBe(0.95);
  expect(() => largestLag1(40, 1)).toThrow('largestLag1: alpha must lie between 0 and 1, got 1');
});
