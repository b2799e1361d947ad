import { expect, test } from 'vitest';
import { lowess } from '../../../lib/statistics/lowess.ts';
import { seeded } from '../../seeded.ts';

test('lowess runs along points that lie on a line, in whatever order they come', () => {
  const x = [7, 1, 4, 2, 9, 3, 30];
  const curve = lowess(
    x,
    x.map((each) => 3 - 0.5 * each),
  );
  curve.forEach((fitted, i) => {
    expect(fitted).toBeCloseTo(3 - 0.5 * x[i], 10);
  });
});

test('lowess by hand: span 1, no rounds, three points', () => {
  // at x = 0 the tricube weights are 1, (1 − 1/8)³, 0: the line through the first two points, whatever the third
  expect(lowess([0, 1, 2], [5, 7, 100], { span: 1, rounds: 0 })[0]).toBeCloseTo(5, 12);
  // at x = 1 both others lie at the full reach and weigh nothing
  expect(lowess([0, 1, 2], [5, 7, 100], { span: 1, rounds: 0 })[1]).toBe(7);
});

test('lowess is hardly drawn by one point far off, once its rounds are done', () => {
  const x = Array.from({ length: 30 }, (_, i) => i);
  const wiggle = x.map((each) => 2 * each + (each % 2 === 0 ? 0.5 : -0.5));
  const spoilt = wiggle.map((y, i) => (i === 14 ? y + 500 : y));
  const at14 = (rounds: number) => lowess(x, spoilt, { rounds })[14];
  expect(at14(0)).toBeGreaterThan(50);
  expect(at14(3)).toBeCloseTo(28, 0);
});

test('lowess at equal x is the mean of their y', () => {
  expect([...lowess([2, 2, 2, 2], [1, 2, 3, 6], { rounds: 0 })]).toEqual([3, 3, 3, 3]);
});

test('lowess of y that does not vary is that y; of fewer than three points, NaN', () => {
  for (const fitted of lowess([1, 2, 3, 4, 5], [4, 4, 4, 4, 4])) expect(fitted).toBeCloseTo(4, 12);
  expect([...lowess([1, 2], [1, 2])]).toEqual([Number.NaN, Number.NaN]);
  expect([...lowess([], [])]).toEqual([]);
});

test('lowess moves with the scale and place of x and y', () => {
  const random = seeded(7);
  const x = Array.from({ length: 40 }, () => random());
  const y = x.map((each) => Math.sin(5 * each) + 0.2 * random());
  const curve = lowess(x, y);
  const moved = lowess(
    x.map((each) => 1000 * each - 30),
    y.map((each) => 4 * each + 9),
  );
  moved.forEach((fitted, i) => {
    expect(fitted).toBeCloseTo(4 * curve[i] + 9, 8);
  });
});

test('lowess refuses what it cannot use, by name and value', () => {
  expect(() => lowess([1, 2], [1])).toThrow('lowess: x and y must have the same length, got 2 and 1');
  expect(() => lowess([1, Number.NaN, 3], [1, 2, 3])).toThrow('lowess: x[1] must be a finite number, got NaN');
  expect(() => lowess([1, 2, 3], [1, 2, Infinity])).toThrow('lowess: y[2] must be a finite number, got Infinity');
  for (const span of [0, -1, 1.01, Number.NaN]) expect(() => lowess([1, 2, 3], [1, 2, 3], { span })).toThrow('span');
  for (const rounds of [-1, 0.5]) expect(() => lowess([1, 2, 3], [1, 2, 3], { rounds })).toThrow('rounds');
});

test('lowess leaves its inputs as they were', () => {
  const [x, y] = [Float64Array.of(3, 1, 2, 5), Float64Array.of(1, 5, 2, 8)];
  lowess(x, y);
  expect([...x, ...y]).toEqual([3, 1, 2, 5, 1, 5, 2, 8]);
});
