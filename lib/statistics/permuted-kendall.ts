import { randomStream, shuffle } from './random.ts';
import { noTrendBits, noteTrend, type TrendBits, wordsFor } from './trend-bits.ts';

/** Words are counted eight at a time. */
const WORDS_AT_ONCE = 8;

/** Permutations held at once: those of 60 times take 57 kB, which stays near the processor. */
const PERMUTATIONS_AT_ONCE = 256;

export interface PermutedKendallTask {
  /** each over the same times, NaN where missing */
  series: readonly ArrayLike<number>[];
  /** for each series the smallest S at which it counts as rising, see criticalS */
  critical: ArrayLike<number>;
  /** how many permutations */
  replicates: number;
  /** permutations depend on this alone: parts of the series may be given in calls of their own */
  seed: string;
}

/** Mann–Kendall's S of many series under the same random orders of their times, told as falling, rising or neither.
 *
 *  A missing value goes along with its time, so that what series share in a time they share in every order. Each pair of
 *  times is one bit: whether the later one has the larger value (of a series), and which comes first (in an order). S is
 *  the number of pairs that can be told less twice those in which the two bits disagree.
 *  @throws RangeError when series differ in length, or `replicates` is no whole number of at least 0
 *  Sources: Mann 1945; permutations common to all sites as in Douglas, Vogel & Kroll 2000, J. Hydrol. 240:90–105, without
 *  replacement; counting bits by carry-save adders: Harley & Seal, in Warren 2013, Hacker's Delight, section 5–1. */
export function permutedKendall({ series, critical, replicates, seed }: PermutedKendallTask): TrendBits {
  if (!(Number.isInteger(replicates) && replicates >= 0)) {
    throw new RangeError(`permutedKendall: replicates must be a whole number, got ${replicates}`);
  }
  const bits = noTrendBits(series.length, replicates);
  if (series.length === 0) return bits;
  const times = series[0].length;
  const words = Math.ceil(wordsFor((times * (times - 1)) / 2) / WORDS_AT_ONCE) * WORDS_AT_ONCE;
  const pairs = series.map((values, i) => {
    if (values.length !== times) {
      throw new RangeError(
        `permutedKendall: series[${i}] must have ${times} values like the first, got ${values.length}`,
      );
    }
    return pairBits(values, words);
  });
  const orders = new Uint32Array(Math.min(replicates, PERMUTATIONS_AT_ONCE) * words);
  for (let from = 0; from < replicates; from += PERMUTATIONS_AT_ONCE) {
    const count = Math.min(PERMUTATIONS_AT_ONCE, replicates - from);
    orders.fill(0);
    for (let b = 0; b < count; b++) setOrder(orders, b * words, permutation(times, seed, from + b));
    pairs.forEach(({ larger, known, tellable }, i) => {
      for (let b = 0; b < count; b++) {
        const s = tellable - 2 * disagreeing(larger, known, orders, b * words, words);
        noteTrend(bits, i, from + b, s, critical[i]);
      }
    });
  }
  return bits;
}

/** The place of each time in a random order: the same for the same seed and number. */
function permutation(times: number, seed: string, replicate: number): Int32Array {
  const places = Int32Array.from({ length: times }, (_, time) => time);
  shuffle(places, randomStream(seed, 'permutation', replicate));
  return places;
}

/** One bit a pair (i, j), i < j: whether j comes after i. */
function setOrder(orders: Uint32Array, at: number, places: Int32Array): void {
  let pair = 0;
  for (let i = 0; i < places.length; i++) {
    for (let j = i + 1; j < places.length; j++, pair++) {
      if (places[j] > places[i]) orders[at + (pair >>> 5)] |= 1 << (pair & 31);
    }
  }
}

/** One bit a pair (i, j), i < j: whether the value at j is larger, and whether the two can be told apart at all. */
function pairBits(values: ArrayLike<number>, words: number) {
  const larger = new Uint32Array(words);
  const known = new Uint32Array(words);
  let tellable = 0;
  let pair = 0;
  for (let i = 0; i < values.length; i++) {
    for (let j = i + 1; j < values.length; j++, pair++) {
      const rises = values[j] > values[i];
      if (!rises && !(values[j] < values[i])) continue;
      tellable++;
      known[pair >>> 5] |= 1 << (pair & 31);
      if (rises) larger[pair >>> 5] |= 1 << (pair & 31);
    }
  }
  return { larger, known, tellable };
}

/** Bits that are known and differ. Three words of one weight become one of that weight and a carry of twice it, so that
 *  only one word in eight has its bits counted one by one.
 *  Source: the carry-save adders of Harley and Seal, in Warren 2013, Hacker's Delight, 2nd ed., section 5–1. */
function disagreeing(larger: Uint32Array, known: Uint32Array, orders: Uint32Array, at: number, words: number): number {
  let [ones, twos, fours, eights] = [0, 0, 0, 0];
  for (let w = 0; w < words; w += WORDS_AT_ONCE) {
    const o = at + w;
    const a = known[w] & (larger[w] ^ orders[o]);
    const b = known[w + 1] & (larger[w + 1] ^ orders[o + 1]);
    const c = known[w + 2] & (larger[w + 2] ^ orders[o + 2]);
    const d = known[w + 3] & (larger[w + 3] ^ orders[o + 3]);
    const e = known[w + 4] & (larger[w + 4] ^ orders[o + 4]);
    const f = known[w + 5] & (larger[w + 5] ^ orders[o + 5]);
    const g = known[w + 6] & (larger[w + 6] ^ orders[o + 6]);
    const h = known[w + 7] & (larger[w + 7] ^ orders[o + 7]);
    let half = ones ^ a;
    const twosA = (ones & a) | (half & b);
    ones = half ^ b;
    half = ones ^ c;
    const twosB = (ones & c) | (half & d);
    ones = half ^ d;
    half = twos ^ twosA;
    const foursA = (twos & twosA) | (half & twosB);
    twos = half ^ twosB;
    half = ones ^ e;
    const twosC = (ones & e) | (half & f);
    ones = half ^ f;
    half = ones ^ g;
    const twosD = (ones & g) | (half & h);
    ones = half ^ h;
    half = twos ^ twosC;
    const foursB = (twos & twosC) | (half & twosD);
    twos = half ^ twosD;
    half = fours ^ foursA;
    eights += bitCount((fours & foursA) | (half & foursB));
    fours = half ^ foursB;
  }
  return 8 * eights + 4 * bitCount(fours) + 2 * bitCount(twos) + bitCount(ones);
}

/** Number of bits set in a word of 32. */
function bitCount(word: number): number {
  let bits = word - ((word >>> 1) & 0x55555555);
  bits = (bits & 0x33333333) + ((bits >>> 2) & 0x33333333);
  return Math.imul((bits + (bits >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
