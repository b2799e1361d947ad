import { test } from 'vitest';
import { quantileType6 } from '../../lib/statistics/quantile.ts';
import { expectReference, referenceCases } from './reference.ts';

for (const reference of referenceCases<{ x: number[]; non_exceedance: number[] }, object>('quantiles')) {
  test(`quantileType6 gives the ${reference.name}`, () => {
    const sorted = Float64Array.from(reference.input.x).sort();
    expectReference(reference, { weibull: reference.input.non_exceedance.map((p) => quantileType6(sorted, p)) });
  });
}
