import { expect, test } from 'vitest';
import { indexMarks, nextInDirection } from '@/app/regions/[region]/_map/mark-index';

const xs = Float64Array.of(0, 10, 10, 100);
const ys = Float64Array.of(0, 0, 0, 50);

test('indexMarks().at answers the nearest mark within reach, the one on top of equals, else −1', () => {
  const index = indexMarks(xs, ys);
  expect(index.at(1, 1, 8)).toBe(0);
  expect(index.at(10, 1, 8)).toBe(2);
  expect(index.at(50, 50, 8)).toBe(-1);
  // reach is a distance, its very edge inside
  expect(index.at(108, 50, 8)).toBe(3);
  expect(index.at(108.1, 50, 8)).toBe(-1);
  // and a circle, not a box
  expect(index.at(106, 56, 8)).toBe(-1);
});

test('indexMarks of no marks finds none', () => {
  const index = indexMarks(new Float64Array(0), new Float64Array(0));
  expect(index.at(0, 0, 10)).toBe(-1);
  expect(index.inside(-1, -1, 1, 1)).toEqual([]);
});

test('nextInDirection goes to what lies ahead rather than aside', () => {
  const x = Float64Array.of(0, 10, 6, -5, 0);
  const y = Float64Array.of(0, 1, 6, 0, 20);
  expect(nextInDirection(x, y, 0, 'right')).toBe(1);
  expect(nextInDirection(x, y, 0, 'left')).toBe(3);
  // 2 lies as much aside as ahead and is nearer than 4, but straight ahead is cheaper only within twice the way
  expect(nextInDirection(x, y, 0, 'down')).toBe(2);
  expect(nextInDirection(x, y, 0, 'up')).toBe(-1);
});
