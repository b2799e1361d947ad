import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

/** Draws that depend on nothing but the seed: the same on every machine, in every thread, and in any division of labour. */
export interface RandomStream {
  /** a whole number 0 to n − 1, each as likely
   *  @throws RangeError when n is not a whole number of at least 1 */
  below(n: number): number;
  /** a number of 0 ≤ u < 1, in steps of 2^−32 */
  uniform(): number;
}

/** A stream of its own for each seed and label, so that work can be shared out without changing what anyone draws.
 *  @param seed    any text: a hash of the input and the terms
 *  @param labels  what the stream is for: ('span', station code), ('permutation', 17) */
export function randomStream(seed: string, ...labels: (string | number)[]): RandomStream {
  const generator = xoroshiro128plus(hash32(JSON.stringify([seed, ...labels])));
  return {
    below(n) {
      if (!(Number.isInteger(n) && n >= 1)) throw new RangeError(`randomStream: n must be at least 1, got ${n}`);
      return uniformInt(generator, 0, n - 1);
    },
    uniform: () => (generator.next() >>> 0) / 2 ** 32,
  };
}

/** Puts the numbers of a list in random order, each order as likely; in place.
 *  Source: Fisher & Yates 1938; Durstenfeld 1964, Commun. ACM 7:420. */
export function shuffle(list: Int32Array | number[], random: RandomStream): void {
  for (let i = list.length - 1; i > 0; i--) {
    const j = random.below(i + 1);
    const held = list[i];
    list[i] = list[j];
    list[j] = held;
  }
}

/** FNV-1a over UTF-16 code units, finished by a mixing step so that like texts give unlike numbers. */
function hash32(text: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193);
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) | 0;
}
