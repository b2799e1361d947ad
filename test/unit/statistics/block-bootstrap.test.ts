import { expect, test } from 'vitest';
import { BLOCK_REPLICATES, blockBootstrapFactor, blockLength } from '../../../lib/statistics/block-bootstrap.ts';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { type RandomStream, randomStream } from '../../../lib/statistics/random.ts';

/** Draws every row of starts in turn, as an odometer does, so that the bootstrap becomes the sum over all of them. */
function everyRow(blocks: number): RandomStream {
  let drawn = 0;
  return {
    below(n) {
      const row = Math.floor(drawn / blocks);
      return Math.floor(row / n ** (drawn++ % blocks)) % n;
    },
    uniform() {
      throw new Error('block-bootstrap.test: no uniform number is asked for');
    },
  };
}

/** S of all replicates of a series, each strung together and tested as a whole. */
function allScores(values: number[], length: number): number[] {
  const starts = values.length - length + 1;
  const blocks = Math.ceil(values.length / length);
  return Array.from({ length: starts ** blocks }, (_, row) => {
    const strung = Array.from({ length: blocks }, (_, block) => Math.floor(row / starts ** block) % starts).flatMap(
      (start) => values.slice(start, start + length),
    );
    return mannKendall(strung.slice(0, values.length)).s;
  });
}

test.each([
  ['blocks that fill the series', [3, 1, 4, 5, 9, 2]],
  ['a last block cut short', [3, 1, 4, 5, 9, 2, 6]],
  ['ties', [1, 1, 2, 0, 2, 2]],
])('blockBootstrapFactor is the variance of S over all rows of blocks, over Var S: %s', (_, values) => {
  const length = 2;
  const scores = allScores(values, length);
  const mean = scores.reduce((sum, s) => sum + s, 0) / scores.length;
  const variance = scores.reduce((sum, s) => sum + (s - mean) ** 2, 0) / (scores.length - 1);
  const stream = everyRow(Math.ceil(values.length / length));
  const factor = blockBootstrapFactor(values, stream, scores.length);
  expect(factor).toBeCloseTo(variance / mannKendall(values).variance, 10);
});

test('blockBootstrapFactor is the same for the same stream, and near that of any other', () => {
  const random = randomStream('noise');
  let carried = 0;
  const values = Array.from({ length: 60 }, () => {
    carried = 0.5 * carried + random.uniform() - 0.5;
    return carried;
  });
  const factor = (label: string) => blockBootstrapFactor(values, randomStream('seed', label));
  expect(factor('a')).toBe(factor('a'));
  expect(factor('a')).not.toBe(factor('b'));
  // the standard error of a variance over 2,000 replicates is √(2/2000) = 3 %
  expect(Math.abs(factor('a') / factor('b') - 1)).toBeLessThan(0.15);
  expect(factor('a')).toBeGreaterThan(1.2);
  expect(BLOCK_REPLICATES).toBe(2000);
});

test('blockLength is the cube root of the number of values, rounded up', () => {
  expect([1, 8, 9, 27, 28, 40, 60, 64, 65].map(blockLength)).toEqual([1, 2, 3, 3, 4, 4, 4, 4, 5]);
});

test('blockBootstrapFactor of too few values, or equal ones, is 1; missing values are left out', () => {
  const factor = (values: ArrayLike<number>) => blockBootstrapFactor(values, randomStream('seed'));
  for (const few of [[], [Number.NaN], [1], [1, 2], [1, 3, 2, 4], new Float64Array(30), new Float64Array(30).fill(7)]) {
    expect(factor(few)).toBe(1);
  }
  expect(factor([1, Number.NaN, 3, 2, 5, Number.NaN, 4])).toBe(factor([1, 3, 2, 5, 4]));
});

test('blockBootstrapFactor refuses too few replicates and an infinite value', () => {
  const random = randomStream('seed');
  for (const replicates of [1, 0, 2.5, Number.NaN, Infinity]) {
    expect(() => blockBootstrapFactor([1, 3, 2, 5, 4], random, replicates)).toThrow(
      `blockBootstrapFactor: replicates must be a whole number from 2, got ${replicates}`,
    );
  }
  expect(() => blockBootstrapFactor([1, 3, Infinity, 5, 4], random)).toThrow(
    'blockBootstrapFactor: x[2] must be a finite number or NaN, got Infinity',
  );
});
