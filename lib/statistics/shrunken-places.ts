import { pauleMandel } from './paule-mandel.ts';
import { medianOfSorted } from './quantile.ts';
import { type Posteriors, roughenedPosteriors } from './roughened-prior.ts';
import { selectInPlace } from './select.ts';

/** The span leaves out a twentieth of the replicates at either end. */
const OUTSIDE = 0.05;

/** Estimates that are to be put in order, and what they came to in simulation. */
export interface ReplicatedEstimates {
  /** b_i, one a group; place 1 is the smallest */
  estimates: ArrayLike<number>;
  /** group i's estimate in replicate b at i·replicates + b; replicates are common to all groups */
  replicated: Float64Array;
  replicates: number;
}

/** How sure the place of each group is. */
export interface ShrunkenPlaces {
  /** τ: standard deviation of the true values, as estimated; 0: they differ by no more than chance would make them */
  spread: number;
  /** ends of the 90 % interval of each group's place, from 1 */
  low: Int32Array;
  high: Int32Array;
  /** share of replicates in which group i is among the k smallest, at i·most + k − 1 */
  among: Float64Array;
  /** how far `among` reaches: k up to this */
  most: number;
}

/** Places of many groups with what is not known of them, by shrinkage towards their common mean.
 *
 *  d_i is the deviation from the group's mean over replicates, less the mean of such deviations over groups in the same
 *  replicate: what all groups share moves no place. A group that varies more than the middle one counts in this mean by the
 *  ratio of their variances, so that one wild group does not blur all others. s_i² = var(d_i)·M/(M − 1); τ² and μ by Paule & Mandel from the
 *  estimates and s_i²; w_i = τ²/(τ² + s_i²). In each replicate the groups are put in order of
 *  μ + w_i(b_i − μ) + √w_i·d_i, equal ones sharing the better place; the span is the order statistics ⌈0.05·B⌉ and
 *  ⌈0.95·B⌉ of a group's places. With τ² = 0 every span is 1 to M, and each group is among the k smallest with k/M. The
 *  guarantee is an average over groups: 90 % of the spans hold the true place, not each of them with 90 %.
 *  @param most  how far `among` is wanted; it ends at the number of groups
 *  @throws RangeError when the lengths do not fit, a number is not finite, or there are fewer than 2 replicates
 *  Source: Laird & Louis 1989, Empirical Bayes ranking methods, J. Educ. Stat. 14:29–46; shrinkage of Efron & Morris 1975,
 *  J. Am. Stat. Assoc. 70:311–319; on why places need intervals Goldstein & Spiegelhalter 1996, J. R. Stat. Soc. A
 *  159:385–443.
 *  Example: two estimates 0 and 100 that vary by 1 → spans 1–1 and 2–2 */
export function shrunkenPlaces(input: ReplicatedEstimates, most: number): ShrunkenPlaces {
  check(input);
  const { estimates, replicates } = input;
  const groups = estimates.length;
  const reach = Math.min(most, groups);
  const deviations = commonRemoved(input);
  const variances = variancesOf(deviations, groups, replicates);
  const { variance, mean } = pauleMandel(estimates, variances);
  if (variance === 0) return nothingTold(groups, reach);
  drawTrueValues(deviations, replicates, roughenedPosteriors({ estimates, variances, mean, variance }));
  const places = placesByReplicate(deviations, groups, replicates);
  return { spread: Math.sqrt(variance), ...spansOf(places, groups, replicates, reach), most: reach };
}

/** d_i: deviations from each group's mean, less their weighted mean over the groups of a replicate. */
function commonRemoved({ estimates, replicated, replicates }: ReplicatedEstimates): Float64Array {
  const groups = estimates.length;
  const deviations = replicated.slice();
  const variances = new Float64Array(groups);
  for (let i = 0; i < groups; i++) {
    const own = deviations.subarray(i * replicates, (i + 1) * replicates);
    let sum = 0;
    for (const value of own) sum += value;
    const mean = sum / replicates;
    for (let b = 0; b < replicates; b++) {
      own[b] -= mean;
      variances[i] += own[b] ** 2 / replicates;
    }
  }
  const middle = medianOfSorted(variances.slice().sort());
  const weights = variances.map((variance) => (variance > middle ? middle / variance : 1));
  const whole = weights.reduce((sum, weight) => sum + weight, 0);
  const common = new Float64Array(replicates);
  for (let i = 0; i < groups; i++) {
    for (let b = 0; b < replicates; b++) common[b] += (weights[i] / whole) * deviations[i * replicates + b];
  }
  for (let at = 0; at < deviations.length; at++) deviations[at] -= common[at % replicates];
  return deviations;
}

