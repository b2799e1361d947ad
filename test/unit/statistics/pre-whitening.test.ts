import { describe, expect, test } from 'vitest';
import { preWhitened, significantLag1 } from '../../../lib/statistics/pre-whitening.ts';

const from = (first: number, count: number) => Array.from({ length: count }, (_, i) => first + i);
const levels = [0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 1, 1];

describe('significantLag1', () => {
  test('by hand: six zeros, then six ones', () => {
    // deviations ∓½: 10 products of ¼ and one of −¼ over 11 pairs, over ¼
    expect(significantLag1({ years: from(1, 12), values: levels, slope: 0 })).toBeCloseTo(9 / 11, 14);
  });

  test('only pairs of consecutive years count', () => {
    const years = [...from(1, 6), ...from(17, 6)];
    // ten pairs, all alike: r = 1, cut to 0.95
    expect(significantLag1({ years, values: levels, slope: 0 })).toBe(0.95);
  });

  test('inside the limits there is none: by hand for 12 values, −0.562 and 0.380', () => {
    // (−1 ∓ 1.64485·√10)/11; the series below has deviations ½ in another order
    const weak = [0, 0, 0, 1, 1, 1, 0, 0, 1, 1, 0, 1];
    // products: + + − + + − + − + − − = 6 − 5 of ¼, over 11
    expect(significantLag1({ years: from(1, 12), values: weak, slope: 0 })).toBeNaN();
    const strong = [0, 0, 0, 0, 1, 1, 1, 1, 0, 0, 1, 1];
    // + + + − + + + − + − + = 8 − 3
    expect(significantLag1({ years: from(1, 12), values: strong, slope: 0 })).toBeCloseTo(5 / 11, 14);
    const byTurns = [0, 1, 0, 1, 0, 1, 0, 1, 1, 0, 1, 0];
    expect(significantLag1({ years: from(1, 12), values: byTurns, slope: 0 })).toBeCloseTo(-9 / 11, 14);
  });

  test('there is none of fewer than four pairs, or without spread about the trend', () => {
    expect(significantLag1({ years: [], values: [], slope: Number.NaN })).toBeNaN();
    expect(significantLag1({ years: [1], values: [3], slope: Number.NaN })).toBeNaN();
    expect(significantLag1({ years: from(1, 4), values: [1, 1, 9, 9], slope: 0 })).toBeNaN();
    expect(significantLag1({ years: from(1, 12).map((i) => 2 * i), values: levels, slope: 0 })).toBeNaN();
    expect(significantLag1({ years: from(1, 12), values: from(1, 12), slope: 1 })).toBeNaN();
    for (const equal of [0, 3.2, 0.1]) {
      expect(significantLag1({ years: from(1, 12), values: new Float64Array(12).fill(equal), slope: 0 })).toBeNaN();
    }
  });

  test('an infinite value is refused', () => {
    expect(() => significantLag1({ years: [1, 2], values: [1, -Infinity], slope: 0 })).toThrow(
      'significantLag1: values[1] must be a finite number, got -Infinity',
    );
  });
});

describe('preWhitened', () => {
  test('by hand: lag 1 is taken out of what the trend leaves, and the trend laid on again', () => {
    // d = 5 6 5 7; y = 6 − 2.5 − 1, 5 − 3 − 2, 7 − 2.5 − 3
    const { years, values } = preWhitened({ years: [1, 2, 3, 4], values: [5, 5, 3, 4], slope: -1 }, 0.5);
    expect(years).toEqual([2, 3, 4]);
    expect(values).toEqual([2.5, 0, 1.5]);
  });

  test('the first value after a gap is lost like the first of all', () => {
    const { years } = preWhitened({ years: [1, 2, 3, 6, 7, 9], values: [1, 2, 3, 4, 5, 6], slope: 0 }, 0.3);
    expect(years).toEqual([2, 3, 7]);
  });

  test('nothing is left of no value or of one', () => {
    expect(preWhitened({ years: [], values: [], slope: Number.NaN }, 0.5).values).toEqual([]);
    expect(preWhitened({ years: [1], values: [1], slope: Number.NaN }, 0.5).values).toEqual([]);
  });

  test.each([1, -1, Number.NaN, Infinity])('r1 = %d is refused', (r1) => {
    expect(() => preWhitened({ years: [1, 2], values: [1, 2], slope: 0 }, r1)).toThrow(
      `preWhitened: r1 must lie between −1 and 1, got ${r1}`,
    );
  });
});
