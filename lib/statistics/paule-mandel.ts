/** Root finding stops when the bracket is this narrow against its upper end. */
const RELATIVE_WIDTH = 1e-12;

/** The spread of true values behind estimates that are each uncertain by themselves. */
export interface TrueSpread {
  /** τ²: variance of the true values; 0 when the estimates differ by no more than their errors would make them */
  variance: number;
  /** μ: mean of the estimates with weights 1/(τ² + s²) */
  mean: number;
  /** w = τ²/(τ² + s²) of each estimate: how far it speaks for itself, 0 to 1 */
  weights: Float64Array;
}

/** Between-group variance by the method of Paule and Mandel: the τ² ≥ 0 at which Σ (b_i − μ)²/(τ² + s_i²) is M − 1, with μ
 *  the mean weighted by 1/(τ² + s_i²); 0 when the sum is below M − 1 even there.
 *  @param estimates  b_i, finite
 *  @param variances  s_i², 0 or more, same length
 *  @returns          NaN for mean and weights without estimates; a single one has no spread
 *  @throws RangeError when lengths differ, an estimate is not finite or a variance is not 0 or more
 *  Source: Paule & Mandel 1982, Consensus values and weighting factors, J. Res. Natl. Bur. Stand. 87:377–385.
 *  Example: estimates [0, 4], variances [1, 1] → τ² = 7, for 16/2/(7 + 1) = 1 */
export function pauleMandel(estimates: ArrayLike<number>, variances: ArrayLike<number>): TrueSpread {
  check(estimates, variances);
  const groups = estimates.length;
  const variance = groups < 2 ? 0 : root(estimates, variances);
  const mean = weightedMean(estimates, variances, variance);
  const weights = Float64Array.from(variances, (own) => (variance === 0 ? 0 : variance / (variance + own)));
  return { variance, mean, weights };
}

/** The sum falls as τ² grows, so halving a bracket finds the one place where it is M − 1. */
function root(estimates: ArrayLike<number>, variances: ArrayLike<number>): number {
  const wanted = estimates.length - 1;
  let low = 0;
  if (!(spreadAt(estimates, variances, 0) > wanted)) return 0;
  // at the sum of squares about any value the sum is below 1
  let high = 0;
  for (let i = 0; i < estimates.length; i++) high += (estimates[i] - estimates[0]) ** 2;
  while (high - low > RELATIVE_WIDTH * high) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (spreadAt(estimates, variances, middle) > wanted) low = middle;
    else high = middle;
  }
  return high;
}

/** Σ (b_i − μ)²/(τ² + s_i²). Estimates that are certain (s² = 0) make it infinite at τ² = 0 when they differ from μ. */
function spreadAt(estimates: ArrayLike<number>, variances: ArrayLike<number>, variance: number): number {
  const mean = weightedMean(estimates, variances, variance);
  let sum = 0;
  for (let i = 0; i < estimates.length; i++) {
    const squared = (estimates[i] - mean) ** 2;
    if (squared > 0) sum += squared / (variance + variances[i]);
  }
  return sum;
}

function weightedMean(estimates: ArrayLike<number>, variances: ArrayLike<number>, variance: number): number {
  // beside estimates that are certain the others have no weight
  const certainOnly = variance === 0 && Array.prototype.includes.call(variances, 0);
  let sum = 0;
  let weights = 0;
  for (let i = 0; i < estimates.length; i++) {
    const certain = variance + variances[i] === 0;
    if (certainOnly && !certain) continue;
    const weight = certainOnly ? 1 : 1 / (variance + variances[i]);
    sum += weight * estimates[i];
    weights += weight;
  }
  return sum / weights;
}

function check(estimates: ArrayLike<number>, variances: ArrayLike<number>): void {
  if (estimates.length !== variances.length) {
    throw new RangeError(
      `pauleMandel: estimates and variances must have the same length, got ${estimates.length} and ${variances.length}`,
    );
  }
  for (let i = 0; i < estimates.length; i++) {
    if (!Number.isFinite(estimates[i])) {
      throw new RangeError(`pauleMandel: estimates[${i}] must be a finite number, got ${estimates[i]}`);
    }
    if (!(variances[i] >= 0 && variances[i] < Number.POSITIVE_INFINITY)) {
      throw new RangeError(`pauleMandel: variances[${i}] must be 0 or more, got ${variances[i]}`);
    }
  }
}
