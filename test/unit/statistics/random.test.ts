import { expect, test } from 'vitest';
import { randomStream, shuffle } from '../../../lib/statistics/random.ts';

const draws = (seed: string, ...labels: (string | number)[]) => {
  const random = randomStream(seed, ...labels);
  return Array.from({ length: 8 }, () => random.below(1000));
};

test('randomStream(seed, labels) draws the same again, and other numbers for another seed or label', () => {
  expect(draws('a', 'span', 1)).toEqual(draws('a', 'span', 1));
  const others = [draws('b', 'span', 1), draws('a', 'span', 2), draws('a', 'spa', 'n1'), draws('a')];
  for (const other of others) expect(other).not.toEqual(draws('a', 'span', 1));
});

test('below(n) gives each number as often, within four standard errors', () => {
  const random = randomStream('even');
  const counts = new Array<number>(10).fill(0);
  for (let i = 0; i < 100_000; i++) counts[random.below(10)]++;
  // binomial: √(100000 · 0.1 · 0.9) = 94.9
  for (const count of counts) expect(Math.abs(count - 10_000)).toBeLessThan(4 * 94.9);
});

test('uniform() lies in [0, 1) with mean 1/2 and variance 1/12', () => {
  const random = randomStream('unit');
  const values = Array.from({ length: 100_000 }, () => random.uniform());
  expect(Math.min(...values.slice(0, 1000))).toBeGreaterThanOrEqual(0);
  expect(values.every((value) => value >= 0 && value < 1)).toBe(true);
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
  expect(Math.abs(mean - 1 / 2)).toBeLessThan(4 * Math.sqrt(1 / 12 / 100_000));
  expect(Math.abs(variance - 1 / 12)).toBeLessThan(0.001);
});

test('streams of neighbouring labels are not alike: their correlation is that of chance', () => {
  const n = 2000;
  const of = (label: number) => {
    const random = randomStream('neighbours', label);
    return Array.from({ length: n }, () => random.uniform() - 0.5);
  };
  for (let label = 0; label < 20; label++) {
    const [a, b] = [of(label), of(label + 1)];
    const correlation = a.reduce((sum, value, i) => sum + value * b[i], 0) / (n / 12);
    expect(Math.abs(correlation)).toBeLessThan(4.5 / Math.sqrt(n));
  }
});

test('shuffle(list) gives each of the six orders of three as often', () => {
  const random = randomStream('orders');
  const seen = new Map<string, number>();
  for (let i = 0; i < 60_000; i++) {
    const list = [1, 2, 3];
    shuffle(list, random);
    seen.set(list.join(''), (seen.get(list.join('')) ?? 0) + 1);
  }
  expect(seen.size).toBe(6);
  // √(60000 · 1/6 · 5/6) = 91.3
  for (const count of seen.values()) expect(Math.abs(count - 10_000)).toBeLessThan(4 * 91.3);
});

test('below(0) and below(1.5) are refused', () => {
  expect(() => randomStream('x').below(0)).toThrow(/n must be at least 1, got 0/);
  expect(() => randomStream('x').below(1.5)).toThrow(RangeError);
});
