import { type DatedValues, detrended } from './detrend.ts';
import { varianceOfS } from './mann-kendall.ts';
import type { RandomStream } from './random.ts';

/** Fewer values make no blocks to draw from. */
const FEWEST_VALUES = 5;

export const BLOCK_REPLICATES = 2000;

/** Factor by which serial correlation changes Var S, by resampling the detrended series in moving blocks.
 *
 *  A replicate strings together blocks of ⌈n^{1/3}⌉ successive values, each start as likely, to the length of the series;
 *  the factor is the variance of S over the replicates, over the variance of S without serial correlation (with the ties
 *  of the detrended series). Gaps are closed: a block runs from usable year to usable year.
 *  S of a replicate is a sum over its blocks and pairs of blocks, and these sums are made once and looked up.
 *  @param random      a stream of this series' own
 *  @param replicates  at least 2
 *  @returns           1 for fewer than 5 values, or none that differ about the trend
 *  @throws RangeError when lengths differ, years do not rise, or `replicates` is too small
 *  Source: Künsch 1989, Ann. Stat. 17:1217–1241 (moving blocks, length of order n^{1/3}); for this test Önöz & Bayazit
 *  2012, Hydrol. Process. 26:3552–3560. */
export function blockBootstrapFactor(
  series: DatedValues,
  random: RandomStream,
  replicates: number = BLOCK_REPLICATES,
): number {
  if (!(Number.isInteger(replicates) && replicates >= 2)) {
    throw new RangeError(`blockBootstrapFactor: replicates must be a whole number from 2, got ${replicates}`);
  }
  const rest = detrended(series, 'blockBootstrapFactor');
  const n = rest.length;
  const { variance } = varianceOfS(rest);
  if (n < FEWEST_VALUES || variance === 0) return 1;

  const length = blockLength(n);
  const starts = n - length + 1;
  const blocks = Math.ceil(n / length);
  const lastLength = n - (blocks - 1) * length;
  const whole = signSums(rest, length, length);
  const last = signSums(rest, length, lastLength);
  const drawn = new Int32Array(blocks);
  let sum = 0;
  let squares = 0;
  for (let replicate = 0; replicate < replicates; replicate++) {
    let s = 0;
    for (let block = 0; block < blocks; block++) {
      const start = random.below(starts);
      const sums = block === blocks - 1 ? last : whole;
      s += sums.within[start];
      for (let before = 0; before < block; before++) s += sums.between[drawn[before] + start];
      drawn[block] = start * starts;
    }
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

/** Sums of signs of later less earlier value, in a block cut to `laterLength`, and between a whole block and one so cut.
 *  Blocks are known by where they start; `between` stands at start of the earlier × starts + start of the later. */
function signSums(x: Float64Array, length: number, laterLength: number) {
  const starts = x.length - length + 1;
  const within = new Int32Array(starts);
  const between = new Int32Array(starts * starts);
  // of one value against the block that starts at each place, then summed over the values of the earlier block
  const ofValue = new Int32Array(x.length * starts);
  for (let i = 0; i < x.length; i++) {
    for (let start = 0; start < starts; start++) {
      let sum = 0;
      for (let j = start; j < start + laterLength; j++) sum += Math.sign(x[j] - x[i]);
      ofValue[i * starts + start] = sum;
    }
  }
  for (let earlier = 0; earlier < starts; earlier++) {
    for (let i = earlier; i < earlier + length; i++) {
      for (let later = 0; later < starts; later++) between[earlier * starts + later] += ofValue[i * starts + later];
    }
    for (let i = earlier; i < earlier + laterLength; i++) {
      for (let j = i + 1; j < earlier + laterLength; j++) within[earlier] += Math.sign(x[j] - x[i]);
    }
  }
  return { within, between };
}
