/** Sums finer than this share of the largest are rounding, not record. */
const ROUNDING = 1e-8;
/** A step is believed down to this share of the largest sum; below it, it may be what rounding left. */
const FINEST = 1e-5;

/** The step in which a station's flows were written down, estimated from its n-day minima alone.
 *  The sum of n flows is a whole number of steps, so the step is the greatest common measure of the sums. It is an
 *  estimate: where flows are written finer when low, it is the finest step met; where no two sums share a measure
 *  (mixed units, computed flows) there is none.
 *  @param minima  m³/s
 *  @param days    n of the n-day means
 *  @returns       m³/s; NaN when there is no sum above zero or no common measure
 *  Example: [0.06, 0.04, 0.02], 1 day → 0.02 */
export function recordingStep(minima: readonly number[], days: number): number {
  const sums = minima.map((minimum) => Math.abs(minimum) * days).filter((sum) => sum > 0);
  const largest = Math.max(0, ...sums);
  const measure = sums.reduce((shared, sum) => commonMeasure(shared, sum, largest * ROUNDING), 0);
  return measure > largest * FINEST ? measure : Number.NaN;
}

/** Euclid's algorithm on real numbers: what is below `rounding` counts as 0. */
function commonMeasure(a: number, b: number, rounding: number): number {
  let larger = Math.max(a, b);
  let smaller = Math.min(a, b);
  while (smaller > rounding) {
    const rest = larger % smaller;
    larger = smaller;
    smaller = Math.min(rest, larger - rest);
  }
  return larger;
}
