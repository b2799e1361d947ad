import { selectInPlace } from './select.ts';

/** How quickly what is expected of the next replicate follows the ones before. */
const MEMORY = 1 / 16;

/** How far about an expected slope is looked, in mean misses of such expectations: about 3.6 standard ones. */
const REACH = 4.5;

/** A stretch that had to be widened so often holds everything the next time. */
const MOST_WIDENINGS = 3;

/** Slopes are parted about an expected one before it is selected, where that leaves out so large a share of them. */
const WORTH_PARTING = 0.25;

/** Finds slopes of given ranks in replicate after replicate of one series. */
export interface SlopeRanks {
  /** number of pairs, and so of slopes */
  pairs: number;
  /** Writes the slopes that stand at `ranks` among the slopes of all pairs in rising order.
   *  @param x    one entry a year, `length` long; NaN in the years that the series lacks, and only there
   *  @param out  as long as `ranks` */
  find(x: Float64Array, out: Float64Array): void;
  /** mean of the values that were looked at last */
  mean(): number;
}

/** Order statistics of the slopes (x_j − x_i)/(j − i) of all pairs, for many series over the same years: what senSlope
 *  reads, for a simulation that reads it a million times.
 *
 *  Exact; quick in that few slopes are looked at closely. Where those at `ranks` should lie is told from the least-squares
 *  slope, the scatter about it, and how far that was off in the replicates before. One walk over the pairs counts what is
 *  below that stretch and takes what is within it, without a branch on the comparison; the ranks are selected from these.
 *  If one lies outside after all, the walk is done again over a wider stretch. Nothing is allocated on the way.
 *  @param length   years from the first to the last
 *  @param present  places of the years that have a value, rising; at least two
 *  @param ranks    positions from 0 among the slopes, rising; at least one
 *  @throws RangeError when `present` or `ranks` leave their range
 *  Source: Theil 1950; Sen 1968, J. Am. Stat. Assoc. 63:1379–1389; selection between expected limits after Floyd & Rivest
 *  1975, Commun. ACM 18:165–172.
 *  Example: slopeRanks(3, [0, 1, 2], [1]).find([1, 2, 6], out) writes 2.5, the middle one of 1, 2.5 and 4 */
export function slopeRanks(length: number, present: ArrayLike<number>, ranks: readonly number[]): SlopeRanks {
  const n = present.length;
  const pairs = (n * (n - 1)) / 2;
  checkRanks(length, present, ranks, pairs);
  const line = leastSquares(present);
  const walk = pairWalk(length, pairs);
  const [lowest, highest] = [ranks[0], ranks[ranks.length - 1]];
  // of each rank, in scatters: where its slope is expected above the least-squares slope, and the mean miss of that
  const perRank = scattersPerRank(present);
  const expected = Float64Array.from(ranks, (rank) => (rank - (pairs - 1) / 2) * perRank);
  const miss = new Float64Array(ranks.length).fill((Math.sqrt((n * (n - 1) * (2 * n + 5)) / 18) * perRank) / 8);

  // ends of the stretch in which the slope of rank i should lie
  const lowEnd = (i: number): number => line.slope + line.scatter * (expected[i] - REACH * miss[i]);
  const highEnd = (i: number): number => line.slope + line.scatter * (expected[i] + REACH * miss[i]);

  function takeStretch(x: Float64Array): void {
    let low = lowEnd(0);
    let high = highEnd(ranks.length - 1);
    for (let widenings = 0; ; widenings++) {
      if (widenings > MOST_WIDENINGS || !(low <= high)) {
        low = Number.NEGATIVE_INFINITY;
        high = Number.POSITIVE_INFINITY;
      }
      walk.take(x, low, high);
      const tooHigh = walk.below > lowest;
      const tooLow = walk.below + walk.taken <= highest;
      if (!tooHigh && !tooLow) return;
      const wider = line.scatter * REACH * (miss[0] + miss[ranks.length - 1]) * 3 ** widenings;
      if (tooHigh) low -= wider;
      if (tooLow) high += wider;
    }
  }

  /** Brings the slope of rank i to its place among those taken, when all before `from` are where they belong. */
  function place(i: number, from: number): void {
    const { within, taken } = walk;
    const at = ranks[i] - walk.below;
    let first = from;
    let end = taken;
    const whole = highEnd(ranks.length - 1) - lowEnd(0);
    if (highEnd(ranks.length - 1) - highEnd(i) > WORTH_PARTING * whole) {
      const above = part(within, first, end, highEnd(i));
      if (at < above) end = above;
    }
    if (lowEnd(i) - lowEnd(0) > WORTH_PARTING * whole) {
      const above = part(within, first, end, lowEnd(i));
      if (at >= above) first = above;
    }
    selectInPlace(within, at, first, end - 1);
  }

  function learn(out: Float64Array): void {
    const { slope, scatter } = line;
    if (!(scatter > 0)) return;
    for (let i = 0; i < ranks.length; i++) {
      const off = (out[i] - slope) / scatter - expected[i];
      expected[i] += off * MEMORY;
      miss[i] += (Math.abs(off) - miss[i]) * MEMORY;
    }
  }

  return {
    pairs,
    find(x, out) {
      line.fit(x);
      takeStretch(x);
      let from = 0;
      for (let i = 0; i < ranks.length; i++) {
        const at = ranks[i] - walk.below;
        if (i > 0 && at === from) smallestFirst(walk.within, from, walk.taken);
        else place(i, from);
        out[i] = walk.within[at];
        from = at + 1;
      }
      learn(out);
    },
    mean: () => line.mean,
  };
}

