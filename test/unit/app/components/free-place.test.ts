import { expect, test } from 'vitest';
import { freePlace } from '@/app/components/level-lines/free-place';

const label = { y: 100, width: 50, height: 14 };
const at = (...points: [number, number][]) =>
  freePlace(
    label,
    points.map(([x, y]) => ({ x, y })),
    [10, 200],
  );

test('freePlace stays at the left while no point is near', () => {
  expect(at()).toBe(10);
  expect(at([30, 80], [30, 120], [90, 100])).toBe(10);
});

test('freePlace goes behind the points that it would cover, as little to the right as it can', () => {
  expect(at([20, 100], [40, 95])).toBe(46);
  // between 46 and the point at 90 there is no room for 50 pixels
  expect(at([20, 100], [40, 95], [90, 104])).toBe(96);
});

test('freePlace gives up where points leave no room', () => {
  expect(at(...Array.from({ length: 20 }, (_, i): [number, number] => [10 * i + 10, 100]))).toBe(10);
});
