import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { roundSteps, toneOf, Z_STEPS } from '@/app/components/start-end/tone-steps';

describe('roundSteps', () => {
  test.each([
    [37, [2, 5, 10, 20]],
    [50, [5, 10, 20, 50]],
    [49.9, [2, 5, 10, 20]],
    [1, [0.1, 0.2, 0.5, 1]],
    [0.034, [0.002, 0.005, 0.01, 0.02]],
    [0, [1, 2, 5, 10]],
    [Number.NaN, [1, 2, 5, 10]],
    [Number.POSITIVE_INFINITY, [1, 2, 5, 10]],
  ])('of %d are %j', (most, steps) => {
    expect(roundSteps(most)).toEqual(steps);
  });
  test('rise, and the largest figure always reaches the last', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e6, noNaN: true }), (most) => {
        const steps = roundSteps(most);
        expect([...steps].sort((a, b) => a - b)).toEqual([...steps]);
        expect(toneOf(most, steps)).toBe(4);
        expect(steps[3]).toBeGreaterThan(most / 2.6);
      }),
    );
  });
});

test('toneOf counts the steps reached, with the sign, from each step on', () => {
  expect([-3, -2.576, -1.97, -1.7, -1, -0.99, 0, 0.99, 1.645, 9].map((z) => toneOf(z, Z_STEPS))).toEqual([
    -4, -4, -3, -2, -1, 0, 0, 0, 2, 4,
  ]);
});
