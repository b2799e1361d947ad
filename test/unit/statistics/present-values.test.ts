import { expect, test } from 'vitest';
import { presentValues } from '../../../lib/statistics/present-values.ts';

test('presentValues leaves NaN out and keeps the order, zeros and negatives', () => {
  expect([...presentValues([Number.NaN, 3, 0, Number.NaN, -1], 'caller')]).toEqual([3, 0, -1]);
  expect([...presentValues([Number.NaN], 'caller')]).toEqual([]);
});

test('presentValues gives a copy', () => {
  const x = Float64Array.of(2, 1);
  presentValues(x, 'caller').sort();
  expect([...x]).toEqual([2, 1]);
});

test('presentValues names its caller, the place and the value it refuses', () => {
  expect(() => presentValues([1, Number.NEGATIVE_INFINITY], 'caller')).toThrow(
    new RangeError('caller: x[1] must be a finite number or NaN, got -Infinity'),
  );
});
