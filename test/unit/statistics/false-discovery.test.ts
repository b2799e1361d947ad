import { expect, test } from 'vitest';
import { benjaminiHochberg } from '../../../lib/statistics/false-discovery.ts';

test('benjaminiHochberg by hand: 0.01·3/1, then the smaller of 0.03·3/2 and 0.04', () => {
  expect([...benjaminiHochberg([0.01, 0.04, 0.03])].map((p) => Number(p.toFixed(12)))).toEqual([0.03, 0.04, 0.04]);
});

test('benjaminiHochberg passes NaN through and does not count it', () => {
  const adjusted = benjaminiHochberg([Number.NaN, 0.01, Number.NaN, 0.04, 0.03]);
  expect(adjusted[0]).toBeNaN();
  expect(adjusted[2]).toBeNaN();
  expect([adjusted[1], adjusted[3], adjusted[4]]).toEqual([...benjaminiHochberg([0.01, 0.04, 0.03])]);
});

test('benjaminiHochberg gives equal p-values equal answers', () => {
  const [first, second] = benjaminiHochberg([0.02, 0.02, 0.9]);
  expect(first).toBe(second);
  expect(first).toBeCloseTo(0.03, 14);
});

test('benjaminiHochberg of one test is its p; of none, nothing; all NaN stay NaN', () => {
  expect([...benjaminiHochberg([0.03])]).toEqual([0.03]);
  expect([...benjaminiHochberg([])]).toEqual([]);
  expect([...benjaminiHochberg([Number.NaN])]).toEqual([Number.NaN]);
});

test('benjaminiHochberg never leaves 0..1', () => {
  expect([...benjaminiHochberg([0, 1, 1, 1])]).toEqual([0, 1, 1, 1]);
});

test('benjaminiHochberg refuses what is no probability', () => {
  expect(() => benjaminiHochberg([0.5, 1.5])).toThrow('benjaminiHochberg: p[1] must lie in 0..1, got 1.5');
  expect(() => benjaminiHochberg([-0.1])).toThrow(RangeError);
});

test('benjaminiHochberg leaves its input as it was', () => {
  const p = Float64Array.of(0.3, 0.1, 0.2);
  benjaminiHochberg(p);
  expect([...p]).toEqual([0.3, 0.1, 0.2]);
});
