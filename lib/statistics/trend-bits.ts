/** Which replicates make which series fall, and which make it rise: one bit a series and replicate, so that any group of
 *  series can be counted afterwards. */
export interface TrendBits {
  replicates: number;
  series: number;
  /** series i has the words i·words to (i + 1)·words − 1, words = ⌈replicates/32⌉; replicate b is bit b mod 32 of word ⌊b/32⌋ */
  falling: Uint32Array;
  rising: Uint32Array;
}

const WORD_BITS = 32;

/** Words of 32 bits that hold so many bits. */
export const wordsFor = (bits: number): number => Math.ceil(bits / WORD_BITS);

/** Bits of so many series and replicates, none of them set. */
export function noTrendBits(series: number, replicates: number): TrendBits {
  const words = series * wordsFor(replicates);
  return { replicates, series, falling: new Uint32Array(words), rising: new Uint32Array(words) };
}

/** Notes that a replicate makes a series fall (S ≤ −critical) or rise (S ≥ critical); in place. */
export function noteTrend(bits: TrendBits, series: number, replicate: number, s: number, critical: number): void {
  if (s < critical && s > -critical) return;
  const word = series * wordsFor(bits.replicates) + (replicate >>> 5);
  (s < 0 ? bits.falling : bits.rising)[word] |= 1 << (replicate & 31);
}

/** Bits of several parts of the series, one after the other.
 *  @throws RangeError when the parts have unlike numbers of replicates */
export function joinTrendBits(parts: readonly TrendBits[]): TrendBits {
  const replicates = parts[0]?.replicates ?? 0;
  const unlike = parts.find((part) => part.replicates !== replicates);
  if (unlike)
    throw new RangeError(`joinTrendBits: all parts must have ${replicates} replicates, got ${unlike.replicates}`);
  const joined = noTrendBits(
    parts.reduce((sum, { series }) => sum + series, 0),
    replicates,
  );
  let at = 0;
  for (const { falling, rising } of parts) {
    joined.falling.set(falling, at);
    joined.rising.set(rising, at);
    at += falling.length;
  }
  return joined;
}

/** In each replicate, how many of some series fall, and how many rise.
 *  @param members  places of the series, each at most once */
export function countsByReplicate(
  { replicates, falling, rising }: TrendBits,
  members: readonly number[],
): { falling: Uint32Array; rising: Uint32Array } {
  return { falling: countsOf(falling, replicates, members), rising: countsOf(rising, replicates, members) };
}

function countsOf(bits: Uint32Array, replicates: number, members: readonly number[]): Uint32Array {
  const words = wordsFor(replicates);
  const counts = new Uint32Array(replicates);
  for (const series of members) {
    for (let word = 0; word < words; word++) {
      // most bits are 0: go from one that is set to the next
      for (let rest = bits[series * words + word]; rest !== 0; rest &= rest - 1) {
        counts[word * WORD_BITS + 31 - Math.clz32(rest & -rest)]++;
      }
    }
  }
  return counts;
}
