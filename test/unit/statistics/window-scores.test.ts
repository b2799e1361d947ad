import fc from 'fast-check';
import { expect, test } from 'vitest';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { windowScores, windowVariance } from '../../../lib/statistics/window-scores.ts';

test('windowScores: S of all windows of Gilbert’s example', () => {
  // Gilbert 1987, p. 211: [10, 15, 14, 20] has S = 4; the others by hand
  const { n, s } = windowScores([10, 15, 14, 20]);
  expect([s[3 * n], s[1 * n], s[2 * n], s[2 * n + 1], s[3 * n + 1]]).toEqual([4, 1, 1, -1, 1]);
});

test('windowScores: every window has the S and the tie-corrected variance that mannKendall gives it by itself', () => {
  fc.assert(
    fc.property(fc.array(fc.integer({ min: 0, max: 6 }), { minLength: 2, maxLength: 40 }), (x) => {
      const { n, s, ties } = windowScores(x);
      for (let i = 0; i < n; i++) {
        for (let j = i + 1; j < n; j++) {
          const alone = mannKendall(x.slice(i, j + 1));
          expect(s[j * n + i]).toBe(alone.s);
          expect(windowVariance(j - i + 1, ties[j * n + i])).toBeCloseTo(alone.variance, 9);
        }
      }
    }),
    { numRuns: 60 },
  );
});

test('windowScores: all equal values have S 0 and no variance', () => {
  const { n, s, ties } = windowScores([2, 2, 2]);
  expect([s[2 * n], windowVariance(n, ties[2 * n])]).toEqual([0, 0]);
});

test('windowScores: refuses a value that is not a finite number', () => {
  expect(() => windowScores([1, Number.NaN])).toThrow('windowScores: x[1] must be a finite number, got NaN');
  expect(() => windowScores([Number.NEGATIVE_INFINITY])).toThrow('windowScores: x[0] must be a finite number');
});
