import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { countS } from '../../../lib/statistics/count-s.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';

test('countS is the S of mannKendall, with ties and missing values, whatever the working space held', () => {
  const value = fc.oneof(
    { weight: 4, arbitrary: fc.integer({ min: 0, max: 9 }) },
    { weight: 4, arbitrary: fc.double({ min: -1, max: 1, noNaN: true }) },
    fc.constant(Number.NaN),
  );
  fc.assert(
    fc.property(fc.array(value, { maxLength: 50 }), (values) => {
      const space = new Float64Array(values.length).fill(7);
      expect(countS(Float64Array.from(values), space)).toBe(mannKendall(values).s);
    }),
  );
});

test('countS of Gilbert’s example is 4 (Gilbert 1987, p. 211: 10, 15, 14, 20)', () => {
  expect(countS(Float64Array.of(10, 15, 14, 20), new Float64Array(4))).toBe(4);
});
