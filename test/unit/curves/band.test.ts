import { expect, test } from 'vitest';
import { regionBand } from '../../../lib/curves/band.ts';

test('regionBand takes the 10th, 50th and 90th percentile over stations, point by point', () => {
  const curves = Array.from({ length: 9 }, (_, i) => Float64Array.of(i + 1, 10 * (9 - i)));
  const band = regionBand(curves);
  expect([...band.p10, ...band.p50, ...band.p90]).toEqual([1, 10, 5, 50, 9, 90]);
});

test('regionBand skips missing points, and has no band from fewer than 9 stations', () => {
  const curves = Array.from({ length: 10 }, (_, i) =>
    Float64Array.of(i < 9 ? i + 1 : Number.NaN, i < 8 ? i : Number.NaN),
  );
  const band = regionBand(curves);
  expect([band.p10[0], band.p90[0]]).toEqual([1, 9]);
  expect([band.p10[1], band.p50[1], band.p90[1]]).toEqual([Number.NaN, 3.5, Number.NaN]);
});

test('regionBand of no stations is empty; unlike lengths are refused', () => {
  expect(regionBand([]).p50).toHaveLength(0);
  expect(() => regionBand([new Float64Array(2), new Float64Array(3)])).toThrow('got 2 and 3');
});
