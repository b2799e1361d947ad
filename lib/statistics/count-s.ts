/** Mann–Kendall's S of values in time order, quickly, for thousands of short series: each value is put among those before
 *  it, which counts how many of them are smaller.
 *  @param values  NaN where missing (passed over)
 *  @param sorted  working space, at least as long; overwritten
 *  Source: S as in Mann 1945; inversions by insertion, Knuth 1998, The Art of Computer Programming 3, section 5.2.1. */
export function countS(values: Float64Array, sorted: Float64Array): number {
  let n = 0;
  let s = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (Number.isNaN(value)) continue;
    let at = n;
    while (at > 0 && sorted[at - 1] > value) {
      sorted[at] = sorted[at - 1];
      at--;
    }
    sorted[at] = value;
    let equal = 0;
    while (equal < at && sorted[at - 1 - equal] === value) equal++;
    // at − equal are smaller, n − at are larger
    s += at - equal - (n - at);
    n++;
  }
  return s;
}
