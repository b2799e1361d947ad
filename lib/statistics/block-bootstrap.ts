import { varianceOfS } from './mann-kendall.ts';
import { presentValues } from './present-values.ts';
import type { RandomStream } from './random.ts';

/** Fewer values make no blocks to draw from. */
const FEWEST_VALUES = 5;

export const BLOCK_REPLICATES = 2000;

/** Factor by which serial correlation changes Var S, by resampling the series in moving blocks.
 *
 *  A replicate strings together blocks of ⌈n^{1/3}⌉ successive values, each start as likely, to the length of the series;
 *  the factor is the variance of S over the replicates, over the variance of S without serial correlation. The trend
 *  stays in the series: what a trend leaves carries over too little, and tests by it find too much. Blocks run from value
 *  to value, over gaps.
 *  S of a replicate is a sum over its blocks and pairs of blocks, and these sums are made once and looked up.
 *  @param x           values in time order, NaN where missing (left out); left unchanged
 *  @param random      a stream of this series' own
 *  @param replicates  at least 2
 *  @returns           1 for fewer than 5 values, or when all are equal
 *  @throws RangeError when a value is infinite, or `replicates` is too small
 *  Source: Künsch 1989, Ann. Stat. 17:1217–1241 (moving blocks, length of order n^{1/3}); for this test Önöz & Bayazit
 *  2012, Hydrol. Process. 26:3552–3560. */
export function blockBootstrapFactor(
  x: ArrayLike<number>,
  random: RandomStream,
  replicates: number = BLOCK_REPLICATES,
): number {
  if (!(Number.isInteger(replicates) && replicates >= 2)) {
    throw new RangeError(`blockBootstrapFactor: replicates must be a whole number from 2, got ${replicates}`);
  }
  const values = presentValues(x, 'blockBootstrapFactor');
  const n = values.length;
  const { variance } = varianceOfS(values);
  if (n < FEWEST_VALUES || variance === 0) return 1;

  const length = blockLength(n);
  const starts = n - length + 1;
  const blocks = Math.ceil(n / length);
  const lastLength = n - (blocks - 1) * length;
  const whole = signSums(values, length, length);
  const cut = signSums(values, length, lastLength);
  const drawn = new Int32Array(blocks);
  let sum = 0;
  let squares = 0;
  for (let replicate = 0; replicate < replicates; replicate++) {
    for (let block = 0; block < blocks; block++) drawn[block] = random.below(starts);
    const s = sumOfBlocks(drawn, whole, cut, starts);
    sum += s;
    squares += s * s;
  }
  const resampled = (squares - (sum * sum) / replicates) / (replicates - 1);
  return resampled > 0 ? resampled / variance : 1;
}

/** ⌈n^{1/3}⌉ */
export function blockLength(n: number): number {
  return Math.ceil(Math.cbrt(n));
}

interface SignSums {
  within: Int32Array;
  against: Int32Array;
}

/** S of the replicate whose blocks start where `drawn` says, the last one cut; whole numbers of 32 bits. */
function sumOfBlocks(drawn: Int32Array, whole: SignSums, cut: SignSums, starts: number): number {
  const last = drawn.length - 1;
  const { within, against } = whole;
  let s = 0;
  for (let block = 0; block < last; block++) {
    const row = Math.imul(drawn[block], starts);
    s = (s + within[drawn[block]]) | 0;
    for (let before = 0; before < block; before++) s = (s + against[row + drawn[before]]) | 0;
  }
  const row = Math.imul(drawn[last], starts);
  s = (s + cut.within[drawn[last]]) | 0;
  for (let before = 0; before < last; before++) s = (s + cut.against[row + drawn[before]]) | 0;
  return s;
}

/** Sums of signs of later less earlier value: in a block cut to `laterLength`, and of one so cut against a whole block
 *  before it. Blocks are known by where they start; `against` stands at later start × starts + earlier start. */
function signSums(x: Float64Array, length: number, laterLength: number): SignSums {
  const starts = x.length - length + 1;
  const within = new Int32Array(starts);
  const against = new Int32Array(starts * starts);
  for (let later = 0; later < starts; later++) {
    const row = later * starts;
    const end = later + laterLength;
    for (let j = later; j < end; j++) {
      const value = x[j];
      for (let i = later; i < j; i++) within[later] += sign(value, x[i]);
      // a sum over a window of `length` that moves along
      let windowSum = 0;
      for (let i = 0; i < length; i++) windowSum += sign(value, x[i]);
      against[row] += windowSum;
      for (let earlier = 1; earlier < starts; earlier++) {
        windowSum += sign(value, x[earlier + length - 1]) - sign(value, x[earlier - 1]);
        against[row + earlier] += windowSum;
      }
    }
  }
  return { within, against };
}

/** 1, 0 or −1, without a branch that could be guessed wrong. */
const sign = (later: number, earlier: number): number => Number(later > earlier) - Number(later < earlier);
