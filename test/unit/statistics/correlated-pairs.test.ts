import { sampleCorrelation } from 'simple-statistics';
import { describe, expect, test } from 'vitest';
import { correlatedPairs } from '../../../lib/statistics/correlated-pairs.ts';
import { seeded } from '../../seeded.ts';

const TIMES = 500;
const random = seeded(11);
const rough = () => Array.from({ length: TIMES }, () => random() - 0.5);
const mixed = (shared: number[], share: number) => rough().map((own, t) => share * shared[t] + (1 - share) * own);

/** Series of which some go together more, some less; with missing values. */
function someSeries(): number[][] {
  const one = rough();
  const other = rough();
  const series = [one, mixed(one, 0.9), mixed(one, 0.78), mixed(one, 0.6), other, mixed(other, 0.85), rough()];
  return series.map((values, i) => values.map((value, t) => ((t * 7 + i * 13) % 19 === 0 ? Number.NaN : value)));
}

const matrixOf = (series: number[][]) => Float32Array.from(series.flat());

describe('correlatedPairs', () => {
  test('finds the pairs that all pairs by an independent library give', () => {
    const series = someSeries();
    const found = correlatedPairs({ values: matrixOf(series), times: TIMES, above: 0.9, fewest: 260 });
    const expected = series.flatMap((x, a) =>
      series.slice(a + 1).flatMap((y, j) => {
        const common = x.map((_, t) => t).filter((t) => !Number.isNaN(x[t] + y[t]));
        const correlation = sampleCorrelation(
          common.map((t) => x[t]),
          common.map((t) => y[t]),
        );
        return correlation > 0.9 ? [{ a, b: a + 1 + j, correlation }] : [];
      }),
    );
    expect(expected.length).toBeGreaterThan(1);
    expect(found.map(({ a, b }) => [a, b])).toEqual(expected.map(({ a, b }) => [a, b]));
    found.forEach(({ correlation }, i) => {
      expect(correlation).toBeCloseTo(expected[i].correlation, 6);
    });
  });

  test('gives rows by parts what it gives them together', () => {
    const task = { values: matrixOf(someSeries()), times: TIMES, above: 0.5, fewest: 100 };
    const parts = [0, 2, 5].map((from, i) => correlatedPairs({ ...task, from, to: [2, 5, 7][i] }));
    expect(parts.flat()).toEqual(correlatedPairs(task));
  });

  test('asks for enough common times, at and below the limit', () => {
    const short = rough().map((value, t) => (t < 300 ? value : Number.NaN));
    const values = matrixOf([short, rough().map((_, t) => (t >= 40 ? (short[t] ?? 0) * 2 : Number.NaN))]);
    expect(correlatedPairs({ values, times: TIMES, above: 0.95, fewest: 260 })).toHaveLength(1);
    expect(correlatedPairs({ values, times: TIMES, above: 0.95, fewest: 261 })).toHaveLength(0);
  });

  test('finds a pair whose common times miss every eighth one', () => {
    const sparse = rough().map((value, t) => (t % 8 === 0 ? Number.NaN : value));
    const values = matrixOf([sparse, sparse]);
    expect(correlatedPairs({ values, times: TIMES, above: 0.95, fewest: 260 })).toHaveLength(1);
  });

  test('never pairs a constant series, and answers none at all', () => {
    const flat = rough().map(() => 1);
    expect(correlatedPairs({ values: matrixOf([flat, flat, rough()]), times: TIMES, above: 0.1, fewest: 10 })).toEqual(
      [],
    );
    expect(correlatedPairs({ values: new Float32Array(), times: 0, above: 0.1, fewest: 10 })).toEqual([]);
    expect(() => correlatedPairs({ values: new Float32Array(5), times: 3, above: 0.1, fewest: 1 })).toThrow(
      'correlatedPairs: values must hold whole series of 3, got 5 values',
    );
  });
});