/** The slopes of all pairs that lie within a stretch, and how many lie below it. */
function pairWalk(length: number, pairs: number) {
  const reciprocal = Float64Array.from({ length }, (_, lag) => 1 / lag);
  // One more: each slope is written, and kept by not writing over it.
  const within = new Float64Array(pairs + 1);
  return {
    within,
    below: 0,
    taken: 0,
    take(x: Float64Array, low: number, high: number): void {
      let below = 0;
      let taken = 0;
      // Two earlier values at a time, which share each later one. NaN is neither below nor within; numbers stand in place of
      // branches, which would be guessed wrongly.
      for (let i = 0; i < length - 1; i += 2) {
        const [a, b] = [x[i], x[i + 1]];
        const step = b - a;
        within[taken] = step;
        const stepBelow = Number(step < low);
        below = (below + stepBelow) | 0;
        taken = (taken + Number(step <= high) - stepBelow) | 0;
        for (let j = i + 2, lag = 2; j < length; j++, lag++) {
          const later = x[j];
          const ofA = (later - a) * reciprocal[lag];
          within[taken] = ofA;
          const belowA = Number(ofA < low);
          taken = (taken + Number(ofA <= high) - belowA) | 0;
          const ofB = (later - b) * reciprocal[lag - 1];
          within[taken] = ofB;
          const belowB = Number(ofB < low);
          taken = (taken + Number(ofB <= high) - belowB) | 0;
          below = (below + belowA + belowB) | 0;
        }
      }
      this.below = below;
      this.taken = taken;
    },
  };
}

/** Least-squares slope over the years that have a value, and the standard deviation about it. */
function leastSquares(present: ArrayLike<number>) {
  const places = Int32Array.from(present);
  const n = places.length;
  const mean = places.reduce((sum, place) => sum + place, 0) / n;
  const times = Float64Array.from(places, (place) => place - mean);
  const squares = times.reduce((sum, time) => sum + time * time, 0);
  return {
    slope: 0,
    scatter: 0,
    mean: 0,
    fit(x: Float64Array): void {
      let sum = 0;
      let sumSquares = 0;
      let products = 0;
      // about the first value, so that a high level does not drown the scatter
      const level = x[places[0]];
      for (let i = 0; i < n; i++) {
        const value = x[places[i]] - level;
        sum += value;
        sumSquares += value * value;
        products += value * times[i];
      }
      this.mean = level + sum / n;
      this.slope = products / squares;
      this.scatter = Math.sqrt(Math.max(0, (sumSquares - (sum * sum) / n - this.slope * products) / n));
    },
  };
}

/** How far apart slopes of neighbouring ranks are in the middle, in scatters: for values scattered normally about a line
 *  there are 1/(2√π) Σ lag slopes per scatter. A first guess, which replicates then mend. */
function scattersPerRank(present: ArrayLike<number>): number {
  let lags = 0;
  for (let i = 0; i < present.length; i++) {
    for (let j = i + 1; j < present.length; j++) lags += present[j] - present[i];
  }
  return (2 * Math.sqrt(Math.PI)) / lags;
}

/** Moves the values below `pivot` to the front of x[from] to x[to − 1]. @returns where the others begin */
function part(x: Float64Array, from: number, to: number, pivot: number): number {
  let rest = from;
  for (let i = from; i < to; i++) {
    const value = x[i];
    x[i] = x[rest];
    x[rest] = value;
    rest += Number(value < pivot);
  }
  return rest;
}

/** Puts the smallest of x[from] to x[to − 1] at `from`. */
function smallestFirst(x: Float64Array, from: number, to: number): void {
  let smallest = from;
  for (let i = from + 1; i < to; i++) if (x[i] < x[smallest]) smallest = i;
  const value = x[smallest];
  x[smallest] = x[from];
  x[from] = value;
}

function checkRanks(length: number, present: ArrayLike<number>, ranks: readonly number[], pairs: number): void {
  if (present.length < 2)
    throw new RangeError(`slopeRanks: present must name at least 2 places, got ${present.length}`);
  for (let i = 0; i < present.length; i++) {
    if (!(present[i] > (i > 0 ? present[i - 1] : -1) && present[i] < length)) {
      throw new RangeError(`slopeRanks: present must rise within 0..${length - 1}, got ${present[i]} at place ${i}`);
    }
  }
  if (ranks.length === 0) throw new RangeError('slopeRanks: ranks must hold at least one rank, got none');
  ranks.forEach((rank, i) => {
    if (!(Number.isInteger(rank) && rank < pairs && rank > (i > 0 ? ranks[i - 1] : -1))) {
      throw new RangeError(`slopeRanks: ranks must rise within 0..${pairs - 1}, got ${rank} at place ${i}`);
    }
  });
}
