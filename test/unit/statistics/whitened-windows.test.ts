import fc from 'fast-check';
import { expect, test } from 'vitest';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { preWhitened } from '../../../lib/statistics/pre-whitening.ts';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { whitenedWindowZ } from '../../../lib/statistics/whitened-windows.ts';

test('whitenedWindowZ: every window has the Z that preWhitened and mannKendall give it by themselves', () => {
  const series = fc.array(fc.tuple(fc.constantFrom(1, 1, 1, 2), fc.integer({ min: 0, max: 12 })), {
    minLength: 5,
    maxLength: 30,
  });
  fc.assert(
    fc.property(series, fc.double({ min: -0.9, max: 0.9, noNaN: true }), (steps, r1) => {
      let year = 1900;
      const years = steps.map(([gap]) => (year += gap));
      const values = steps.map(([, value]) => value / 8);
      const n = values.length;
      const z = whitenedWindowZ(years, values, { r1, fewest: 5 });
      for (let i = 0; i < n; i++) {
        for (let j = i; j < n; j++) {
          const part = { years: years.slice(i, j + 1), values: values.slice(i, j + 1) };
          const { slope } = senSlope(part.years, part.values);
          const expected = j - i < 4 ? Number.NaN : mannKendall(preWhitened({ ...part, slope }, r1).values).z;
          expect(z[j * n + i]).toBe(expected);
        }
      }
    }),
    { numRuns: 60 },
  );
});

test('whitenedWindowZ: refuses a correlation of 1 and none, by name', () => {
  expect(() => whitenedWindowZ([1, 2], [1, 2], { r1: 1, fewest: 2 })).toThrow('whitenedWindowZ: r1 must lie between');
  expect(() => whitenedWindowZ([1, 2], [1, 2], { r1: Number.NaN, fewest: 2 })).toThrow('whitenedWindowZ: r1');
  expect(() => whitenedWindowZ([1, 2], [1, Number.NaN], { r1: 0, fewest: 2 })).toThrow('windowSlopes: x[1]');
});
