import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';

/** A ratio of two successive days counts as a jump beyond this multiple of the record's percentile. */
const JUMP_FACTOR = 5;
const PERCENTILE = 0.9999;
/** Ratios that stand above the percentile at least, as in a record of 60 years: in a shorter one the percentile would
 *  be the largest ratio itself, or the second, and one or two jumps would hide each other. */
const AT_LEAST_ABOVE = 3;
/** Fewer pairs of days than these say nothing of what is usual. */
const LEAST_PAIRS = 365;
/** A jump and one back within so many days are one finding: what lies between them is at fault. */
const LONGEST_SPIKE_DAYS = 31;

/** Day-to-day ratios beyond 5 times the record's own 99.99th percentile: a slipped decimal point, a day of another
 *  station. Rises and falls are judged apart, each as a ratio above 1; only days with flow have one, and the percentile is
 *  the order statistic below which 99.99 % of all ratios lie, with at least three above it.
 *  @returns one finding for a jump and its way back, over the days between them, else for the day after the jump; detail:
 *           `before` and `value`, m³/s on both sides of the (first) jump, its `ratio`, and the `limit` it went beyond */
export function jumps({ firstDay, values }: DailySeries): Finding[] {
  const limits = limitsOf(values);
  if (limits === null) return [];
  const jumped: number[] = [];
  for (let day = 1; day < values.length; day++) {
    const ratio = values[day] / values[day - 1];
    if ((ratio > limits.rise || ratio < 1 / limits.fall) && values[day - 1] > 0 && values[day] > 0) jumped.push(day);
  }
  const found: Finding[] = [];
  for (let i = 0; i < jumped.length; i++) {
    const day = jumped[i];
    const [before, value] = [values[day - 1], values[day]];
    const rises = value > before;
    const next = jumped[i + 1];
    const goesBack =
      next !== undefined && next - day <= LONGEST_SPIKE_DAYS && values[next] > values[next - 1] !== rises;
    const last = goesBack ? next - 1 : day;
    if (goesBack) i++;
    found.push({
      ...{ kind: 'jump', firstDay: firstDay + day, lastDay: firstDay + last, days: last - day + 1 },
      detail: {
        before,
        value,
        ratio: rises ? value / before : before / value,
        limit: rises ? limits.rise : limits.fall,
      },
    });
  }
  return found;
}

/** The largest ratios that are still taken for the river's own; null for a record too short to tell. */
function limitsOf(values: Float64Array): { rise: number; fall: number } | null {
  let pairs = 0;
  for (let day = 1; day < values.length; day++) if (values[day] > 0 && values[day - 1] > 0) pairs++;
  if (pairs < LEAST_PAIRS) return null;
  const above = Math.max(AT_LEAST_ABOVE, pairs - Math.floor(PERCENTILE * pairs));
  const rises = new Float64Array(above + 1);
  const falls = new Float64Array(above + 1);
  for (let day = 1; day < values.length; day++) {
    if (!(values[day] > 0 && values[day - 1] > 0)) continue;
    const ratio = values[day] / values[day - 1];
    if (ratio > rises[above]) keepLargest(rises, ratio);
    else if (1 / ratio > falls[above]) keepLargest(falls, 1 / ratio);
  }
  // A river that never rises has no ratio above 1.
  return { rise: JUMP_FACTOR * Math.max(1, rises[above]), fall: JUMP_FACTOR * Math.max(1, falls[above]) };
}

/** Puts a ratio into its place among the largest, largest first; the smallest of them falls out. */
function keepLargest(largest: Float64Array, ratio: number): void {
  let place = largest.length - 1;
  for (; place > 0 && largest[place - 1] < ratio; place--) largest[place] = largest[place - 1];
  largest[place] = ratio;
}
