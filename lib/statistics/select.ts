/** Moves values about until `x[k]` is what it would be if `x` were sorted: none before it is larger, none after it
 *  smaller. Takes time in proportion to the length, where sorting takes several times as long.
 *  @param x     values without NaN; **reordered in place**, so hand in an array of your own
 *  @param k     position from 0, within `from`..`to`
 *  @param from  first and last position of the stretch to look in, when the rest is known to lie right; the whole by
 *  @param to    default
 *  @throws RangeError when `k` is no position of the stretch
 *  Source: Hoare 1961, Algorithm 65: find, Commun. ACM 4:321–322, with the median of three as the pivot, and with
 *  N. Lomuto's partition (Bentley 1986, Programming Pearls, column 10) written without a branch on the comparison: the
 *  processor guesses wrongly every second time in random values, and that took longer than all the rest.
 *  Example: x = [5, 1, 4], k = 1 → x[1] is 4 */
export function selectInPlace(x: Float64Array, k: number, from = 0, to = x.length - 1): void {
  if (!(Number.isInteger(k) && k >= from && k <= to)) {
    throw new RangeError(`selectInPlace: k must be a position ${from}..${to}, got ${k}`);
  }
  let first = from;
  let last = to;
  while (last - first >= SORTED_BELOW) {
    const pivot = middleOf(x[first], x[(first + last) >> 1], x[last]);
    let rest = first;
    for (let i = first; i <= last; i++) {
      const value = x[i];
      x[i] = x[rest];
      x[rest] = value;
      rest += Number(value < pivot);
    }
    if (k < rest) {
      last = rest - 1;
      continue;
    }
    if (rest > first) {
      first = rest;
      continue;
    }
    // The pivot is the smallest: those equal to it are parted from the rest, or many equal values would take for ever.
    for (let i = first; i <= last; i++) {
      const value = x[i];
      x[i] = x[rest];
      x[rest] = value;
      rest += Number(value <= pivot);
    }
    if (k < rest) return;
    first = rest;
  }
  sortStretch(x, first, last);
}

/** A few values are sorted sooner than parted. */
const SORTED_BELOW = 12;

function sortStretch(x: Float64Array, first: number, last: number): void {
  for (let i = first + 1; i <= last; i++) {
    const value = x[i];
    let j = i - 1;
    for (; j >= first && x[j] > value; j--) x[j + 1] = x[j];
    x[j + 1] = value;
  }
}

function middleOf(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
