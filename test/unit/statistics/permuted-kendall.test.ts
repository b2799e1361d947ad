import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { mannKendall } from '../../../lib/statistics/mann-kendall.ts';
import { permutedKendall } from '../../../lib/statistics/permuted-kendall.ts';
import { randomStream, shuffle } from '../../../lib/statistics/random.ts';
import { countsByReplicate, joinTrendBits, type TrendBits } from '../../../lib/statistics/trend-bits.ts';
import { seeded } from '../../seeded.ts';

const isSet = (bits: TrendBits, of: 'falling' | 'rising', series: number, replicate: number): boolean => {
  const words = Math.ceil(bits.replicates / 32);
  return ((bits[of][series * words + (replicate >>> 5)] >>> (replicate & 31)) & 1) === 1;
};

/** The series in the order that replicate b gives its times: what permutedKendall never makes. */
function reordered(values: readonly number[], seed: string, b: number): number[] {
  const places = Int32Array.from(values, (_, i) => i);
  shuffle(places, randomStream(seed, 'permutation', b));
  const result = new Array<number>(values.length);
  places.forEach((place, time) => {
    result[place] = values[time];
  });
  return result;
}

describe('permutedKendall', () => {
  test('finds the S that mannKendall finds in the reordered series, with ties and missing values', () => {
    const value = fc.oneof({ weight: 5, arbitrary: fc.integer({ min: 0, max: 20 }) }, fc.constant(Number.NaN));
    fc.assert(
      fc.property(
        fc
          .integer({ min: 2, max: 45 })
          .chain((n) => fc.array(fc.array(value, { minLength: n, maxLength: n }), { minLength: 1, maxLength: 4 })),
        fc.integer({ min: 1, max: 60 }),
        fc.integer({ min: 1, max: 70 }),
        (series, critical, replicates) => {
          const bits = permutedKendall({ series, critical: series.map(() => critical), replicates, seed: 'test' });
          for (let i = 0; i < series.length; i++) {
            for (let b = 0; b < replicates; b++) {
              const { s } = mannKendall(reordered(series[i], 'test', b));
              expect([isSet(bits, 'falling', i, b), isSet(bits, 'rising', i, b)]).toEqual([
                s <= -critical,
                s >= critical,
              ]);
            }
          }
        },
      ),
      { numRuns: 60 },
    );
  });

  test('gives each order of four values its share: 1 in 24 falls all the way', () => {
    const bits = permutedKendall({ series: [[1, 2, 3, 4]], critical: [6], replicates: 24_000, seed: 'orders' });
    const { falling, rising } = countsByReplicate(bits, [0]);
    const share = (counts: Uint32Array) => counts.reduce((sum, count) => sum + count, 0) / 24_000;
    // standard error of a share of 1/24 among 24,000: 0.0013
    expect(Math.abs(share(falling) - 1 / 24)).toBeLessThan(0.005);
    expect(Math.abs(share(rising) - 1 / 24)).toBeLessThan(0.005);
  });

  test('gives series in parts what it gives them together', () => {
    const random = seeded(3);
    const series = Array.from({ length: 7 }, () => Float64Array.from({ length: 33 }, random));
    const critical = [60, 70, 80, 90, 100, 110, 120];
    const ask = (from: number, to: number) =>
      permutedKendall({
        series: series.slice(from, to),
        critical: critical.slice(from, to),
        replicates: 700,
        seed: 's',
      });
    expect(joinTrendBits([ask(0, 3), ask(3, 4), ask(4, 7)])).toEqual(ask(0, 7));
    expect(joinTrendBits([])).toEqual({
      replicates: 0,
      series: 0,
      falling: new Uint32Array(),
      rising: new Uint32Array(),
    });
  });

  test('moves like series alike: weather that is shared falls everywhere at once', () => {
    const one = Float64Array.from({ length: 40 }, seeded(5));
    const bits = permutedKendall({
      series: [one, one.map((v) => 2 * v), one.map((v) => -v)],
      critical: [150, 150, 150],
      replicates: 500,
      seed: 'w',
    });
    const together = countsByReplicate(bits, [0, 1]);
    expect(together.falling.every((count) => count === 0 || count === 2)).toBe(true);
    expect(countsByReplicate(bits, [2]).rising).toEqual(countsByReplicate(bits, [0]).falling);
  });

  test('says nothing of series of one value, of none, and of equal values', () => {
    const equal = permutedKendall({
      series: [
        [1, 1, 1],
        [Number.NaN, Number.NaN, Number.NaN],
      ],
      critical: [1, 1],
      replicates: 40,
      seed: 'e',
    });
    expect(equal.falling.every((word) => word === 0)).toBe(true);
    expect(permutedKendall({ series: [[1]], critical: [1], replicates: 3, seed: 'e' }).rising).toEqual(
      new Uint32Array(1),
    );
    expect(permutedKendall({ series: [], critical: [], replicates: 3, seed: 'e' }).series).toBe(0);
  });

  test('refuses series of unlike length, parts of unlike number and a number of replicates that is none', () => {
    expect(() => permutedKendall({ series: [[1, 2], [1]], critical: [1, 1], replicates: 1, seed: '' })).toThrow(
      'permutedKendall: series[1] must have 2 values like the first, got 1',
    );
    expect(() => permutedKendall({ series: [], critical: [], replicates: 0.5, seed: '' })).toThrow('got 0.5');
    const of = (replicates: number) => permutedKendall({ series: [[1, 2]], critical: [1], replicates, seed: '' });
    expect(() => joinTrendBits([of(1), of(2)])).toThrow('joinTrendBits: all parts must have 1 replicates, got 2');
  });
});
