import cdf from '@stdlib/stats-base-dists-normal-cdf';
import quantile from '@stdlib/stats-base-dists-normal-quantile';

/** Probability that a standard normal variable is at most `z`. NaN for NaN.
 *  Example: normalCdf(1.96) → 0.975002… */
export function normalCdf(z: number): number {
  return cdf(z, 0, 1);
}

/** Standard normal quantile: the z with normalCdf(z) = `probability`.
 *  @param probability  0 to 1; −∞ at 0, ∞ at 1, NaN outside
 *  Example: normalQuantile(0.975) → 1.959964… */
export function normalQuantile(probability: number): number {
  return quantile(probability, 0, 1);
}

/** Two-sided p-value of a standard normal statistic: 2·(1 − Φ(|z|)), taken in the lower tail so that small p keep
 *  their digits. NaN for NaN. */
export function twoSidedP(z: number): number {
  return 2 * cdf(-Math.abs(z), 0, 1);
}
