import { expect, test } from 'vitest';
import { sortAscending } from '../../../lib/series/sort-ascending.ts';

test.each([0, 1, 10, 511, 512, 513, 5000])('sortAscending of %i values agrees with Array.sort, without NaN', (n) => {
  const values = Float64Array.from({ length: n }, (_, i) =>
    i % 7 === 3 ? Number.NaN : Math.sin(i * i) * 10 ** (i % 9),
  );
  const copy = values.slice();
  const expected = [...values].filter((value) => !Number.isNaN(value)).sort((a, b) => a - b);
  expect([...sortAscending(values)]).toEqual(expected);
  expect(values).toEqual(copy);
});

test('sortAscending keeps ties, zeros and infinities', () => {
  const values = Float64Array.from({ length: 600 }, (_, i) => [0, 3, Number.POSITIVE_INFINITY, 3, -1, 0][i % 6]);
  expect([...sortAscending(values)]).toEqual([...values].sort((a, b) => a - b));
});
