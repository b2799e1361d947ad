import { describe, expect, test } from 'vitest';
import { ar1VarianceFactor, cutLag1, lag1OfRanks, shrinkLag1 } from '../../../lib/statistics/serial-correlation.ts';

describe('lag1OfRanks', () => {
  const years = [2001, 2002, 2003, 2004, 2005, 2006];

  test('by hand: ranks 1 … 6 have products 8.75, squares 17.5, r = 0.5, and (6·0.5 + 1)/2 = 2', () => {
    expect(lag1OfRanks({ years, values: [1, 2, 3, 4, 5, 6], slope: 0 })).toBeCloseTo(2, 14);
  });

  test('by hand: up and down by turns, ranks 1 4 2 5 3 6', () => {
    // deviations −2.5 .5 −1.5 1.5 −.5 2.5: products −1.25 −.75 −2.25 −.75 −1.25 = −6.25; r = −6.25/17.5
    const r = -6.25 / 17.5;
    expect(lag1OfRanks({ years, values: [1, 4, 2, 5, 3, 6], slope: 0 })).toBeCloseTo((6 * r + 1) / 2, 14);
  });

  test('only pairs of consecutive years count, scaled by n/(pairs + 1)', () => {
    // pairs (1,2), (2,3), (4,5), (5,6): 3.75 + 0.75 + 0.75 + 3.75 = 9; r = 9·6/5/17.5
    const broken = [2001, 2002, 2003, 2011, 2012, 2013];
    const r = (9 * 6) / 5 / 17.5;
    expect(lag1OfRanks({ years: broken, values: [1, 2, 3, 4, 5, 6], slope: 0 })).toBeCloseTo((6 * r + 1) / 2, 14);
  });

  test('the slope is taken out over real years before ranking', () => {
    const gap = [2001, 2002, 2003, 2005, 2006, 2009];
    const noise = [0.3, -0.1, 0.2, -0.3, 0.1, -0.2];
    const trend = gap.map((year, i) => noise[i] - 0.7 * (year - 2001));
    expect(lag1OfRanks({ years: gap, values: trend, slope: -0.7 })).toBe(
      lag1OfRanks({ years: gap, values: noise, slope: 0 }),
    );
  });

  test('residuals equal but for the last bit stay tied', () => {
    const values = [0.1 + 0.2, 0.3, 0.1, 0.3, 0.2, 0.1];
    expect(lag1OfRanks({ years, values, slope: 0 })).toBe(
      lag1OfRanks({ years, values: [0.3, 0.3, 0.1, 0.3, 0.2, 0.1], slope: 0 }),
    );
  });

  test('there is no answer below five values, at five there is', () => {
    expect(lag1OfRanks({ years: [1, 2, 3, 4], values: [1, 3, 2, 4], slope: 0 })).toBeNaN();
    expect(lag1OfRanks({ years: [1, 2, 3, 4, 5], values: [1, 3, 2, 4, 5], slope: 0 })).not.toBeNaN();
  });

  test('there is no answer without consecutive years or without spread about the trend', () => {
    expect(lag1OfRanks({ years: [1, 3, 5, 7, 9, 11], values: [1, 3, 2, 4, 5, 6], slope: 0 })).toBeNaN();
    expect(lag1OfRanks({ years, values: [1, 2, 3, 4, 5, 6], slope: 1 })).toBeNaN();
    expect(lag1OfRanks({ years: [], values: [], slope: 0 })).toBeNaN();
  });

  test('years that do not rise and unlike lengths are refused', () => {
    expect(() => lag1OfRanks({ years: [1, 3, 2], values: [1, 2, 3], slope: 0 })).toThrow(
      'lag1OfRanks: years must rise, got 2 after 3',
    );
    expect(() => lag1OfRanks({ years: [1], values: [1, 2], slope: 0 })).toThrow(
      'must have the same length, got 1 and 2',
    );
  });
});

describe('shrinkLag1', () => {
  test('by hand: r 0 and 0.8 of 25 and 25 years', () => {
    // mean 0.4, var 0.32, v = 0.32 − 0.04 = 0.28, weight 0.28/0.32 = 0.875
    const [low, high] = shrinkLag1(Float64Array.of(0, 0.8), [25, 25]);
    expect(low).toBeCloseTo(0.4 - 0.875 * 0.4, 14);
    expect(high).toBeCloseTo(0.4 + 0.875 * 0.4, 14);
  });

  test('a spread no larger than sampling error is taken away whole', () => {
    expect([...shrinkLag1(Float64Array.of(0.1, 0.2, 0.3), [40, 40, 40])]).toEqual([0.2, 0.2, 0.2].map(expectClose));
  });

  test('a series without an estimate comes out as the mean and moves no other', () => {
    const without = shrinkLag1(Float64Array.of(0, 0.8), [25, 25]);
    const withNaN = shrinkLag1(Float64Array.of(0, Number.NaN, 0.8), [25, 300, 25]);
    expect([withNaN[0], withNaN[2]]).toEqual([...without]);
    expect(withNaN[1]).toBeCloseTo(0.4, 14);
  });

  test('one series is its own mean; none at all gives NaN', () => {
    expect([...shrinkLag1(Float64Array.of(0.6), [30])]).toEqual([0.6]);
    expect([...shrinkLag1(Float64Array.of(Number.NaN), [30])]).toEqual([Number.NaN]);
    expect([...shrinkLag1(new Float64Array(0), [])]).toEqual([]);
  });

  test('unlike lengths and lengths that are not positive are refused', () => {
    expect(() => shrinkLag1(Float64Array.of(0.1), [1, 2])).toThrow('must have the same length, got 1 and 2');
    expect(() => shrinkLag1(Float64Array.of(0.1), [0])).toThrow('shrinkLag1: n[0] must be positive, got 0');
  });
});

const expectClose = (value: number) => expect.closeTo(value, 14);

test.each([
  [-0.2, 0],
  [0, 0],
  [0.5, 0.5],
  [0.95, 0.95],
  [0.951, 0.95],
  [2, 0.95],
  [Number.NaN, Number.NaN],
])('cutLag1(%d) is %d', (r, cut) => {
  expect(cutLag1(r)).toBe(cut);
});

describe('ar1VarianceFactor', () => {
  test('by hand: n = 4 and 5 at r1 = 0.5', () => {
    expect(ar1VarianceFactor(4, 0.5)).toBeCloseTo(1 + (2 / 24) * (6 * 0.5), 14);
    expect(ar1VarianceFactor(5, 0.5)).toBeCloseTo(1 + (2 / 60) * (24 * 0.5 + 6 * 0.25), 14);
  });

  test('no correlation and fewer than three values leave the variance as it is', () => {
    expect(ar1VarianceFactor(40, 0)).toBe(1);
    expect(ar1VarianceFactor(2, 0.9)).toBe(1);
    expect(ar1VarianceFactor(0, 0.9)).toBe(1);
  });

  test('a long series comes near (1 + r1)/(1 − r1), the factor for a mean', () => {
    expect(ar1VarianceFactor(100000, 0.5)).toBeCloseTo(3, 3);
  });

  test('a correlation of 1 or more, NaN, and lengths that are not whole are refused', () => {
    expect(() => ar1VarianceFactor(40, 1)).toThrow('ar1VarianceFactor: r1 must lie between −1 and 1, got 1');
    expect(() => ar1VarianceFactor(40, Number.NaN)).toThrow(RangeError);
    expect(() => ar1VarianceFactor(4.5, 0.1)).toThrow('ar1VarianceFactor: n must be a whole number, got 4.5');
  });
});
