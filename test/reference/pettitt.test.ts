import { expect, test } from 'vitest';
import { pettitt } from '../../lib/statistics/pettitt.ts';
import { expectReference, referenceCases } from './reference.ts';

type Input = { x: number[]; years?: number[] };
type Expected = { K: number; last_year_before_change?: number };

for (const reference of referenceCases<Input, Expected>('pettitt')) {
  test(`pettitt gives K, its place and sign, and p of ${reference.name}`, () => {
    const { x, years } = reference.input;
    const { k, u, at, p } = pettitt(x);
    expectReference(reference, { n: x.length, K: k, U_at_t: u, t: at + 1, p });
    if (years) expect(years[at]).toBe(reference.expected.last_year_before_change);
  });
}
