import fc from 'fast-check';
import { expect, test } from 'vitest';
import { pauleMandel } from '../../../lib/statistics/paule-mandel.ts';

test('pauleMandel solves by hand where all variances are equal: τ² is the variance of the estimates less theirs', () => {
  // Σ (b − b̄)²/(τ² + s²) = M − 1 gives τ² = var(b) − s²
  expect(pauleMandel([0, 4], [1, 1])).toMatchObject({ mean: 2 });
  expect(pauleMandel([0, 4], [1, 1]).variance).toBeCloseTo(7, 9);
  const { variance, mean, weights } = pauleMandel([1, 2, 3, 10], [2, 2, 2, 2]);
  expect(variance).toBeCloseTo(50 / 3 - 2, 9);
  expect(mean).toBeCloseTo(4, 12);
  for (const weight of weights) expect(weight).toBeCloseTo((50 / 3 - 2) / (50 / 3), 9);
});

test('pauleMandel finds no spread where the estimates differ by less than their errors', () => {
  const { variance, mean, weights } = pauleMandel([0, 1, 2], [4, 1, 4]);
  expect(variance).toBe(0);
  // weights 1/4, 1, 1/4
  expect(mean).toBeCloseTo(1, 12);
  expect(Array.from(weights)).toEqual([0, 0, 0]);
});

test('pauleMandel meets its own equation for any estimates', () => {
  const group = fc.tuple(
    fc.double({ min: -1e3, max: 1e3, noNaN: true }),
    fc.double({ min: 1e-3, max: 1e3, noNaN: true }),
  );
  fc.assert(
    fc.property(fc.array(group, { minLength: 2, maxLength: 30 }), (groups) => {
      const [b, s2] = [groups.map(([estimate]) => estimate), groups.map(([, variance]) => variance)];
      const { variance, mean, weights } = pauleMandel(b, s2);
      const sum = b.reduce((total, estimate, i) => total + (estimate - mean) ** 2 / (variance + s2[i]), 0);
      if (variance > 0) expect(sum).toBeCloseTo(b.length - 1, 4);
      else expect(sum).toBeLessThanOrEqual(b.length - 1 + 1e-9);
      expect(weights.every((weight) => weight >= 0 && weight < 1)).toBe(true);
    }),
  );
});

test('pauleMandel takes estimates that are certain for what they are', () => {
  const certain = pauleMandel([1, 3, 5], [0, 0, 0]);
  expect(certain.variance).toBeCloseTo(4, 9);
  expect(Array.from(certain.weights)).toEqual([1, 1, 1]);
  expect(pauleMandel([2, 2], [0, 0])).toMatchObject({ variance: 0, mean: 2 });
  expect(pauleMandel([2, 9], [0, 100])).toMatchObject({ variance: 0, mean: 2 });
});

test('pauleMandel answers for one estimate and for none, and refuses what is no estimate', () => {
  expect(pauleMandel([7], [2])).toMatchObject({ variance: 0, mean: 7 });
  expect(pauleMandel([], []).mean).toBeNaN();
  expect(() => pauleMandel([1], [])).toThrow('same length, got 1 and 0');
  expect(() => pauleMandel([Number.NaN], [1])).toThrow('estimates[0] must be a finite number, got NaN');
  expect(() => pauleMandel([1], [-1])).toThrow('variances[0] must be 0 or more, got -1');
  expect(() => pauleMandel([1], [Number.POSITIVE_INFINITY])).toThrow(RangeError);
});
