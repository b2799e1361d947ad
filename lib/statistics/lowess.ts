import { median } from './quantile.ts';

/** Share of the values that each local line rests on, where the caller names none. */
const DEFAULT_SPAN = 2 / 3;

/** Rounds of down-weighting what lies far off the curve. */
const DEFAULT_ROUNDS = 3;

/** A value this many median residuals off the curve, or more, loses all weight. */
const OUTLYING = 6;

/** Below this share of the mean residual, the median residual counts as nothing: most points lie on the curve already. */
const NEGLIGIBLE = 1e-7;

/** Nor does one below this share of the largest y: what is off the curve is then rounding, and weighs nothing up. */
const ROUNDING = 1e-12;

/** x spread less than this share of its range carries no slope: the local mean stands alone. */
const LEAST_SPREAD = 0.001;

export interface LowessOptions {
  /** share of the values that each local line rests on, above 0 and at most 1; two thirds by default */
  span?: number;
  /** rounds of robust re-weighting, a whole number from 0; 3 by default */
  rounds?: number;
}

/** Smooth curve through scattered points by robust, locally weighted lines (LOWESS), read at every x.
 *
 *  At each x a straight line is fitted to the ⌊span·n⌋ nearest points (at least two), weighted by the tricube of their
 *  distance over that of the farthest of them; its value there is the curve. Points far off the curve then lose weight by
 *  the bisquare of residual/(6·median |residual|), and the lines are fitted anew, `rounds` times.
 *  @param x  in any order, ties allowed; left unchanged
 *  @param y  same length as `x`; left unchanged
 *  @returns  the curve at each x, in the order given; NaN throughout with fewer than 3 points
 *  @throws RangeError when lengths differ, a number is not finite, or an option is out of range
 *  Source: Cleveland 1979, J. Am. Stat. Assoc. 74:829–836; guards as in his published program (netlib, go/lowess).
 *  Example: x = [1, 2, 3, 4], y = [2, 4, 6, 8] → [2, 4, 6, 8] */
export function lowess(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  { span = DEFAULT_SPAN, rounds = DEFAULT_ROUNDS }: LowessOptions = {},
): Float64Array {
  check(x, y, span, rounds);
  const n = x.length;
  if (n < 3) return new Float64Array(n).fill(Number.NaN);
  const reach = reachOfNearest(x, Math.min(n, Math.max(2, Math.floor(span * n + 1e-10))));
  const trust = new Float64Array(n).fill(1);
  let curve = localLines(x, y, reach, trust);
  const rounding = ROUNDING * Array.from(y).reduce((most, each) => Math.max(most, Math.abs(each)), 0);
  for (let round = 0; round < rounds; round++) {
    const off = curve.map((fitted, i) => Math.abs(y[i] - fitted));
    const middle = median(off);
    const mean = off.reduce((sum, each) => sum + each, 0) / n;
    if (middle <= Math.max(rounding, NEGLIGIBLE * mean)) break;
    for (let i = 0; i < n; i++) trust[i] = bisquare(off[i] / (OUTLYING * middle));
    curve = localLines(x, y, reach, trust);
  }
  return curve;
}

/** Distance from each x to the `nearest`-th of all, itself counted. */
function reachOfNearest(x: ArrayLike<number>, nearest: number): Float64Array {
  const distances = new Float64Array(x.length);
  return Float64Array.from(x, (here) => {
    for (let j = 0; j < distances.length; j++) distances[j] = Math.abs(x[j] - here);
    return distances.sort()[nearest - 1];
  });
}

function localLines(x: ArrayLike<number>, y: ArrayLike<number>, reach: Float64Array, trust: Float64Array) {
  const n = x.length;
  let [smallest, largest] = [x[0], x[0]];
  for (let i = 1; i < n; i++) {
    smallest = Math.min(smallest, x[i]);
    largest = Math.max(largest, x[i]);
  }
  const weights = new Float64Array(n);
  return reach.map((radius, i) => {
    let total = 0;
    let meanX = 0;
    for (let j = 0; j < n; j++) {
      weights[j] = trust[j] * tricube(Math.abs(x[j] - x[i]), radius);
      total += weights[j];
      meanX += weights[j] * x[j];
    }
    // every neighbour was judged an outlier: the point stands for itself
    if (!(total > 0)) return y[i];
    meanX /= total;
    let squares = 0;
    for (let j = 0; j < n; j++) squares += (weights[j] / total) * (x[j] - meanX) ** 2;
    const hasSpread = Math.sqrt(squares) > LEAST_SPREAD * (largest - smallest);
    const lean = hasSpread ? (x[i] - meanX) / squares : 0;
    let fitted = 0;
    for (let j = 0; j < n; j++) fitted += (weights[j] / total) * (1 + lean * (x[j] - meanX)) * y[j];
    return fitted;
  });
}

/** Weight of a point at a distance; with no reach at all only points at the very place count. */
function tricube(distance: number, radius: number): number {
  if (distance >= radius) return distance === 0 ? 1 : 0;
  const share = distance / radius;
  return (1 - share * share * share) ** 3;
}

const bisquare = (u: number): number => (u < 1 ? (1 - u * u) ** 2 : 0);

function check(x: ArrayLike<number>, y: ArrayLike<number>, span: number, rounds: number): void {
  if (x.length !== y.length) {
    throw new RangeError(`lowess: x and y must have the same length, got ${x.length} and ${y.length}`);
  }
  if (!(span > 0 && span <= 1)) throw new RangeError(`lowess: span must lie above 0 and at most at 1, got ${span}`);
  if (!(Number.isInteger(rounds) && rounds >= 0)) {
    throw new RangeError(`lowess: rounds must be a whole number of at least 0, got ${rounds}`);
  }
  for (let i = 0; i < x.length; i++) {
    if (!Number.isFinite(x[i])) throw new RangeError(`lowess: x[${i}] must be a finite number, got ${x[i]}`);
    if (!Number.isFinite(y[i])) throw new RangeError(`lowess: y[${i}] must be a finite number, got ${y[i]}`);
  }
}
