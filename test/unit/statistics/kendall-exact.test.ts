import { expect, test } from 'vitest';
import { kendallExactP } from '../../../lib/statistics/kendall-exact.ts';

test('kendallExactP(6, 4) is 2 of 24 orders', () => {
  expect(kendallExactP(6, 4)).toBeCloseTo(2 / 24, 15);
});

test('kendallExactP counts what all 720 orders of 6 values show', () => {
  const counts = new Map<number, number>();
  for (const order of orders([1, 2, 3, 4, 5, 6])) {
    let s = 0;
    order.forEach((earlier, i) => {
      for (const later of order.slice(i + 1)) s += Math.sign(later - earlier);
    });
    counts.set(s, (counts.get(s) ?? 0) + 1);
  }
  for (const s of counts.keys()) {
    let upper = 0;
    for (const [other, count] of counts) if (other >= Math.abs(s)) upper += count;
    expect(kendallExactP(s, 6)).toBeCloseTo(Math.min(1, (2 * upper) / 720), 14);
  }
});

test('kendallExactP is 1 in the middle and never more', () => {
  expect(kendallExactP(0, 5)).toBe(1);
  expect(kendallExactP(1, 3)).toBe(1);
  expect(kendallExactP(1, 2)).toBe(1);
});

test('kendallExactP refuses lengths and statistics it has no table for', () => {
  expect(() => kendallExactP(0, 11)).toThrow('kendallExactP: n must be a whole number 2..10, got 11');
  expect(() => kendallExactP(0, 1)).toThrow(RangeError);
  expect(() => kendallExactP(7, 4)).toThrow('kendallExactP: s must be a whole number within ±6 for n = 4, got 7');
});

function orders(items: number[]): number[][] {
  if (items.length < 2) return [items];
  return items.flatMap((first) => orders(items.filter((item) => item !== first)).map((rest) => [first, ...rest]));
}
