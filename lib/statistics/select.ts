/** Moves values about until `x[k]` is what it would be if `x` were sorted: none before it is larger, none after it
 *  smaller. Takes time in proportion to the length, where sorting takes several times as long.
 *  @param x     values without NaN; **reordered in place**, so hand in an array of your own
 *  @param k     position from 0, within `from`..`to`
 *  @param from  first and last position of the stretch to look in, when the rest is known to lie right; the whole by
 *  @param to    default
 *  @throws RangeError when `k` is no position of the stretch
 *  Source: Hoare 1961, Algorithm 65: find, Commun. ACM 4:321–322, with the median of three as the pivot.
 *  Example: x = [5, 1, 4], k = 1 → x[1] is 4 */
export function selectInPlace(x: Float64Array, k: number, from = 0, to = x.length - 1): void {
  if (!(Number.isInteger(k) && k >= from && k <= to)) {
    throw new RangeError(`selectInPlace: k must be a position ${from}..${to}, got ${k}`);
  }
  let first = from;
  let last = to;
  while (first < last) {
    const pivot = middleOf(x[first], x[(first + last) >> 1], x[last]);
    let i = first;
    let j = last;
    while (i <= j) {
      while (x[i] < pivot) i++;
      while (x[j] > pivot) j--;
      if (i > j) break;
      const moved = x[i];
      x[i++] = x[j];
      x[j--] = moved;
    }
    if (k <= j) last = j;
    else if (k >= i) first = i;
    else return;
  }
}

function middleOf(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
