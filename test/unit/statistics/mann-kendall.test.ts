import { expect, test } from 'vitest';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';

test('mannKendall of a rise of four: S = 6, Var S = 26/3, z from S − 1', () => {
  const { n, s, variance, z, tauB } = mannKendall([1, 2, 3, 4]);
  expect({ n, s, tauB }).toEqual({ n: 4, s: 6, tauB: 1 });
  expect(variance).toBeCloseTo(26 / 3, 14);
  expect(z).toBeCloseTo(5 / Math.sqrt(26 / 3), 14);
});

test('mannKendall takes z from S + 1 when falling', () => {
  expect(mannKendall([4, 3, 2, 1]).z).toBeCloseTo(-5 / Math.sqrt(26 / 3), 14);
});

test('mannKendall of S = 0 has z 0 and p 1', () => {
  expect(mannKendall([2, 4, 1, 3])).toMatchObject({ s: 0, z: 0, p: 1, tauB: 0 });
});

test('mannKendall of equal values has p 1 and no tau', () => {
  const { s, variance, z, p, tauB } = mannKendall([0, 0, 0, 0, 0]);
  expect({ s, variance, z, p }).toEqual({ s: 0, variance: 0, z: 0, p: 1 });
  expect(tauB).toBeNaN();
});

test.each([[[]], [[5]], [[Number.NaN, 5, Number.NaN]]])('mannKendall(%j) has no answer: NaN, never 0', (x) => {
  const { n, variance, z, p, tauB } = mannKendall(x);
  expect(n).toBeLessThan(2);
  expect([variance, z, p, tauB]).toEqual([Number.NaN, Number.NaN, Number.NaN, Number.NaN]);
});

test('mannKendall leaves missing values out at the start, in the middle and at the end', () => {
  const gaps = [Number.NaN, 3, 1, Number.NaN, Number.NaN, 4, 1, 5, Number.NaN];
  expect(mannKendall(gaps)).toEqual(mannKendall([3, 1, 4, 1, 5]));
});

test('mannKendall multiplies the variance by varianceFactor for z and p, and reports it before', () => {
  const x = [1, 3, 2, 5, 4, 7, 6, 9, 8, 11, 10, 13];
  const plain = mannKendall(x);
  const widened = mannKendall(x, { varianceFactor: 4 });
  expect(widened.variance).toBe(plain.variance);
  expect(widened.z).toBeCloseTo(plain.z / 2, 14);
  expect(widened.p).toBeGreaterThan(plain.p);
});

test('mannKendall exact takes the exact p up to ten values', () => {
  const ten = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
  expect(mannKendall(ten, { exact: true }).p).toBeCloseTo(2 / 3628800, 14);
  const eleven = [...ten, 11];
  expect(mannKendall(eleven, { exact: true })).toEqual(mannKendall(eleven));
});

test('mannKendall exact keeps the normal p where values tie or the variance is widened', () => {
  const tied = [1, 2, 2, 3, 4];
  expect(mannKendall(tied, { exact: true })).toEqual(mannKendall(tied));
  const free = [1, 2, 3, 4, 5];
  expect(mannKendall(free, { exact: true, varianceFactor: 1.5 }).p).toBe(mannKendall(free, { varianceFactor: 1.5 }).p);
});

test('mannKendall refuses infinite values and factors that are not positive', () => {
  expect(() => mannKendall([1, Number.POSITIVE_INFINITY])).toThrow('mannKendall: x[1] must be a finite number or NaN');
  expect(() => mannKendall([1, 2], { varianceFactor: 0 })).toThrow('varianceFactor must be a positive number, got 0');
  expect(() => mannKendall([1, 2], { varianceFactor: Number.NaN })).toThrow(RangeError);
});

test('mannKendall leaves its input as it was', () => {
  const x = Float64Array.of(3, 1, 2);
  mannKendall(x);
  expect([...x]).toEqual([3, 1, 2]);
});
