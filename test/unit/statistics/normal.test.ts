import { cumulativeStdNormalProbability } from 'simple-statistics';
import { expect, test } from 'vitest';
import { normalCdf, normalQuantile, twoSidedP } from '../../../lib/statistics/normal.ts';

// Abramowitz & Stegun 1964, Handbook of Mathematical Functions, Table 26.1: P(x) to 15 decimals.
test.each([
  [0, 0.5],
  [1, 0.841344746068543],
  [2, 0.977249868051821],
  [3, 0.998650101968369],
])('normalCdf(%d) is the tabled probability', (z, probability) => {
  expect(normalCdf(z)).toBeCloseTo(probability, 14);
  expect(normalCdf(-z)).toBeCloseTo(1 - probability, 14);
});

// The usual percentage points, to the digits printed in tables of them.
test.each([
  [0.9, 1.2815515655446],
  [0.95, 1.6448536269515],
  [0.975, 1.9599639845401],
  [0.995, 2.5758293035489],
])('normalQuantile(%d) is the tabled percentage point', (probability, z) => {
  expect(normalQuantile(probability)).toBeCloseTo(z, 12);
  expect(normalQuantile(1 - probability)).toBeCloseTo(-z, 12);
});

test('normalCdf agrees with simple-statistics to the four digits that it tabulates', () => {
  for (let z = -3; z <= 3; z += 0.01) {
    expect(Math.abs(normalCdf(z) - cumulativeStdNormalProbability(z))).toBeLessThan(1e-4);
  }
});

test('normalQuantile undoes normalCdf to ten decimals between −4 and 4', () => {
  for (let z = -4; z <= 4; z += 0.25) expect(normalQuantile(normalCdf(z))).toBeCloseTo(z, 10);
});

test('normalQuantile is infinite at 0 and 1 and NaN outside', () => {
  expect(normalQuantile(0)).toBe(Number.NEGATIVE_INFINITY);
  expect(normalQuantile(1)).toBe(Number.POSITIVE_INFINITY);
  expect(normalQuantile(1.01)).toBeNaN();
});

test('twoSidedP is the same for either sign, 1 at 0, and keeps its digits far out', () => {
  expect(twoSidedP(0)).toBe(1);
  expect(twoSidedP(1.959963984540054)).toBeCloseTo(0.05, 14);
  expect(twoSidedP(-2)).toBe(twoSidedP(2));
  // erfc(10/√2), from its continued fraction
  expect(twoSidedP(10) / 1.5239706048e-23).toBeCloseTo(1, 9);
  expect(twoSidedP(Number.NaN)).toBeNaN();
});
