import { expect, test } from 'vitest';
import { durationCurve } from '../../../lib/curves/duration-curve.ts';
import { middleSlope } from '../../../lib/curves/middle-slope.ts';

test('middleSlope of an exponential curve is its rate', () => {
  // 99 flows exp(−4 p) at p = r/100: ln Q33 − ln Q66 = 4 × 0.33
  const curve = durationCurve(Float64Array.from({ length: 99 }, (_, i) => Math.exp(-4 * ((i + 1) / 100))));
  expect(middleSlope(curve)).toBeCloseTo(4, 10);
});

test('middleSlope is 0 for level flow and NaN where a third of the days or more are dry', () => {
  expect(middleSlope(durationCurve(new Float64Array(50).fill(3)))).toBe(0);
  const dry = Float64Array.from({ length: 100 }, (_, i) => (i < 40 ? 0 : 1));
  expect(middleSlope(durationCurve(dry))).toBeNaN();
  expect(middleSlope(durationCurve(Float64Array.of(5)))).toBeNaN();
});
