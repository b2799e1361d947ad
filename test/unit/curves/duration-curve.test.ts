import { expect, test } from 'vitest';
import { durationCurve, exceedanceOfRank, flowAtExceedance } from '../../../lib/curves/duration-curve.ts';

const NA = Number.NaN;

test('durationCurve ranks flows from the largest down and skips missing days', () => {
  const flows = Float64Array.from([NA, 2, 5, NA, 2, 9, NA]);
  const copy = flows.slice();
  const curve = durationCurve(flows);
  expect([...curve.sorted]).toEqual([9, 5, 2, 2]);
  expect(curve.n).toBe(4);
  expect(flows).toEqual(copy);
});

test('durationCurve of no flows is empty, and gives no flow at any exceedance', () => {
  const curve = durationCurve(Float64Array.of(NA, NA));
  expect(curve.n).toBe(0);
  expect(flowAtExceedance(curve, 0.5)).toBeNaN();
});

test('exceedanceOfRank is r/(n + 1)', () => {
  expect(exceedanceOfRank(1, 9)).toBe(0.1);
  expect(exceedanceOfRank(9, 9)).toBe(0.9);
  expect(() => exceedanceOfRank(0, 9)).toThrow('exceedanceOfRank: rank must be a whole number in 1..9, got 0');
  expect(() => exceedanceOfRank(10, 9)).toThrow(RangeError);
});

test.each([
  [0.0999, NA],
  [0.1, 9],
  [0.15, 8.5],
  [0.5, 5],
  [0.9, 1],
  [0.9001, NA],
  [0, NA],
  [1, NA],
])('flowAtExceedance(9…1, %d) → %d', (p, expected) => {
  const curve = durationCurve(Float64Array.from([3, 1, 2, 9, 8, 7, 4, 5, 6]));
  if (Number.isNaN(expected)) expect(flowAtExceedance(curve, p)).toBeNaN();
  else expect(flowAtExceedance(curve, p)).toBeCloseTo(expected, 12);
});

test('flowAtExceedance gives the ends of the curve at their own plotting positions, whatever n', () => {
  for (let n = 1; n <= 400; n += 1) {
    const curve = durationCurve(Float64Array.from({ length: n }, (_, i) => i + 1));
    expect(flowAtExceedance(curve, 1 / (n + 1))).toBeCloseTo(n, 9);
    expect(flowAtExceedance(curve, n / (n + 1))).toBeCloseTo(1, 9);
  }
});

test('flowAtExceedance holds ties and zeros exactly', () => {
  const curve = durationCurve(Float64Array.from([0, 0, 0, 0, 4]));
  expect(flowAtExceedance(curve, 0.5)).toBe(0);
  expect(flowAtExceedance(curve, 0.25)).toBe(2);
  const level = durationCurve(new Float64Array(9).fill(0.1));
  expect(flowAtExceedance(level, 0.37)).toBe(0.1);
});

test.each([-0.1, 1.1, NA])('flowAtExceedance refuses p = %d', (p) => {
  expect(() => flowAtExceedance(durationCurve(Float64Array.of(1)), p)).toThrow('flowAtExceedance: p must lie in 0–1');
});
