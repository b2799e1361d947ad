import { rank } from 'd3-array';
import { expect, test } from 'vitest';
import { averageRanks } from '../../../lib/statistics/ranks.ts';

test('averageRanks([30, 10, 20]) counts from 1 at the smallest', () => {
  expect([...averageRanks([30, 10, 20])]).toEqual([3, 1, 2]);
});

test('averageRanks gives equal values the mean of their ranks, at the start, the middle and the end', () => {
  expect([...averageRanks([1, 1, 2, 3])]).toEqual([1.5, 1.5, 3, 4]);
  expect([...averageRanks([1, 2, 2, 2, 3])]).toEqual([1, 3, 3, 3, 5]);
  expect([...averageRanks([1, 2, 3, 3])]).toEqual([1, 2, 3.5, 3.5]);
  expect([...averageRanks([7, 7, 7])]).toEqual([2, 2, 2]);
});

test('averageRanks takes 0 and −0 for equal', () => {
  expect([...averageRanks([0, -0, 1])]).toEqual([1.5, 1.5, 3]);
});

test('averageRanks leaves a missing value NaN and ranks the others among themselves', () => {
  expect([...averageRanks([Number.NaN, 30, 10, 30])]).toEqual([Number.NaN, 2.5, 1, 2.5]);
  expect([...averageRanks([Number.NaN, Number.NaN])]).toEqual([Number.NaN, Number.NaN]);
  expect([...averageRanks([])]).toEqual([]);
});

test('averageRanks agrees with d3-array: the mean of the ranks from below and from above', () => {
  const x = Array.from({ length: 200 }, (_, i) => (i * 7919) % 53);
  const below = rank(x);
  const above = rank(x, (a: number, b: number) => b - a);
  expect([...averageRanks(x)]).toEqual([...below].map((low, i) => (low + (x.length - 1 - above[i])) / 2 + 1));
});

test('averageRanks leaves its input as it was', () => {
  const x = Float64Array.of(3, 1, 2);
  averageRanks(x);
  expect([...x]).toEqual([3, 1, 2]);
});
