import { expect, test } from 'vitest';
import { lineLook, MAX_LINES } from '@/app/components/duration-figure/line-looks';
import { nearestCurve } from '@/app/components/duration-figure/nearest-curve';

const xs = [0, 10, 20];
const curves = [
  { code: 'high', y: [0, 10, 20] },
  { code: 'low', y: [100, 100, null] },
];

test('is the curve nearest upright, read on its straight line between two points', () => {
  expect(nearestCurve(curves, xs, { x: 5, y: 7 }, 10)).toBe('high');
  expect(nearestCurve(curves, xs, { x: 5, y: 96 }, 10)).toBe('low');
});

test('is null when no curve passes within reach, and one at exactly the reach counts', () => {
  expect(nearestCurve(curves, xs, { x: 5, y: 15.01 }, 10)).toBeNull();
  expect(nearestCurve(curves, xs, { x: 5, y: 15 }, 10)).toBe('high');
});

test('a curve is not there where it gives no flow', () => {
  expect(nearestCurve(curves, xs, { x: 15, y: 100 }, 10)).toBeNull();
});

test('is null left and right of all points', () => {
  expect(nearestCurve(curves, xs, { x: -1, y: 0 }, 10)).toBeNull();
  expect(nearestCurve(curves, xs, { x: 21, y: 20 }, 10)).toBeNull();
  expect(nearestCurve(curves, xs, { x: 0, y: 0 }, 10)).toBe('high');
});

test('lineLook gives every labelled line a pair of colour and dash of its own', () => {
  const looks = Array.from({ length: MAX_LINES }, (_, index) => JSON.stringify(lineLook(index)));
  expect(new Set(looks).size).toBe(MAX_LINES);
});
