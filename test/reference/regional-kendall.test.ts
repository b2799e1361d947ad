import { expect, test } from 'vitest';
import { regionalKendall } from '../../lib/statistics/regional-kendall.ts';
import { expectReference, referenceCases } from './reference.ts';

type Input = { years: number[]; sites: Record<string, number[]> };

for (const reference of referenceCases<Input, Record<string, number>>('regional-kendall')) {
  const { years, sites } = reference.input;
  const input = Object.values(sites).map((values) => ({ years, values }));

  test(`regionalKendall gives S, tau, and its variance without and with covariance, of ${reference.name}`, () => {
    const { s, tau, varianceIndependent, variance } = regionalKendall(input);
    expectReference(reference, { S: s, tau, var_S: varianceIndependent, var_S_with_covariance: variance });
  });

  test(`regionalKendall gives z and p with covariance of ${reference.name}`, () => {
    const { z, p } = regionalKendall(input);
    expectReference(reference, { z_with_covariance: z, p_with_covariance: p });
    expect(regionalKendall(input, 4).z).toBeCloseTo(z / 2, 12);
  });
}
