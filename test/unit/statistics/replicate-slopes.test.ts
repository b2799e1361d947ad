import { expect, test } from 'vitest';
import { criticalS } from '../../../lib/statistics/critical-s.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { detectableSlope, replicateSlopes } from '../../../lib/statistics/replicate-slopes.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { tauOnSlope } from '../../../lib/statistics/tau-on-slope.ts';
import { seeded } from '../../seeded.ts';

const LENGTH = 30;
const PRESENT = Array.from({ length: LENGTH }, (_, i) => i).filter((i) => i % 11 !== 4);
const TIMES = Array.from({ length: LENGTH }, (_, i) => i);

function replicate(random: () => number): Float64Array {
  const x = new Float64Array(LENGTH).fill(Number.NaN);
  for (const i of PRESENT) x[i] = 10 * random();
  return x;
}

test('replicateSlopes finds the slope at which the test begins to reject, after a rise and a fall in turn', () => {
  const random = seeded(31);
  const alpha = 0.1;
  const varianceFactor = 1.4;
  const n = PRESENT.length;
  const critical = criticalS({ n, variance: (n * (n - 1) * (2 * n + 5)) / 18, alpha, varianceFactor });
  const slopes = replicateSlopes(LENGTH, PRESENT, critical);
  for (let round = 0; round < 20; round++) {
    const x = replicate(random);
    expect(slopes.read(x)).toBeCloseTo(senSlope(TIMES, x).slope, 12);
    const slope = slopes.rejected();
    const sign = round % 2 === 0 ? 1 : -1;
    const laid = (by: number) =>
      mannKendall(
        x.map((value, t) => value + sign * by * t),
        { varianceFactor },
      );
    const [just, notYet] = [laid(slope + 1e-9), laid(slope - 1e-9)];
    expect(just.p).toBeLessThan(alpha);
    expect(Math.sign(just.s)).toBe(sign);
    expect(notYet.p < alpha && Math.sign(notYet.s) === sign).toBe(false);
  }
});

test('replicateSlopes finds no slope where the test rejects nothing', () => {
  const slopes = replicateSlopes(3, [0, 1, 2], Number.POSITIVE_INFINITY);
  expect(slopes.read(Float64Array.of(1, 2, 6))).toBe(2.5);
  expect(slopes.rejected()).toBeNaN();
  expect(() => replicateSlopes(3, [0, 1, 2], 0)).toThrow('critical must be positive, got 0');
});

test('replicateSlopes takes the middle itself where the test rejects as soon as most pairs agree', () => {
  // 3 pairs, S of 1 is rejected: two of three must rise
  const slopes = replicateSlopes(3, [0, 1, 2], 1);
  slopes.read(Float64Array.of(0, -1, -4));
  // slopes -1, -2, -3: with 2 and a little laid on, two of them rise
  expect(slopes.rejected()).toBe(2);
});

test('detectableSlope is what is found in four replicates of five', () => {
  expect(detectableSlope(Float64Array.of(5, 1, 4, 2, 3))).toBe(4);
  expect(detectableSlope(Float64Array.of(-2, -1))).toBe(0);
  expect(detectableSlope(Float64Array.of(1, Number.NaN))).toBeNaN();
  expect(detectableSlope(new Float64Array(0))).toBeNaN();
});

test('tauOnSlope is tau-b of the series with the slope laid on', () => {
  const random = seeded(32);
  for (const slope of [-0.25, 0, 0.0625, 3]) {
    const x = replicate(random).map((value) => Math.round(value));
    expect(tauOnSlope(x, slope)).toBeCloseTo(mannKendall(x.map((value, t) => value + slope * t)).tauB, 12);
  }
  expect(tauOnSlope(Float64Array.of(1, Number.NaN, 1), 0.5)).toBe(1);
  expect(tauOnSlope(Float64Array.of(1, 1), 0)).toBeNaN();
  expect(tauOnSlope(Float64Array.of(1), 1)).toBeNaN();
});
