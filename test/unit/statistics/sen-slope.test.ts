import { median } from 'd3-array';
import { TheilSenRegression } from 'ml-regression-theil-sen';
import { expect, test } from 'vitest';
import { pairwiseSlopes, senSlope } from '../../../lib/statistics/sen-slope.ts';

test('senSlope divides by the difference in time: 1/1, 5/3 and 4/2 have the median 5/3', () => {
  const { slope, intercept, pairs } = senSlope([1, 2, 4], [1, 2, 6]);
  expect(slope).toBeCloseTo(5 / 3, 14);
  expect(pairs).toBe(3);
  // x − b·t is −2/3, −4/3, −2/3
  expect(intercept).toBeCloseTo(-2 / 3, 14);
});

test('senSlope of a straight line is that line, and so is its interval', () => {
  const t = [1990, 1991, 1993, 1997, 1998, 2000];
  const line = senSlope(
    t,
    t.map((year) => 4 - 0.5 * (year - 1990)),
  );
  expect(line).toEqual({ slope: -0.5, intercept: 999, low: -0.5, high: -0.5, pairs: 15 });
});

test('senSlope of all zeros is 0 with the interval 0 to 0', () => {
  expect(senSlope([1, 2, 3, 4], [0, 0, 0, 0])).toEqual({ slope: 0, intercept: 0, low: 0, high: 0, pairs: 6 });
});

test('senSlope gives no limit where its rank falls outside the slopes', () => {
  // N' = 3, C = 1.96·√(11/3) = 3.75: ranks −0.38 and 4.38
  const { slope, low, high } = senSlope([1, 2, 3], [1, 3, 2]);
  expect(slope).toBe(0.5);
  expect(low).toBeNaN();
  expect(high).toBeNaN();
});

test('senSlope widens its interval with varianceFactor and with confidence', () => {
  const t = Array.from({ length: 30 }, (_, i) => i);
  const x = t.map((i) => (i * 7919) % 31);
  const usual = senSlope(t, x);
  for (const wider of [senSlope(t, x, { varianceFactor: 2 }), senSlope(t, x, { confidence: 0.99 })]) {
    expect(wider.low).toBeLessThan(usual.low);
    expect(wider.high).toBeGreaterThan(usual.high);
    expect(wider.slope).toBe(usual.slope);
  }
  expect(senSlope(t, x, { varianceFactor: 1, confidence: 0.95 })).toEqual(usual);
});

test.each([
  [[], []],
  [[1], [2]],
  [
    [1, 2],
    [Number.NaN, 3],
  ],
])('senSlope(%j, %j) has no answer', (t, x) => {
  const nothing = Number.NaN;
  expect(senSlope(t, x)).toEqual({ slope: nothing, intercept: nothing, low: nothing, high: nothing, pairs: 0 });
});

test('senSlope leaves missing values out and keeps the time between', () => {
  const gaps = senSlope([1, 2, 3, 4, 5, 6], [Number.NaN, 3, Number.NaN, 1, 2, Number.NaN]);
  expect(gaps).toEqual(senSlope([2, 4, 5], [3, 1, 2]));
});

test('senSlope refuses times that do not rise, unlike lengths and bad options, by name and value', () => {
  expect(() => senSlope([1, 1], [2, 3])).toThrow('senSlope: t must rise, got t[1] = 1 after 1');
  expect(() => senSlope([2, 1], [2, 3])).toThrow(RangeError);
  expect(() => senSlope([1, Number.NaN], [2, 3])).toThrow(RangeError);
  expect(() => senSlope([1, 2], [2])).toThrow('senSlope: t and x must have the same length, got 2 and 1');
  expect(() => senSlope([1, 2], [2, Number.NEGATIVE_INFINITY])).toThrow('x[1] must be a finite number or NaN');
  expect(() => senSlope([1, 2], [2, 3], { confidence: 95 })).toThrow('confidence must lie between 0 and 1, got 95');
  expect(() => senSlope([1, 2], [2, 3], { varianceFactor: -1 })).toThrow('varianceFactor must be a positive number');
});

const uneven = (length: number) => {
  const t = Array.from({ length }, (_, i) => 1950 + i + Math.floor(i / 3));
  return { t, x: t.map((year) => ((year * 7919) % 23) / 10) };
};

// That library takes the lower of the middle two, so only odd numbers of slopes and of values can be compared.
test.each([3, 7, 31, 59])('senSlope agrees with ml-regression-theil-sen on %d values with ties and gaps', (length) => {
  const { t, x } = uneven(length);
  const { slope, intercept, pairs } = senSlope(t, x);
  expect(pairs % 2).toBe(1);
  const other = new TheilSenRegression(t, x);
  expect(slope).toBeCloseTo(other.slope, 12);
  expect(intercept).toBeCloseTo(other.intercept, 9);
});

test.each([4, 30, 60])(
  'senSlope of %d values agrees with the medians that d3-array takes of slopes and rests',
  (length) => {
    const { t, x } = uneven(length);
    const slopes = t.flatMap((time, i) => t.slice(i + 1).map((later, k) => (x[i + 1 + k] - x[i]) / (later - time)));
    const { slope, intercept } = senSlope(t, x);
    expect(slope).toBeCloseTo(median(slopes) as number, 12);
    expect(intercept).toBeCloseTo(median(t.map((time, i) => x[i] - slope * time)) as number, 9);
  },
);

test('pairwiseSlopes gives the slope first and the interval as often as asked, whatever the order of asking', () => {
  const { t, x } = uneven(30);
  const slopes = pairwiseSlopes(t, x);
  expect(slopes.slope).toBe(senSlope(t, x).slope);
  for (const options of [{ varianceFactor: 2 }, {}, { confidence: 0.5 }, { varianceFactor: 2 }]) {
    expect(slopes.withInterval(options)).toEqual(senSlope(t, x, options));
  }
  expect(pairwiseSlopes([1], [2]).slope).toBeNaN();
  expect(() => pairwiseSlopes([1], [2]).withInterval({ confidence: 2 })).toThrow(RangeError);
});

test('senSlope leaves its inputs as they were', () => {
  const t = Float64Array.of(1, 2, 3);
  const x = Float64Array.of(3, 1, 2);
  senSlope(t, x);
  expect([...t, ...x]).toEqual([1, 2, 3, 3, 1, 2]);
});
