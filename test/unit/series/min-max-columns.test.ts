import fc from 'fast-check';
import { expect, test } from 'vitest';
import { minMaxColumns } from '../../../lib/series/min-max-columns.ts';

const columns = (values: number[], count: number) => {
  const { low, high } = minMaxColumns(Float64Array.from(values), count);
  return [Array.from(low), Array.from(high)];
};

test('minMaxColumns keeps the lowest and the highest value of each stretch', () => {
  expect(columns([1, 5, Number.NaN, 2], 2)).toEqual([
    [1, 2],
    [5, 2],
  ]);
  expect(columns([3, 1], 10)).toEqual([
    [3, 1],
    [3, 1],
  ]);
  expect(columns([Number.NaN, Number.NaN], 1)).toEqual([[Number.NaN], [Number.NaN]]);
  expect(columns([], 4)).toEqual([[], []]);
});

test('minMaxColumns loses no extreme, whatever the lengths', () => {
  const values = fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 400 });
  fc.assert(
    fc.property(values, fc.integer({ min: 1, max: 90 }), (series, count) => {
      const [low, high] = columns(series, count);
      expect(low).toHaveLength(Math.min(count, series.length));
      expect(Math.min(...low)).toBe(Math.min(...series));
      expect(Math.max(...high)).toBe(Math.max(...series));
      expect(low.every((value, i) => value <= high[i])).toBe(true);
    }),
  );
});

test('minMaxColumns refuses a count that cannot be', () => {
  expect(() => minMaxColumns(new Float64Array(3), 0)).toThrow(
    new RangeError('minMaxColumns: count must be a whole number above 0, got 0'),
  );
});
