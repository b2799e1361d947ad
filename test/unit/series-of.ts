import { dayNumber } from '../../lib/calendar/day.ts';
import { type DailySeries, FLAG, type FlagName } from '../../lib/series/daily-series.ts';

/** A record that begins on a calendar day, with every day's flow given or computed from its index. */
export function seriesOf(
  start: [year: number, month: number, day: number],
  flows: ArrayLike<number> | { days: number; flow: (i: number) => number },
): DailySeries {
  const values =
    'days' in flows ? Float64Array.from({ length: flows.days }, (_, i) => flows.flow(i)) : Float64Array.from(flows);
  return { firstDay: dayNumber(...start), values, flags: new Uint8Array(values.length) };
}

/** The same record with the days of [from, to] (indices, both included) missing. */
export function withGap(series: DailySeries, from: number, to: number): DailySeries {
  return { ...series, values: series.values.slice().fill(Number.NaN, from, to + 1) };
}

/** The same record with a flag on the days of [from, to] (indices, both included). */
export function withFlag(series: DailySeries, flag: FlagName, from: number, to: number): DailySeries {
  const flags = series.flags.slice();
  for (let i = from; i <= to; i += 1) flags[i] |= FLAG[flag];
  return { ...series, flags };
}
