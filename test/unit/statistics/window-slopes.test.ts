import fc from 'fast-check';
import { expect, test } from 'vitest';
import { senSlope } from '../../../lib/statistics/sen-slope.ts';
import { windowSlopes } from '../../../lib/statistics/window-slopes.ts';

test('windowSlopes: the worked example of three values with a gap', () => {
  const slopes = windowSlopes([1, 2, 4], [1, 2, 6], 2);
  expect(slopes[3 * 1 + 0]).toBe(1);
  expect(slopes[3 * 2 + 1]).toBe(2);
  expect(slopes[3 * 2 + 0]).toBe(5 / 3);
});

test('windowSlopes: NaN below the fewest values, a figure at it', () => {
  const slopes = windowSlopes([1, 2, 3, 4], [4, 3, 2, 1], 3);
  expect(slopes[4 * 1 + 0]).toBeNaN();
  expect(slopes[4 * 2 + 0]).toBe(-1);
  expect(slopes[4 * 3 + 1]).toBe(-1);
});

test('windowSlopes: every window has the slope that senSlope gives it by itself, with ties, gaps and zeros', () => {
  const series = fc.array(fc.tuple(fc.integer({ min: 1, max: 3 }), fc.integer({ min: -4, max: 4 })), {
    minLength: 2,
    maxLength: 40,
  });
  fc.assert(
    fc.property(series, (steps) => {
      let year = 1900;
      const t = steps.map(([gap]) => (year += gap));
      const x = steps.map(([, value]) => value / 4);
      const n = x.length;
      const slopes = windowSlopes(t, x, 2);
      for (let i = 0; i < n; i++) {
        for (let j = i + 1; j < n; j++) {
          const alone = senSlope(t.slice(i, j + 1), x.slice(i, j + 1)).slope;
          expect(slopes[j * n + i]).toBeCloseTo(alone, 12);
        }
      }
    }),
    { numRuns: 60 },
  );
});

test.each([
  ['no values', [], []],
  ['one value', [1], [5]],
])('windowSlopes: %s have no window', (_, t, x) => {
  expect(windowSlopes(t, x, 2).every(Number.isNaN)).toBe(true);
});

test('windowSlopes: refuses what it cannot read, by name', () => {
  expect(() => windowSlopes([1, 2], [1], 2)).toThrow('windowSlopes: t and x must have the same length, got 2 and 1');
  expect(() => windowSlopes([1, 1], [1, 2], 2)).toThrow('windowSlopes: t must rise, got t[1] = 1 after 1');
  expect(() => windowSlopes([1, 2], [1, Number.POSITIVE_INFINITY], 2)).toThrow('windowSlopes: x[1]');
  expect(() => windowSlopes([1, 2], [Number.NaN, 1], 2)).toThrow('windowSlopes: x[0]');
  expect(() => windowSlopes([1, 2], [1, 2], 1)).toThrow('windowSlopes: fewest must be a whole number of at least 2');
});
