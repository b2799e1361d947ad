import { expect, test } from 'vitest';
import { kendallTauB } from '../../../lib/statistics/kendall-tau.ts';

test('kendallTauB: by hand, 5 of 6 pairs agree', () => {
  expect(kendallTauB([1, 2, 3, 4], [1, 3, 2, 4])).toBeCloseTo(4 / 6, 12);
});

test('kendallTauB: ties in both lists', () => {
  // the example of scipy.stats.kendalltau's documentation: tau −0.47140452079103173
  expect(kendallTauB([12, 2, 1, 12, 2], [1, 4, 7, 1, 0])).toBeCloseTo(-0.47140452079103173, 12);
  // scipy 1.17.1, stats.kendalltau([1,2,2,4,5,5,7,8], [2,1,3,3,5,8,7,6]).statistic
  expect(kendallTauB([1, 2, 2, 4, 5, 5, 7, 8], [2, 1, 3, 3, 5, 8, 7, 6])).toBeCloseTo(0.6416236526819377, 12);
});

test.each([
  ['no values', [], []],
  ['one value', [3], [4]],
  ['one list all equal', [1, 1, 1], [1, 2, 3]],
])('kendallTauB: %s have no tau', (_, x, y) => {
  expect(kendallTauB(x, y)).toBeNaN();
});

test('kendallTauB: refuses lists of unlike length and missing values', () => {
  expect(() => kendallTauB([1], [1, 2])).toThrow('kendallTauB: x and y must have the same length, got 1 and 2');
  expect(() => kendallTauB([1, Number.NaN], [1, 2])).toThrow('kendallTauB: value 1 must be a number');
});
