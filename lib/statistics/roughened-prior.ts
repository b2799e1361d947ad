import { normalQuantile } from './normal.ts';

/** Points of the grid on which the distribution of the true values is kept. */
const POINTS = 800;

/** The grid reaches this many standard deviations of the starting prior to either side of its mean. */
const REACH = 4;

/** Steps of roughening. With more of them the distribution falls apart into spikes; with none it is normal. */
const STEPS = 300;

/** Least height of the starting prior against its highest: further out than thirty standard deviations its own heights
 *  become 0, and an estimate there could never be believed. */
const LEAST_HEIGHT = 1e-200;

/** Estimates with their errors, and the normal distribution of true values to begin with. */
export interface RoughenedInput {
  /** b_i, finite */
  estimates: ArrayLike<number>;
  /** s_i², 0 or more, same length */
  variances: ArrayLike<number>;
  /** μ and τ² of the normal prior; τ² above 0 */
  mean: number;
  variance: number;
}

/** Where each true value may lie, given its estimate and what the others tell of the distribution of true values. */
export interface Posteriors {
  /** Quantiles of the true value of group i at rising shares, written into `out`; a share lies between 0 and 1.
   *  A group whose error is narrower than a step of the grid is known better than the grid can tell: its value varies
   *  about its estimate by its error, and is the estimate where there is none. */
  quantiles(i: number, shares: ArrayLike<number>, out: Float64Array): void;
}

/** Empirical Bayes with a distribution of true values that is found from the estimates themselves: a normal one, roughened
 *  by three hundred steps of the EM algorithm on a grid of 800 points. A few steep groups among many level ones are then not
 *  drawn to the middle of a bell that does not fit them.
 *  @throws RangeError when lengths differ or the variance of the prior is not above 0
 *  Sources: Laird & Louis 1991, Smoothing the non-parametric estimate of a prior distribution by roughening, Comput. Stat.
 *  Data Anal. 12:27–37; Shen & Louis 1999, Empirical Bayes estimation via the smoothing by roughening approach, J. Comput.
 *  Graph. Stat. 8:800–823.
 *  Example: estimates 0 and 10 that vary by 0 → quantiles 0 and 10 at every share */
export function roughenedPosteriors({ estimates, variances, mean, variance }: RoughenedInput): Posteriors {
  const groups = estimates.length;
  if (variances.length !== groups) {
    throw new RangeError(
      `roughenedPosteriors: estimates and variances must have the same length, got ${groups} and ${variances.length}`,
    );
  }
  if (!(variance > 0)) throw new RangeError(`roughenedPosteriors: variance must be above 0, got ${variance}`);
  const spread = Math.sqrt(variance);
  let from = mean - REACH * spread;
  let to = mean + REACH * spread;
  for (let i = 0; i < groups; i++) {
    from = Math.min(from, estimates[i]);
    to = Math.max(to, estimates[i]);
  }
  const step = (to - from) / (POINTS - 1);
  const grid = Float64Array.from({ length: POINTS }, (_, j) => from + j * step);
  // errors narrower than a step would fall between the points
  const likelihoods = Array.from({ length: groups }, (_, i) =>
    bell(grid, estimates[i], Math.max(Math.sqrt(variances[i]), step)),
  );
  let prior: Float64Array = bell(grid, mean, spread).map((height) => Math.max(LEAST_HEIGHT, height));
  for (let k = 0; k < STEPS; k++) prior = roughened(prior, likelihoods);

  const below = new Float64Array(POINTS);
  return {
    quantiles(i, shares, out) {
      const error = Math.sqrt(variances[i]);
      if (error < step) {
        for (let k = 0; k < shares.length; k++) {
          out[k] = error === 0 ? estimates[i] : estimates[i] + error * normalQuantile(shares[k]);
        }
        return;
      }
      let sum = 0;
      for (let j = 0; j < POINTS; j++) {
        sum += prior[j] * likelihoods[i][j];
        below[j] = sum;
      }
      let j = 0;
      for (let k = 0; k < shares.length; k++) {
        const wanted = shares[k] * sum;
        while (j < POINTS - 1 && below[j] < wanted) j++;
        const before = j === 0 ? 0 : below[j - 1];
        const held = below[j] - before;
        // evenly within the stretch that a point stands for
        out[k] = grid[j] + step * ((held > 0 ? (wanted - before) / held : 0.5) - 0.5);
      }
    },
  };
}

/** A normal density over the grid, 1 at its highest point there. */
function bell(grid: Float64Array, centre: number, spread: number): Float64Array {
  const heights = grid.map((point) => -0.5 * ((point - centre) / spread) ** 2);
  const highest = heights.reduce((most, height) => Math.max(most, height), Number.NEGATIVE_INFINITY);
  return heights.map((height) => Math.exp(height - highest));
}

/** One EM step: the mean of the groups' posteriors. */
function roughened(prior: Float64Array, likelihoods: readonly Float64Array[]): Float64Array {
  const next = new Float64Array(prior.length);
  for (const likelihood of likelihoods) {
    let sum = 0;
    for (let j = 0; j < prior.length; j++) sum += prior[j] * likelihood[j];
    const scale = 1 / sum;
    for (let j = 0; j < prior.length; j++) next[j] += prior[j] * likelihood[j] * scale;
  }
  return next;
}
