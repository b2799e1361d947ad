import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import { describe, expect, test } from 'vitest';
import { roughenedPosteriors } from '../../../lib/statistics/roughened-prior.ts';

const SHARES = [0.05, 0.25, 0.5, 0.75, 0.95];

function quantilesOf(input: Parameters<typeof roughenedPosteriors>[0], i: number): number[] {
  const out = new Float64Array(SHARES.length);
  roughenedPosteriors(input).quantiles(i, SHARES, out);
  return [...out];
}

describe('roughenedPosteriors', () => {
  test('estimates that say nothing leave the normal prior as it was: its quantiles are those of the normal distribution', () => {
    const input = { estimates: [3, -8, 11], variances: [1e12, 1e12, 1e12], mean: 2, variance: 9 };
    const got = quantilesOf(input, 1);
    // the grid has a step of 0.03
    for (const [k, share] of SHARES.entries()) expect(got[k]).toBeCloseTo(normalQuantile(share, 2, 3), 1);
  });

  test('a group without error is where its estimate is', () => {
    expect(quantilesOf({ estimates: [0, 10], variances: [0, 1], mean: 5, variance: 20 }, 0)).toEqual([0, 0, 0, 0, 0]);
  });

  test('level groups are held together, and steep ones are not drawn to them', () => {
    const estimates = [-20, -21, -19, ...Array.from({ length: 30 }, (_, i) => (i % 7) - 3)];
    const variances = estimates.map(() => 4);
    // mean and variance of the estimates, less the error
    const input = { estimates, variances, mean: -1.9, variance: 32 };
    const normal = (estimate: number) => -1.9 + (32 / 36) * (estimate + 1.9);
    const level = quantilesOf(input, estimates.indexOf(3))[2];
    expect(level).toBeLessThan(normal(3));
    const steep = quantilesOf(input, 1)[2];
    expect(Math.abs(steep + 20)).toBeLessThan(Math.abs(normal(-21) + 20));
  });

  test('an estimate further out than the normal prior reaches is believed, and leaves the others where they are', () => {
    // 100 standard deviations out the prior is exp(−5000): no number
    const input = { estimates: [0, 1, 0.5, 100], variances: [0.04, 0.04, 0.04, 0.04], mean: 0.5, variance: 1 };
    expect(quantilesOf(input, 3)[2]).toBeCloseTo(100, 0);
    const [low, , middle, , high] = quantilesOf(input, 0);
    expect(middle).toBeGreaterThan(-0.5);
    expect(middle).toBeLessThan(1);
    expect(high - low).toBeGreaterThan(0.05);
    expect(high - low).toBeLessThan(1.2);
  });

  test('an error narrower than a step of the grid is kept as it is', () => {
    // from 0 − 4·30 to 100 a step is 0.3
    const input = { estimates: [0, 0.1, 100], variances: [1e-4, 1e-4, 1e-4], mean: 30, variance: 900 };
    const got = quantilesOf(input, 1);
    for (const [k, share] of SHARES.entries()) expect(got[k]).toBeCloseTo(normalQuantile(share, 0.1, 0.01), 9);
  });

  test('quantiles rise with their shares and stay within the grid', () => {
    const input = { estimates: [0, 1, 2, 50], variances: [1, 2, 3, 0.0001], mean: 5, variance: 100 };
    for (let i = 0; i < 4; i++) {
      const got = quantilesOf(input, i);
      for (let k = 1; k < got.length; k++) expect(got[k]).toBeGreaterThanOrEqual(got[k - 1]);
      expect(got[0]).toBeGreaterThan(-36);
      expect(got[4]).toBeLessThan(51);
    }
  });

  test('leaves its input as it was, and refuses unlike lengths and a prior without spread', () => {
    const input = { estimates: Float64Array.of(1, 2), variances: Float64Array.of(1, 1), mean: 1.5, variance: 1 };
    quantilesOf(input, 0);
    expect([...input.estimates, ...input.variances]).toEqual([1, 2, 1, 1]);
    expect(() => roughenedPosteriors({ ...input, variances: [1] })).toThrow(/same length, got 2 and 1/);
    expect(() => roughenedPosteriors({ ...input, variance: 0 })).toThrow(/variance must be above 0, got 0/);
  });
});
