/** Bits of a word of the set of present slopes. */
const WORD = 32;

/** Theil–Sen slope of every window of one series: median of (x_b − x_a)/(t_b − t_a) over the pairs of values i to j, both
 *  included, at j·n + i; NaN where a window is too short.
 *
 *  The slopes of all pairs are put in order once. For each first value the windows grow by one value at a time; a bit a
 *  slope says which of them the window has, and the middle one is found by counting bits. So all windows together cost
 *  n³/6 bits set, and none of the slopes is computed or sorted twice.
 *  @param t       times, rising
 *  @param x       values, none missing, same length
 *  @param fewest  windows of fewer values are left out; at least 2
 *  @throws RangeError when lengths differ, times do not rise, a value is not finite, or fewest is below 2
 *  Source: as at `senSlope`, with which every cell agrees.
 *  Example: t = [1, 2, 4], x = [1, 2, 6], fewest 2 → 1 of values 0 to 1, 2 of 1 to 2, 5/3 of 0 to 2 */
export function windowSlopes(t: ArrayLike<number>, x: ArrayLike<number>, fewest: number): Float64Array {
  const n = x.length;
  if (t.length !== n) {
    throw new RangeError(`windowSlopes: t and x must have the same length, got ${t.length} and ${n}`);
  }
  if (!(Number.isInteger(fewest) && fewest >= 2)) {
    throw new RangeError(`windowSlopes: fewest must be a whole number of at least 2, got ${fewest}`);
  }
  const { sorted, place } = slopesInOrder(t, x);
  const medians = new Float64Array(n * n).fill(Number.NaN);
  const present = new Uint32Array(Math.ceil(sorted.length / WORD));
  for (let i = 0; i + fewest <= n; i++) {
    present.fill(0);
    for (let j = i + 1; j < n; j++) {
      for (let a = i; a < j; a++) {
        const at = place[a * n + j];
        present[at >>> 5] |= 1 << (at & 31);
      }
      const values = j - i + 1;
      if (values < fewest) continue;
      const pairs = (values * (values - 1)) / 2;
      const middle = (pairs - 1) >> 1;
      const first = nthPresent(present, middle);
      medians[j * n + i] = pairs % 2 ? sorted[first] : (sorted[first] + sorted[nextPresent(present, first)]) / 2;
    }
  }
  return medians;
}

/** The slopes of all pairs in rising order, and where each pair's is among them, at a·n + b. */
function slopesInOrder(t: ArrayLike<number>, x: ArrayLike<number>): { sorted: Float64Array; place: Uint32Array } {
  const n = x.length;
  const slopes = new Float64Array((n * (n - 1)) / 2);
  let next = 0;
  for (let a = 0; a < n; a++) {
    if (!Number.isFinite(x[a])) throw new RangeError(`windowSlopes: x[${a}] must be a finite number, got ${x[a]}`);
    if (!Number.isFinite(t[a]) || (a > 0 && t[a] <= t[a - 1])) {
      throw new RangeError(`windowSlopes: t must rise, got t[${a}] = ${t[a]}${a > 0 ? ` after ${t[a - 1]}` : ''}`);
    }
    // + 0: of −0 and 0, which are equal, the search below must find either
    for (let b = a + 1; b < n; b++) slopes[next++] = (x[b] - x[a]) / (t[b] - t[a]) + 0;
  }
  const sorted = slopes.slice().sort();
  const place = new Uint32Array(n * n);
  // equal slopes take the places of their stretch one after the other
  const taken = new Uint32Array(sorted.length);
  next = 0;
  for (let a = 0; a < n; a++) {
    for (let b = a + 1; b < n; b++) {
      const first = firstNotBelow(sorted, slopes[next++]);
      place[a * n + b] = first + taken[first]++;
    }
  }
  return { sorted, place };
}

/** Position of the first value that is not below `value`. */
function firstNotBelow(sorted: Float64Array, value: number): number {
  let from = 0;
  let to = sorted.length;
  while (from < to) {
    const middle = (from + to) >> 1;
    if (sorted[middle] < value) from = middle + 1;
    else to = middle;
  }
  return from;
}

/** Position of set bit number `count`, from 0. */
function nthPresent(present: Uint32Array, count: number): number {
  let left = count;
  let word = 0;
  for (let bits = bitCount(present[0]); left >= bits; bits = bitCount(present[word])) {
    left -= bits;
    word++;
  }
  let rest = present[word];
  for (; left > 0; left--) rest &= rest - 1;
  return word * WORD + lowestBit(rest);
}

/** Position of the first set bit after `position`. */
function nextPresent(present: Uint32Array, position: number): number {
  const after = position + 1;
  let word = after >>> 5;
  let rest = present[word] & (-1 << (after & 31));
  while (rest === 0) rest = present[++word];
  return word * WORD + lowestBit(rest);
}

const lowestBit = (bits: number): number => 31 - Math.clz32(bits & -bits);

function bitCount(bits: number): number {
  let sums = bits - ((bits >>> 1) & 0x55555555);
  sums = (sums & 0x33333333) + ((sums >>> 2) & 0x33333333);
  return Math.imul((sums + (sums >>> 4)) & 0x0f0f0f0f, 0x01010101) >>> 24;
}
