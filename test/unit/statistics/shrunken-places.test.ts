import { expect, test } from 'vitest';
import { shrunkenPlaces } from '../../../lib/statistics/shrunken-places.ts';
import { seeded } from '../../seeded.ts';

const REPLICATES = 200;

/** Estimates that vary evenly within ± `reach` of themselves, each on its own, with something common to all on top. */
function replicatedAbout(estimates: number[], reach: number, common = 0): Float64Array {
  const random = seeded(21);
  const shared = Float64Array.from({ length: REPLICATES }, () => common * random());
  return Float64Array.from({ length: estimates.length * REPLICATES }, (_, at) => {
    return estimates[Math.floor(at / REPLICATES)] + reach * (2 * random() - 1) + shared[at % REPLICATES];
  });
}

const placesOf = (estimates: number[], reach: number, common = 0, most = 5) =>
  shrunkenPlaces({ estimates, replicated: replicatedAbout(estimates, reach, common), replicates: REPLICATES }, most);

test('shrunkenPlaces is sure of groups that are far apart, whatever all of them share', () => {
  const { low, high, among, spread } = placesOf([30, 10, 20], 1, 1000);
  expect(Array.from(low)).toEqual([3, 1, 2]);
  expect(Array.from(high)).toEqual([3, 1, 2]);
  // k = 1, 2, 3 of each group
  expect(Array.from(among)).toEqual([0, 0, 1, 1, 1, 1, 0, 1, 1]);
  // the variance of the estimates, 100, but for that of their errors, 1/3
  expect(spread).toBeCloseTo(Math.sqrt(100 - 1 / 3), 1);
});

test('shrunkenPlaces lets groups that overlap change places, and chances add up to k', () => {
  const { low, high, among, most } = placesOf([0, 1, 2, 3, 4, 20], 2);
  expect([low[5], high[5]]).toEqual([6, 6]);
  expect(low[2]).toBeLessThan(3);
  expect(high[2]).toBeGreaterThan(3);
  for (let k = 1; k <= most; k++) {
    const sum = Array.from({ length: 6 }, (_, i) => among[i * most + k - 1]).reduce((a, b) => a + b, 0);
    expect(sum).toBeCloseTo(k, 9);
  }
});

test('shrunkenPlaces gives every place to all where the groups differ by no more than chance', () => {
  const { low, high, among, spread, most } = placesOf([0, 0.1, 0.2, 0.1], 3);
  expect(spread).toBe(0);
  expect(Array.from(low)).toEqual([1, 1, 1, 1]);
  expect(Array.from(high)).toEqual([4, 4, 4, 4]);
  expect(most).toBe(4);
  expect(Array.from(among.subarray(0, 4))).toEqual([0.25, 0.5, 0.75, 1]);
});

test('shrunkenPlaces lets equal groups share the better place', () => {
  const estimates = [5, 5, 9];
  const one = replicatedAbout([5], 0.5);
  const replicated = Float64Array.of(...one, ...one, ...replicatedAbout([9], 0.5));
  const { low, high } = shrunkenPlaces({ estimates, replicated, replicates: REPLICATES }, 2);
  expect([Array.from(low), Array.from(high)]).toEqual([
    [1, 1, 3],
    [1, 1, 3],
  ]);
});

test('shrunkenPlaces answers for two groups, for one and for none', () => {
  expect(placesOf([0, 100], 1)).toMatchObject({ low: Int32Array.of(1, 2), high: Int32Array.of(1, 2) });
  expect(placesOf([0, 1], 50)).toMatchObject({ low: Int32Array.of(1, 1), high: Int32Array.of(2, 2), spread: 0 });
  expect(placesOf([4], 1)).toMatchObject({ low: Int32Array.of(1), high: Int32Array.of(1), among: Float64Array.of(1) });
  expect(placesOf([], 1).low).toHaveLength(0);
});

test('shrunkenPlaces keeps groups apart that do not vary at all', () => {
  expect(placesOf([2, 1, 3], 0)).toMatchObject({ low: Int32Array.of(2, 1, 3), high: Int32Array.of(2, 1, 3) });
  expect(placesOf([1, 1, 1], 0)).toMatchObject({ low: Int32Array.of(1, 1, 1), high: Int32Array.of(3, 3, 3) });
});

test('shrunkenPlaces keeps the others apart beside one that lies thousands of times as far out', () => {
  const near = Array.from({ length: 20 }, (_, i) => 4 * i);
  for (const [far, reach] of [
    [1e5, 1],
    [-1e7, 1],
  ]) {
    const { low, high } = placesOf([...near, far], reach);
    const others = near.map((_, i) => (far < 0 ? i + 2 : i + 1));
    expect(Array.from(low.subarray(0, 20))).toEqual(others);
    expect(Array.from(high.subarray(0, 20))).toEqual(others);
  }
});

test('shrunkenPlaces refuses replicates that do not fit', () => {
  const replicated = new Float64Array(4);
  expect(() => shrunkenPlaces({ estimates: [1, 2], replicated, replicates: 1 }, 1)).toThrow('at least 2, got 1');
  expect(() => shrunkenPlaces({ estimates: [1], replicated, replicates: 2 }, 1)).toThrow('1 × 2 figures, got 4');
  replicated[3] = Number.NaN;
  expect(() => shrunkenPlaces({ estimates: [1, 2], replicated, replicates: 2 }, 1)).toThrow('replicated[3]');
});
