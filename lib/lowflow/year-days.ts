import { type Season, seasonSpan } from '../calendar/season.ts';
import { type DailySeries, FLAG, type FlagName } from '../series/daily-series.ts';
import { flagBitsPresent } from '../series/usable-flow.ts';
import { valuedYears } from './valued-years.ts';

/** What a record's low-flow years hold, one entry a year from that of its first to that of its last value. */
export interface YearDays {
  /** low-flow year of the first entry; null when the record holds no value */
  firstYear: number | null;
  /** days of the year (or season) with a value, whatever their flags */
  values: Uint16Array;
  /** days with a value that carry each flag; a day may carry several */
  flagged: Record<FlagName, Uint16Array>;
}

const FLAG_NAMES = Object.keys(FLAG) as FlagName[];

/** Counts days by low-flow year (or its season): the same years that annualMinima has.
 *  @param yearStart  first month of the low-flow year, 1–12 */
export function yearDays(series: DailySeries, { yearStart, season }: { yearStart: number; season: Season }): YearDays {
  const { firstDay, values, flags } = series;
  const range = valuedYears(series, yearStart);
  const years = range === null ? 0 : range.last - range.first + 1;
  const counted = new Uint16Array(years);
  const flagged = Object.fromEntries(FLAG_NAMES.map((name) => [name, new Uint16Array(years)]));
  const present = flagBitsPresent(flags);
  const names = FLAG_NAMES.filter((name) => (present & FLAG[name]) !== 0);
  for (let i = 0; range !== null && i < years; i++) {
    const span = seasonSpan(range.first + i, yearStart, season);
    const from = Math.max(0, span.first - firstDay);
    const to = Math.min(values.length, span.last + 1 - firstDay);
    let days = 0;
    for (let day = from; day < to; day++) if (!Number.isNaN(values[day])) days++;
    counted[i] = days;
    for (const name of names) flagged[name][i] = countFlag(series, FLAG[name], from, to);
  }
  return { firstYear: range?.first ?? null, values: counted, flagged: flagged as Record<FlagName, Uint16Array> };
}

function countFlag({ values, flags }: DailySeries, bit: number, from: number, to: number): number {
  let days = 0;
  for (let day = from; day < to; day++) if ((flags[day] & bit) !== 0 && !Number.isNaN(values[day])) days++;
  return days;
}
