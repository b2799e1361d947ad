import { expect, test } from 'vitest';
import { selectInPlace } from '../../../lib/statistics/select.ts';

test('selectInPlace puts every position of its stretch in its place, with ties, sorted and reversed', () => {
  const shapes = [
    [3],
    [2, 1],
    [5, 1, 4, 2, 3],
    [1, 2, 3, 4, 5, 6],
    [6, 5, 4, 3, 2, 1],
    [2, 2, 2, 2],
    [0, 1, 0, 1, 0, 0, 1],
    Array.from({ length: 101 }, (_, i) => (i * 7919) % 37),
  ];
  for (const shape of shapes) {
    const sorted = Float64Array.from(shape).sort();
    for (let k = 0; k < shape.length; k++) {
      const x = Float64Array.from(shape);
      selectInPlace(x, k);
      expect(x[k]).toBe(sorted[k]);
      expect(x.subarray(0, k).every((value) => value <= x[k])).toBe(true);
      expect(x.subarray(k).every((value) => value >= x[k])).toBe(true);
      expect(x.slice().sort()).toEqual(sorted);
    }
  }
});

test('selectInPlace leaves what lies outside its stretch', () => {
  const x = Float64Array.of(9, 3, 1, 2, 0);
  selectInPlace(x, 1, 1, 3);
  expect(x[0]).toBe(9);
  expect(x[1]).toBe(1);
  expect(x[4]).toBe(0);
});

test('selectInPlace refuses a position outside its stretch', () => {
  expect(() => selectInPlace(Float64Array.of(1, 2), 2)).toThrow('selectInPlace: k must be a position 0..1, got 2');
  expect(() => selectInPlace(new Float64Array(0), 0)).toThrow(RangeError);
});
