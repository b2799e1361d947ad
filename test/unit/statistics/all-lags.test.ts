import { expect, test } from 'vitest';
import { allLagsVarianceFactor } from '../../../lib/statistics/all-lags.ts';

const from = (first: number, count: number) => Array.from({ length: count }, (_, i) => first + i);

test('allLagsVarianceFactor by hand: lags within ±1.96/√n count for nothing', () => {
  // 1 … 8 about 4.5: products of lag 1 sum to 26.25, squares to 42, r = .625; limit 1.96/√8 = .693
  expect(allLagsVarianceFactor({ years: from(1, 8), values: from(1, 8), slope: 0 })).toEqual({ factor: 1, lags: [] });
  // twelve values in two levels, 0 × 6 and 1 × 6: deviations ∓3, squares 108; lag 1: 10·9 − 9 = 81, r = .75; lag 2:
  // 8·9 − 2·9 = 54, r = .5; lag 6: −54, r = −.5; limit 1.96/√12 = .566, so lag 1 alone
  const levels = [0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 1, 1];
  const { factor, lags } = allLagsVarianceFactor({ years: from(1, 12), values: levels, slope: 0 });
  expect(lags).toEqual([1]);
  expect(factor).toBeCloseTo(1 + (2 / (12 * 11 * 10)) * (11 * 10 * 9) * 0.75, 14);
});

test('allLagsVarianceFactor: with a gap, pairs of years a lag apart count, × n/(pairs + lag)', () => {
  // the two levels with ten years between them: 10 pairs of lag 1, all alike: 90/108·12/11
  const years = [...from(1, 6), ...from(17, 6)];
  const levels = [0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 1, 1];
  const { factor, lags } = allLagsVarianceFactor({ years, values: levels, slope: 0 });
  // lag 2: 8 pairs, 72/108·12/10 = .8; lag 3: 6 pairs, 54/108·12/9 = .667; lag 4: 4 pairs, 36/108·12/8 = .5; lag 11: one
  // pair, −9/108·12/12
  expect(lags).toEqual([1, 2, 3]);
  const sum = 11 * 10 * 9 * (90 / 108) * (12 / 11) + 10 * 9 * 8 * 0.8 + 9 * 8 * 7 * (2 / 3);
  expect(factor).toBeCloseTo(1 + (2 * sum) / (12 * 11 * 10), 14);
});

test('allLagsVarianceFactor is 1, with no lag, where the factor would not be above 0', () => {
  // deviations from 6.5 multiply to −103.25 at lag 1 and 73 at lag 2, over 143: −.722 and .510, limit .566, so lag 1
  // alone, and 1 + 2·(11·10·9)·(−.722)/(12·11·10) = −.083
  const byTurns = [5, 8, 3, 12, 2, 9, 6, 10, 4, 7, 1, 11];
  expect(allLagsVarianceFactor({ years: from(1, 12), values: byTurns, slope: 0 })).toEqual({ factor: 1, lags: [] });
});

test('allLagsVarianceFactor of too few values, or none that differ about the trend, is 1', () => {
  const none = { factor: 1, lags: [] };
  expect(allLagsVarianceFactor({ years: [], values: [], slope: Number.NaN })).toEqual(none);
  expect(allLagsVarianceFactor({ years: [1], values: [2], slope: Number.NaN })).toEqual(none);
  expect(allLagsVarianceFactor({ years: [1, 2, 3], values: [3, 1, 2], slope: 0 })).toEqual(none);
  expect(allLagsVarianceFactor({ years: from(1, 30), values: new Float64Array(30), slope: 0 })).toEqual(none);
  expect(allLagsVarianceFactor({ years: from(1, 30), values: from(1, 30), slope: 1 })).toEqual(none);
});

test('allLagsVarianceFactor refuses an infinite value', () => {
  expect(() => allLagsVarianceFactor({ years: [1, 2], values: [1, Infinity], slope: 0 })).toThrow(
    'allLagsVarianceFactor: values[1] must be a finite number, got Infinity',
  );
});
