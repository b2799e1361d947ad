import { type SlopeRanks, slopeRanks } from './slope-ranks.ts';

/** Share of replicates in which a trend that is called detectable is found. */
const POWER = 0.8;

/** What is asked of every replicate of a series without trend. */
export interface ReplicateSlopes {
  /** Reads the next replicate.
   *  @param x    one entry a year, NaN in the years that the series lacks
   *  @returns    the Theil–Sen slope */
  read(x: Float64Array): number;
  /** Of the replicate read last: the smallest slope that, laid on it, makes the test reject; every other replicate is
   *  asked after a rise and the others after a fall. NaN when no slope does. */
  rejected(): number;
  /** mean of the values of the replicate read last */
  mean(): number;
}

/** Theil–Sen slope of replicates of a series, and the slope that a Mann–Kendall test would find in each.
 *
 *  A slope b laid on x turns pairs: S(b) is the number of pairs less twice those whose slope is below −b, and grows with b.
 *  So the smallest b at which S(b) reaches `critical` is minus the slope at rank ⌊(pairs − critical)/2⌋ from below, and
 *  towards the other side the one at that rank from above: no search over b is needed.
 *  @param length    years from the first to the last
 *  @param present   places of the years that have a value, rising; at least two
 *  @param critical  smallest S that the test rejects (see criticalS); Infinity when none is
 *  @throws RangeError as slopeRanks, or when `critical` is not positive
 *  Source: duality of Kendall's test and the slopes: Sen 1968, J. Am. Stat. Assoc. 63:1379–1389. */
export function replicateSlopes(length: number, present: ArrayLike<number>, critical: number): ReplicateSlopes {
  if (!(critical > 0)) throw new RangeError(`replicateSlopes: critical must be positive, got ${critical}`);
  const n = present.length;
  const pairs = (n * (n - 1)) / 2;
  const middle = pairs % 2 ? [(pairs - 1) / 2] : [pairs / 2 - 1, pairs / 2];
  const rank = Math.floor((pairs - critical) / 2);
  const detects = rank >= 0;
  const rise = ranked(length, present, middle, detects ? rank : middle[0]);
  const fall = ranked(length, present, middle, detects ? pairs - 1 - rank : middle[0]);
  let current = fall;
  return {
    read(x) {
      current = current === rise ? fall : rise;
      current.ranks.find(x, current.found);
      return (current.found[current.first] + current.found[current.first + middle.length - 1]) / 2;
    },
    rejected() {
      if (!detects) return Number.NaN;
      const slope = current.found[current.side];
      return current === rise ? -slope : slope;
    },
    mean: () => current.ranks.mean(),
  };
}

interface Ranked {
  ranks: SlopeRanks;
  found: Float64Array;
  /** where in `found` the middle begins, and where the rank at the side is */
  first: number;
  side: number;
}

function ranked(length: number, present: ArrayLike<number>, middle: readonly number[], side: number): Ranked {
  const all = [...new Set([...middle, side])].sort((a, b) => a - b);
  return {
    ranks: slopeRanks(length, present, all),
    found: new Float64Array(all.length),
    first: all.indexOf(middle[0]),
    side: all.indexOf(side),
  };
}

/** The slope that is found in four replicates of five.
 *  @param rejected  of each replicate; NaN when no slope is found: then there is no answer
 *  @returns NaN without an answer; never below 0 */
export function detectableSlope(rejected: Float64Array): number {
  if (rejected.length === 0 || rejected.some(Number.isNaN)) return Number.NaN;
  const sorted = rejected.slice().sort();
  return Math.max(0, sorted[Math.ceil(POWER * sorted.length) - 1]);
}