/** Puts in place of each deviation the quantile of the group's true value at its share: where the deviation stands among
 *  the group's own. What groups share in a replicate they share in their true values. */
function drawTrueValues(deviations: Float64Array, replicates: number, posteriors: Posteriors): void {
  const shares = Float64Array.from({ length: replicates }, (_, k) => (k + 0.5) / replicates);
  const values = new Float64Array(replicates);
  const order = new Uint32Array(replicates);
  for (let i = 0; i * replicates < deviations.length; i++) {
    const own = deviations.subarray(i * replicates, (i + 1) * replicates);
    for (let b = 0; b < replicates; b++) order[b] = b;
    order.sort((a, b) => own[a] - own[b] || a - b);
    posteriors.quantiles(i, shares, values);
    for (let k = 0; k < replicates; k++) own[order[k]] = values[k];
  }
}

function variancesOf(deviations: Float64Array, groups: number, replicates: number): Float64Array {
  return Float64Array.from({ length: groups }, (_, i) => {
    let squares = 0;
    for (let b = i * replicates; b < (i + 1) * replicates; b++) squares += deviations[b] ** 2;
    // a single group has nothing left once the common part is gone
    return groups < 2 ? 0 : ((squares / (replicates - 1)) * groups) / (groups - 1);
  });
}

/** Place of group i in replicate b at i·replicates + b. */
function placesByReplicate(values: Float64Array, groups: number, replicates: number): Float64Array {
  const places = new Float64Array(values.length);
  const sorted = new Float64Array(groups);
  for (let b = 0; b < replicates; b++) {
    for (let i = 0; i < groups; i++) sorted[i] = values[i * replicates + b];
    sorted.sort();
    for (let i = 0; i < groups; i++) places[i * replicates + b] = 1 + countBelow(sorted, values[i * replicates + b]);
  }
  return places;
}

/** How many of the sorted values are smaller. */
function countBelow(sorted: Float64Array, value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle] < value) low = middle + 1;
    else high = middle;
  }
  return low;
}

function spansOf(places: Float64Array, groups: number, replicates: number, reach: number) {
  const low = new Int32Array(groups);
  const high = new Int32Array(groups);
  const among = new Float64Array(groups * reach);
  for (let i = 0; i < groups; i++) {
    const own = places.subarray(i * replicates, (i + 1) * replicates);
    for (const place of own) if (place <= reach) among[i * reach + place - 1] += 1;
    for (let k = 1; k < reach; k++) among[i * reach + k] += among[i * reach + k - 1];
    for (let k = 0; k < reach; k++) among[i * reach + k] /= replicates;
    const first = Math.ceil(OUTSIDE * replicates) - 1;
    const last = Math.ceil((1 - OUTSIDE) * replicates) - 1;
    selectInPlace(own, first);
    selectInPlace(own, last, first);
    low[i] = own[first];
    high[i] = own[last];
  }
  return { low, high, among };
}

function nothingTold(groups: number, reach: number): ShrunkenPlaces {
  return {
    spread: 0,
    low: new Int32Array(groups).fill(1),
    high: new Int32Array(groups).fill(groups),
    among: Float64Array.from({ length: groups * reach }, (_, at) => ((at % reach) + 1) / groups),
    most: reach,
  };
}

function check({ estimates, replicated, replicates }: ReplicatedEstimates): void {
  if (!(Number.isInteger(replicates) && replicates >= 2)) {
    throw new RangeError(`shrunkenPlaces: replicates must be a whole number of at least 2, got ${replicates}`);
  }
  if (replicated.length !== estimates.length * replicates) {
    throw new RangeError(
      `shrunkenPlaces: replicated must hold ${estimates.length} × ${replicates} figures, got ${replicated.length}`,
    );
  }
  const at = replicated.findIndex((figure) => !Number.isFinite(figure));
  if (at >= 0) throw new RangeError(`shrunkenPlaces: replicated[${at}] must be a finite number, got ${replicated[at]}`);
}
