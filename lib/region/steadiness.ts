import { windowScores } from '../statistics/window-scores.ts';
import { FEWEST_WINDOW_YEARS } from './window-types.ts';

/** Whether the years chosen matter: how many windows say what the whole period says. */
export interface Steadiness {
  /** pairs of a start and an end year with at least 15 usable years between */
  windows: number;
  /** share of these whose S has the sign of the whole period's; null where that is 0 or there is no window */
  share: number | null;
}

/** Steadiness of a trend: over every start year and end year of the period with at least 15 usable years from the one to
 *  the other, the share whose Mann–Kendall S has the sign that it has over all usable years. The whole period is one of
 *  them. Windows overlap, so they are no independent evidence.
 *  @param series  usable years, rising, and a value for each, none missing
 *  @param period  [first, last] years that a window may start and end in; null: from the first usable year to the last.
 *                 A start in a year that is not usable is a window too, the same as that from the next usable year
 *  @throws RangeError when lengths differ or a value is not a finite number */
export function steadinessOf(
  { years, values }: { years: readonly number[]; values: ArrayLike<number> },
  period: readonly [number, number] | null,
): Steadiness {
  const n = years.length;
  if (values.length !== n) {
    throw new RangeError(`steadinessOf: years and values must have the same length, got ${n} and ${values.length}`);
  }
  if (n < FEWEST_WINDOW_YEARS) return { windows: 0, share: null };
  const { s } = windowScores(values);
  const sign = Math.sign(s[(n - 1) * n]);
  const [first, last] = period ?? [years[0], years[n - 1]];
  let windows = 0;
  let agreeing = 0;
  for (let i = 0; i + FEWEST_WINDOW_YEARS <= n; i++) {
    const starts = years[i] - (i === 0 ? first - 1 : years[i - 1]);
    for (let j = i + FEWEST_WINDOW_YEARS - 1; j < n; j++) {
      const count = starts * ((j === n - 1 ? last + 1 : years[j + 1]) - years[j]);
      windows += count;
      if (Math.sign(s[j * n + i]) === sign) agreeing += count;
    }
  }
  return { windows, share: sign === 0 ? null : agreeing / windows };
}
