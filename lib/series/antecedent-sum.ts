/** A sum is given while no more than this share of its days is missing. */
const MOST_MISSING = 0.05;

/** The longest stretch that is summed: two years. */
export const MOST_ANTECEDENT_DAYS = 731;

/** Sum of a daily depth over the days that end with a given one, itself among them. Up to a twentieth of the days may be
 *  missing: the sum of the others is then stretched to all of them.
 *  @param values   of consecutive days from `firstDay` on, NaN where missing; left unchanged
 *  @param lastDay  day number
 *  @param days     how many, 1 to 731
 *  @returns        in the unit of `values`; NaN where more is missing, days outside the record counted
 *  @throws RangeError when `days` or `lastDay` is out of range
 *  Example: values [1, 2, 4] from day 10 on, lastDay 12, days 2 → 6 */
export function antecedentSum(
  { firstDay, values }: { firstDay: number; values: Float64Array },
  lastDay: number,
  days: number,
): number {
  if (!(Number.isInteger(days) && days >= 1 && days <= MOST_ANTECEDENT_DAYS)) {
    throw new RangeError(`antecedentSum: days must be a whole number 1–${MOST_ANTECEDENT_DAYS}, got ${days}`);
  }
  if (!Number.isInteger(lastDay)) throw new RangeError(`antecedentSum: lastDay must be a day number, got ${lastDay}`);
  const to = Math.min(values.length, lastDay + 1 - firstDay);
  let sum = 0;
  let present = 0;
  for (let i = Math.max(0, lastDay + 1 - days - firstDay); i < to; i++) {
    if (Number.isNaN(values[i])) continue;
    sum += values[i];
    present++;
  }
  return days - present > MOST_MISSING * days ? Number.NaN : (sum * days) / present;
}
