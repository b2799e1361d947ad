import { expect, test } from 'vitest';
import { hodgesLehmann } from '../../lib/statistics/hodges-lehmann.ts';
import { rankSum } from '../../lib/statistics/rank-sum.ts';
import { expectReference, referenceCases } from './reference.ts';

type Parts = { before: number[]; after: number[] };

for (const reference of referenceCases<Parts, Record<string, number>>('rank-sum')) {
  const { before, after } = reference.input;

  test(`rankSum and hodgesLehmann give U, the difference and its interval of ${reference.name}`, () => {
    const { difference, low, high } = hodgesLehmann(before, after);
    expectReference(reference, { U: rankSum(before, after).u, difference, low, high });
  });

  if (!('var_U' in reference.expected)) continue;
  test(`rankSum gives variance and p of ${reference.name}, with and without a serial factor`, () => {
    const { variance, p } = rankSum(before, after);
    const doubled = rankSum(before, after, 2);
    expectReference(reference, { var_U: variance, p, p_factor_2: doubled.p });
    expect(doubled.variance).toBe(variance);
    const { low, high } = hodgesLehmann(before, after, { varianceFactor: 2 });
    expectReference(reference, { low_factor_2: low, high_factor_2: high });
  });
}
