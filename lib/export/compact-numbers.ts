/** Digits of a number in a dense answer: more than a chart can show. */
const SIGNIFICANT_DIGITS = 4;

/** Numbers for a dense JSON answer: 4 significant digits, null where there is none.
 *  Example: [0.123456, NaN] → [0.1235, null] */
export function compactNumbers(values: ArrayLike<number>): (number | null)[] {
  return Array.from(values, (value) => (Number.isFinite(value) ? Number(value.toPrecision(SIGNIFICANT_DIGITS)) : null));
}
