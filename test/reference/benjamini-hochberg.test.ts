import { expect, test } from 'vitest';
import { benjaminiHochberg } from '../../lib/statistics/false-discovery.ts';
import { expectReference, referenceCase, referenceCases } from './reference.ts';

for (const reference of referenceCases<{ p: number[] }, object>('benjamini-hochberg')) {
  test(`benjaminiHochberg gives the adjusted p-values of ${reference.name}`, () => {
    expectReference(reference, { BH: benjaminiHochberg(reference.input.p) });
  });
}

test('benjaminiHochberg rejects the 4 of 15 that Benjamini and Hochberg (1995, section 4) reject at 0.05', () => {
  const reference = referenceCase<{ p: number[]; level: number }, object>(
    'published-examples',
    'false discovery rate: Benjamini and Hochberg (1995), section 4',
  );
  const { p, level } = reference.input;
  const rejected = p.filter((_, i) => benjaminiHochberg(p)[i] <= level);
  expect(rejected.length).toBeGreaterThan(0);
  expectReference(reference, { rejected_by_BH: rejected.length, largest_p_rejected_by_BH: Math.max(...rejected) });
});
