/** Sums finer than this share of the largest are rounding, not record. */
const ROUNDING = 1e-8;
/** A step is believed down to this share of the largest sum; below it, it may be what rounding left. */
const FINEST = 1e-5;

/** Steps that people write flows in: 1, 2, 2.5 or 5 of some decimal place, in m³/s (or L/s) or in ft³/s. */
const ROUND_STEPS = [1, 2, 2.5, 5, 10];
const FLOW_UNITS_M3S = [1, 0.028316846592];

/** The step in which a station's flows were written down, estimated from its n-day minima alone.
 *  The sum of n flows is a whole number of steps, so the step is the greatest common measure of the sums. Where each
 *  low held the same flow for n days that measure is n steps: then the sums' n-th part is a round number, the measure
 *  itself is not, and the former is taken. An estimate in any case: where flows are written finer when low, it is the
 *  finest step met; where no two sums share a measure (mixed units, computed flows) there is none.
 *  @param minima  m³/s
 *  @param days    n of the n-day means
 *  @returns       m³/s; NaN when fewer than two different flows above zero were met, or they have no common measure
 *  Example: [0.06, 0.04, 0.02], 1 day → 0.02 */
export function recordingStep(minima: readonly number[], days: number): number {
  const sums = minima.map((minimum) => Math.abs(minimum) * days).filter((sum) => sum > 0);
  // one flow alone has no difference to another
  if (new Set(sums).size < 2) return Number.NaN;
  const largest = Math.max(...sums);
  const measure = sums.reduce((shared, sum) => commonMeasure(shared, sum, largest * ROUNDING), 0);
  if (!(measure > largest * FINEST)) return Number.NaN;
  return !isRoundStep(measure) && isRoundStep(measure / days) ? measure / days : measure;
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

function isRoundStep(step: number): boolean {
  return FLOW_UNITS_M3S.some((unit) => {
    const inUnit = step / unit;
    const leading = inUnit / 10 ** Math.floor(Math.log10(inUnit));
    return ROUND_STEPS.some((round) => Math.abs(leading - round) < 1e-4);
  });
}
