/** A value rounded to `digits` significant decimal digits, so that equal flows written or summed in different ways
 *  compare as equal: 0.1 × 7 / 7 becomes 0.1 again. NaN stays NaN.
 *  Example: roundSignificant(0.30000000000000004, 10) → 0.3 */
export function roundSignificant(value: number, digits: number): number {
  return value === 0 ? 0 : Number(value.toPrecision(digits));
}

/** Significant digits of n-day means: everything that is compared is compared at these. */
export const MEAN_DIGITS = 10;
