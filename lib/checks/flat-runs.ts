import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';

/** Equal values in a row that make a flat run. */
export const FLAT_DAYS = 10;

/** Stretches of at least 10 consecutive days of one and the same value other than zero: a stuck float, a gap filled by
 *  hand. Where flows are written in coarse steps, low water makes them too, and the share of the record's days that lie
 *  in such runs then tells so.
 *  @returns detail: `value`, m³/s; `share`, of the record's days with a value that lie in flat runs, 0 to 1 */
export function flatRuns({ firstDay, values }: DailySeries): Finding[] {
  const found: Finding[] = [];
  let inRuns = 0;
  let valued = 0;
  for (let from = 0; from < values.length; ) {
    const value = values[from];
    let end = from + 1;
    // A missing day equals nothing, not even another one.
    while (end < values.length && values[end] === value) end++;
    const days = end - from;
    if (!Number.isNaN(value)) valued += days;
    if (days >= FLAT_DAYS && value !== 0) {
      inRuns += days;
      const span = { firstDay: firstDay + from, lastDay: firstDay + end - 1 };
      found.push({ kind: 'flat', ...span, days, detail: { value } });
    }
    from = end;
  }
  const share = inRuns / valued;
  for (const { detail } of found) detail.share = share;
  return found;
}
