import { expect, test } from 'vitest';
import { kendallExactP } from '../../lib/statistics/kendall-exact.ts';
import { mannKendall } from '../../lib/statistics/mann-kendall.ts';
import { expectReference, referenceCase, referenceCases } from './reference.ts';

type Values = { x: number[] };

for (const reference of referenceCases<Values, object>('mann-kendall')) {
  test(`mannKendall gives n, S, variance, z, p and tau-b of ${reference.name}`, () => {
    const { n, s, variance, z, p, tauB } = mannKendall(reference.input.x);
    expectReference(reference, { n, S: s, var_S: variance, z, p, tau_b: tauB });
  });
}

for (const reference of referenceCases<{ n: number }, { S: number[] }>('kendall-exact')) {
  test(`kendallExactP gives every two-sided probability for ${reference.name}, of either sign`, () => {
    const { n } = reference.input;
    expectReference(reference, { p_two_sided: reference.expected.S.map((s) => kendallExactP(s, n)) });
    expectReference(reference, { p_two_sided: reference.expected.S.map((s) => kendallExactP(-s, n)) });
  });
}

test('kendallExactP agrees with Kendall’s printed table (1970, Appendix Table 1) to its three places', () => {
  const { expected } = referenceCase<object, Record<string, Record<string, number>>>(
    'published-examples',
    "Kendall's table of upper-tail probabilities (3 places)",
  );
  let compared = 0;
  for (const [label, row] of Object.entries(expected)) {
    const n = Number(label.slice(2));
    for (const [s, upper] of Object.entries(row)) {
      // for S = 0 the two tails overlap, and the two-sided p is 1
      if (s === '0') expect(kendallExactP(0, n)).toBe(1);
      else expect(Math.abs(kendallExactP(Number(s), n) / 2 - upper), `${label}, S = ${s}`).toBeLessThanOrEqual(0.0006);
      compared++;
    }
  }
  expect(compared).toBe(66);
});

const published = (name: string) =>
  referenceCase<Values & { t: number[]; y: number[] }, object>('published-examples', name);

test('mannKendall gives S = 4 for Gilbert (1987), p. 211', () => {
  const reference = published('Kendall S without ties: Gilbert (1987), p. 211');
  expectReference(reference, { S: mannKendall(reference.input.x).s });
});

test.each([
  'variance with ties: van Belle and Hughes (1984), p. 129',
  'variance with ties: Gilbert (1987), section 16.4',
])('mannKendall gives the printed %s', (name) => {
  const reference = published(name);
  expectReference(reference, { var_S: mannKendall(reference.input.x).variance });
});

test('mannKendall gives S, variance, z and p worked by hand in J. Little’s course note (14 values, one tie)', () => {
  const reference = published('Mann-Kendall by hand, 14 values, one tie: College of the Holy Cross course note');
  const { s, variance, z, p } = mannKendall(reference.input.x);
  expectReference(reference, { S: s, var_S: variance, z, p_one_sided: p / 2 });
});

test('mannKendall gives S and p of the ten pairs used by Helsel and Hirsch, normal and exact', () => {
  const reference = published("ten pairs used in Helsel and Hirsch's chapter on correlation (now Helsel et al. 2020)");
  const normal = mannKendall(reference.input.x);
  const exact = mannKendall(reference.input.x, { exact: true });
  expectReference(reference, { S: normal.s, tau: normal.tauB, z: normal.z, p: normal.p, p_exact_two_sided: exact.p });
});

test('mannKendall of tuna lightness against quality (Hollander and Wolfe 1973, p. 187) gives tau, z and the exact p', () => {
  const name = 'Kendall test without continuity correction: Hollander and Wolfe (1973), p. 187, tuna lightness';
  const reference = published(name);
  const { x, y } = reference.input;
  const byLightness = y.map((_, i) => i).sort((a, b) => x[a] - x[b]);
  const { s, variance, tauB, p } = mannKendall(
    byLightness.map((i) => y[i]),
    { exact: true },
  );
  // printed without the continuity correction
  expectReference(reference, { tau: tauB, z: s / Math.sqrt(variance) });
  expectReference(published('Kendall test, exact: same data'), { p_two_sided: p, p_one_sided: p / 2 });
});
