/** Sums over every full window of `days` consecutive values of a stretch, without ever subtracting.
 *
 *  The stretch is cut into blocks of one window's length. A window then is the end of one block and the beginning of
 *  the next, so the running sums towards a block's end and from a block's beginning give every window by one
 *  addition, whatever its length. Because nothing is taken away again, a dry window after a wet one sums to exactly 0,
 *  and a missing value makes NaN of the windows that hold it and of no other.
 *  @param values  NaN where missing; left unchanged
 *  @param from    index of the first value of the stretch
 *  @param length  number of values in the stretch
 *  @param days    window length, a whole number of at least 1
 *  @param out     receives the sum of the window that starts at `from + i` as element i
 *  @returns       the number of windows, max(0, length − days + 1) */
export function windowSums(
  values: Float64Array,
  from: number,
  length: number,
  days: number,
  out: Float64Array,
): number {
  const windows = Math.max(0, length - days + 1);
  for (let block = 0; block < windows; block += days) {
    const next = from + block + days;
    const starts = Math.min(days, windows - block);
    let sum = 0;
    for (let i = days - 1; i >= starts; i -= 1) sum += values[from + block + i];
    for (let i = starts - 1; i >= 0; i -= 1) {
      sum += values[from + block + i];
      out[block + i] = sum;
    }
    sum = 0;
    for (let i = 1; i < starts; i += 1) {
      sum += values[next + i - 1];
      out[block + i] += sum;
    }
  }
  return windows;
}

/** Mean of every full window of `days` consecutive days, placed on the last day of the window.
 *
 *  A window that holds a missing day gives NaN, so no mean rests on fewer than `days` values. Windows are summed anew:
 *  a dry week after a wet one averages exactly 0.
 *  @param flow  daily flows, NaN where missing; left unchanged
 *  @param days  window length, a whole number of at least 1
 *  @returns     same length and unit as `flow`; the first `days − 1` entries are NaN
 *  @throws RangeError when `days` is not a whole number of at least 1
 *  Example: [3, 1, 2], 2 days → [NaN, 2, 1.5] */
export function rollingMean(flow: Float64Array, days: number): Float64Array {
  checkDays('rollingMean', days);
  const means = new Float64Array(flow.length).fill(Number.NaN);
  const windows = windowSums(flow, 0, flow.length, days, means.subarray(Math.min(days - 1, flow.length)));
  for (let i = 0; i < windows; i += 1) means[days - 1 + i] /= days;
  return means;
}

/** @throws RangeError when `days` is not a whole number of at least 1 */
export function checkDays(caller: string, days: number): void {
  if (!Number.isInteger(days) || days < 1) {
    throw new RangeError(`${caller}: days must be a whole number of at least 1, got ${days}`);
  }
}
