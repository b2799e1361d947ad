import { expect, test } from 'vitest';
import { rankCorrelation } from '../../../lib/statistics/rank-correlation.ts';

test('rankCorrelation by hand: 1 − 6·Σd²/(n(n² − 1)) without ties', () => {
  // d = 1, 1, 1, 1
  expect(rankCorrelation([1, 2, 3, 4], [2, 1, 4, 3])).toBeCloseTo(1 - (6 * 4) / (4 * 15), 14);
});

test('rankCorrelation of anything that rises with x is 1, of what falls −1', () => {
  const x = [0.1, 5, 2, 900];
  expect(rankCorrelation(x, x.map(Math.log))).toBeCloseTo(1, 14);
  expect(
    rankCorrelation(
      x,
      x.map((each) => -each),
    ),
  ).toBeCloseTo(-1, 14);
});

test('rankCorrelation has no answer under three pairs, nor where one does not vary', () => {
  expect(rankCorrelation([1, 2], [1, 2])).toBeNaN();
  expect(rankCorrelation([1, Number.NaN, 2, 3], [Number.NaN, 1, 2, 3])).toBeNaN();
  expect(rankCorrelation([1, 2, 3, 4], [7, 7, 7, 7])).toBeNaN();
  expect(rankCorrelation([], [])).toBeNaN();
});

test('rankCorrelation refuses lists of unlike length', () => {
  expect(() => rankCorrelation([1, 2, 3], [1, 2])).toThrow(
    'rankCorrelation: x and y must have the same length, got 3 and 2',
  );
});
