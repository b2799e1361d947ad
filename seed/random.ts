import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

/** A stream of random numbers that is the same for the same seed and purpose, whatever other streams were drawn. */
export interface RandomStream {
  /** uniform in [0, 1) */
  uniform(): number;
  /** uniform in [low, high) */
  between(low: number, high: number): number;
  /** a whole number in 0..count − 1 */
  below(count: number): number;
  /** standard normal */
  normal(): number;
  /** exponential with mean 1 */
  exponential(): number;
}

const TWO_TO_32 = 2 ** 32;

/** A seed of its own for every purpose: FNV-1a over the seed number and the words that name the purpose. */
function seedFor(seed: number, purpose: readonly (string | number)[]): number {
  let hash = 0x811c9dc5;
  for (const character of [seed, ...purpose].join('/')) {
    hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193);
  }
  // A last stirring, so that neighbouring names give unlike seeds.
  hash = Math.imul(hash ^ (hash >>> 15), 0x2c1b3c6d);
  return (hash ^ (hash >>> 13)) | 0;
}

/** The stream for a purpose, named by words and numbers. */
export function randomStream(seed: number, ...purpose: (string | number)[]): RandomStream {
  const generator = xoroshiro128plus(seedFor(seed, purpose));
  const uniform = () => (generator.next() >>> 0) / TWO_TO_32;
  return {
    uniform,
    between: (low, high) => low + (high - low) * uniform(),
    below: (count) => Math.floor(count * uniform()),
    // Box–Muller; 1 − u keeps the logarithm finite.
    normal: () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform()),
    exponential: () => -Math.log(1 - uniform()),
  };
}
