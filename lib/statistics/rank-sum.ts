import { twoSidedP } from './normal.ts';
import { presentValues } from './present-values.ts';
import { averageRanks } from './ranks.ts';

export interface RankSumResult {
  /** number of values of each part */
  before: number;
  after: number;
  /** pairs in which the value after is the higher one, equal ones counting half */
  u: number;
  /** variance of U with the correction for ties, before `varianceFactor` */
  variance: number;
  /** above 0 where the later part is the higher one; 0 when all values are equal */
  z: number;
  /** two-sided; 1 when all values are equal */
  p: number;
}

/** Rank-sum test of two parts of a series (Wilcoxon, Mann–Whitney), with the tie and the continuity correction.
 *  z = (U − n1·n2/2 ∓ ½)/√(varianceFactor·Var U), Var U = n1·n2/12·[N + 1 − Σ t(t² − 1)/(N(N − 1))] over groups of t equal
 *  values among all N. p is the normal approximation: good from about ten values a part.
 *  @param before          values of the one part and of the other, NaN where missing (left out); left unchanged
 *  @param varianceFactor  what Var U is multiplied by, for serial correlation
 *  @returns               NaN in variance, z and p when a part has no value
 *  @throws RangeError     when a value is infinite or varianceFactor is not a positive number
 *  Source: Mann & Whitney 1947, Ann. Math. Stat. 18:50–60; ties as in Hollander & Wolfe 1973, Nonparametric Statistical
 *  Methods, chapter 4.
 *  Example: [0.8, 0.83, 1.89, 1.04], [1.45, 1.38, 1.91] → u 9 of 12 */
export function rankSum(before: ArrayLike<number>, after: ArrayLike<number>, varianceFactor = 1): RankSumResult {
  checkFactor('rankSum', varianceFactor);
  const first = presentValues(before, 'rankSum');
  const second = presentValues(after, 'rankSum');
  const [n1, n2] = [first.length, second.length];
  if (n1 === 0 || n2 === 0) {
    return { before: n1, after: n2, u: 0, variance: Number.NaN, z: Number.NaN, p: Number.NaN };
  }
  const all = new Float64Array(n1 + n2);
  all.set(first);
  all.set(second, n1);
  const rankSumAfter = averageRanks(all)
    .subarray(n1)
    .reduce((sum, rank) => sum + rank, 0);
  const u = rankSumAfter - (n2 * (n2 + 1)) / 2;
  const variance = varianceOfU(n1, n2, [all]);
  const excess = u - (n1 * n2) / 2;
  // a half is what U moves by at least; z never crosses 0 by it
  const corrected = Math.sign(excess) * Math.max(0, Math.abs(excess) - 0.5);
  const z = variance === 0 ? 0 : corrected / Math.sqrt(varianceFactor * variance);
  return { before: n1, after: n2, u, variance, z, p: Math.min(1, twoSidedP(z)) };
}

/** Variance of U under no difference: `parts` is one array of all values, or several if values of different parts do not
 *  count as tied.
 *  @param n1  number of values of the one part and of the other, neither 0 */
export function varianceOfU(n1: number, n2: number, parts: readonly Float64Array[]): number {
  const all = n1 + n2;
  const ties = parts.reduce((sum, part) => sum + tieTerm(part), 0);
  return ((n1 * n2) / 12) * (all + 1 - ties / (all * (all - 1)));
}

/** Σ t(t² − 1) over groups of t equal values. */
function tieTerm(values: Float64Array): number {
  const sorted = values.slice().sort();
  let ties = 0;
  for (let start = 0; start < sorted.length; ) {
    let end = start + 1;
    while (end < sorted.length && sorted[end] === sorted[start]) end++;
    const tied = end - start;
    ties += tied * (tied * tied - 1);
    start = end;
  }
  return ties;
}

/** @throws RangeError naming `caller` when the factor is not a positive number */
export function checkFactor(caller: string, varianceFactor: number): void {
  if (!(varianceFactor > 0 && Number.isFinite(varianceFactor))) {
    throw new RangeError(`${caller}: varianceFactor must be a positive number, got ${varianceFactor}`);
  }
}
