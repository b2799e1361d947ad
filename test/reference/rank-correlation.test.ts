import { expect, test } from 'vitest';
import { rankCorrelation } from '../../lib/statistics/rank-correlation.ts';
import { expectReference, referenceCase } from './reference.ts';

test('rankCorrelation gives every pair of five stations, ties and zeros among them', () => {
  const { input, expected, ...reference } = referenceCase<
    { stations: Record<string, number[]> },
    { spearman: number[][] }
  >('rank-correlation', 'five stations, 12 years');
  const series = Object.values(input.stations);
  expect(series.length).toBe(5);
  series.forEach((x, i) => {
    const got = series.map((y) => rankCorrelation(x, y));
    expectReference({ ...reference, expected: { spearman: expected.spearman[i] } }, { spearman: got });
  });
});

test('rankCorrelation takes the years that both have', () => {
  const reference = referenceCase<{ x: number[]; y: number[] }, { spearman: number }>(
    'rank-correlation',
    'pairwise complete years',
  );
  expectReference(reference, { spearman: rankCorrelation(reference.input.x, reference.input.y) });
});
