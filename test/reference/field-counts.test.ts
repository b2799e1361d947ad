import { describe, expect, test } from 'vitest';
import { beyondChance } from '../../lib/region/beyond-chance.ts';
import { criticalS } from '../../lib/statistics/critical-s.ts';
import { permutedKendall } from '../../lib/statistics/permuted-kendall.ts';
import { randomStream } from '../../lib/statistics/random.ts';
import { countsByReplicate } from '../../lib/statistics/trend-bits.ts';
import { type ReferenceCase, referenceCases } from './reference.ts';

const YEARS = 60;
const SERIES = 80;
const REPLICATES = 4000;

/** Falling by a two-sided test at 10 % is a local test at 5 %: the first case. */
const [{ input, expected }] = referenceCases<{ independent_tests: number[] }, { least_count: number[] }>(
  'field-counts',
);

/** Counts of series that share no weather: binomial, but for the chance correlation of random series. */
const random = randomStream('independent series');
const series = Array.from({ length: SERIES }, () => Float64Array.from({ length: YEARS }, () => random.uniform()));
const variance = (YEARS * (YEARS - 1) * (2 * YEARS + 5)) / 18;
const critical = series.map(() => criticalS({ n: YEARS, variance, alpha: 0.1 }));
const bits = permutedKendall({ series, critical, replicates: REPLICATES, seed: 'independent series' });

describe('counts of independent series under random orders are those of Livezey & Chen 1983', () => {
  // numbers of tests whose count needed does not hang on the last percent of the probability
  test.each([5, 10, 15, 20, 25, 80])('with %i tests', (tests) => {
    const place = input.independent_tests.indexOf(tests);
    const counts = countsByReplicate(
      bits,
      Array.from({ length: tests }, (_, i) => i),
    ).falling;
    const { bound, expected: mean } = beyondChance(counts, 0);
    // one more than the bound is the least count that is too many
    expect(bound + 1).toBe(expected.least_count[place]);
    expect(mean).toBeCloseTo(0.05 * tests, tests < 20 ? 1 : 0);
  });
});

/** As many counts as replicates, spread exactly as a binomial count is: the (i + ½)/replicates quantiles. */
function binomialCounts(tests: number, level: number, replicates: number): Uint32Array {
  const counts = new Uint32Array(replicates);
  let chance = (1 - level) ** tests;
  let atMost = chance;
  let count = 0;
  for (let i = 0; i < replicates; i++) {
    while (count < tests && (i + 0.5) / replicates > atMost) {
      chance *= ((tests - count) / (count + 1)) * (level / (1 - level));
      atMost += chance;
      count++;
    }
    counts[i] = count;
  }
  return counts;
}

type CountsNeeded = { independent_tests: number[]; local_level: number };
type Needed = { least_count: (number | null)[] };

describe('beyondChance of binomial counts is the table of Livezey & Chen 1983', () => {
  const [at5, at10, observed] = referenceCases<unknown, unknown>('field-counts');

  test.each([at5, at10] as ReferenceCase<CountsNeeded, Needed>[])('$name', ({ input, expected }) => {
    input.independent_tests.forEach((tests, i) => {
      const { bound, expected: mean } = beyondChance(binomialCounts(tests, input.local_level, 200_000), 0);
      // where even all of them are too few, no count is enough
      expect(bound + 1 > tests ? Number.NaN : bound + 1, `${tests} tests`).toBe(expected.least_count[i]);
      expect(mean).toBeCloseTo(tests * input.local_level, 3);
    });
  });

  test('p of a count', () => {
    const { input, expected } = observed as ReferenceCase<
      { independent_tests: number; local_level: number; count: number[] },
      { p: number[] }
    >;
    const counts = binomialCounts(input.independent_tests, input.local_level, 1_000_000);
    input.count.forEach((count, i) => {
      expect(beyondChance(counts, count).p).toBeCloseTo(expected.p[i], 5);
    });
  });
});
