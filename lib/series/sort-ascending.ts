/** From here on counting digits beats comparing values: 22,000 flows take 1.4 ms instead of 4. */
const WORTH_COUNTING = 512;

/** Digits of the two 32-bit halves of a key, least significant first: half (0 low, 1 high), shift, and 11 bits wide. */
const DIGITS = [
  [0, 0],
  [0, 11],
  [0, 22],
  [1, 0],
  [1, 11],
  [1, 22],
] as const;
const DIGIT_MASK = 0x7ff;
const SIGN_BIT = 1 << 31;

/** The values without NaN, in rising order, as a new array.
 *
 *  Long arrays go by a least-significant-digit radix sort on the bits of the numbers: for non-negative numbers the
 *  order of the bits is the order of the values; for negative ones all bits are turned over, for the others the sign
 *  bit alone. −0 sorts before 0. */
export function sortAscending(values: Float64Array): Float64Array {
  const sorted = withoutMissing(values);
  if (sorted.length < WORTH_COUNTING) return sorted.sort();

  const n = sorted.length;
  const words = new Int32Array(sorted.buffer);
  // Workers and servers this runs on are little-endian, as is the stored form: the low half comes first.
  for (let i = 0; i < n; i += 1) {
    const negative = words[2 * i + 1] < 0;
    words[2 * i] = negative ? ~words[2 * i] : words[2 * i];
    words[2 * i + 1] = negative ? ~words[2 * i + 1] : words[2 * i + 1] ^ SIGN_BIT;
  }
  let from: Int32Array<ArrayBuffer> = words;
  let to = new Int32Array(2 * n);
  const next = new Int32Array(DIGIT_MASK + 1);
  for (const [half, shift] of DIGITS) {
    next.fill(0);
    for (let i = half; i < 2 * n; i += 2) next[(from[i] >>> shift) & DIGIT_MASK] += 1;
    if (next[(from[half] >>> shift) & DIGIT_MASK] === n) continue; // all alike: nothing to move
    let place = 0;
    for (let digit = 0; digit <= DIGIT_MASK; digit += 1) {
      const count = next[digit];
      next[digit] = place;
      place += count;
    }
    for (let i = 0; i < 2 * n; i += 2) {
      const digit = (from[i + half] >>> shift) & DIGIT_MASK;
      const target = 2 * next[digit];
      next[digit] += 1;
      to[target] = from[i];
      to[target + 1] = from[i + 1];
    }
    [from, to] = [to, from];
  }
  for (let i = 0; i < n; i += 1) {
    const negative = from[2 * i + 1] >= 0;
    from[2 * i] = negative ? ~from[2 * i] : from[2 * i];
    from[2 * i + 1] = negative ? ~from[2 * i + 1] : from[2 * i + 1] ^ SIGN_BIT;
  }
  return new Float64Array(from.buffer, from.byteOffset, n);
}

/** The values that are not NaN, in their order, as a new array: a loop, for `filter` takes ten times as long. */
function withoutMissing(values: Float64Array): Float64Array<ArrayBuffer> {
  const present = new Float64Array(values.length);
  let count = 0;
  for (let i = 0; i < values.length; i += 1) {
    if (Number.isNaN(values[i])) continue;
    present[count] = values[i];
    count += 1;
  }
  return present.slice(0, count);
}
