import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';
import { extremeOf, stretchesAbove } from './stretches.ts';

/** Stretches of days with a flow below zero. They are real where tides or backwater turn the river round, and a fault
 *  everywhere else: a person decides.
 *  @returns detail: `lowest`, m³/s */
export function negativeFlows({ firstDay, values }: DailySeries): Finding[] {
  return stretchesAbove(values, 0, -1).map(([from, to]) => ({
    ...{ kind: 'negative', firstDay: firstDay + from, lastDay: firstDay + to, days: to - from + 1 },
    detail: { lowest: extremeOf(values, [from, to], -1) },
  }));
}
