import { isoDate, parseIsoDate } from '@/lib/calendar/day';
import { FLAG, type FlagName } from '@/lib/series/daily-series';

/** What the days' address answers, see lib/store/station-days. */
export interface DaysAnswer {
  unit: string;
  dates: string[];
  values: (number | null)[];
  flags: number[];
  texts: string[];
}

/** Consecutive days from `first`, those outside the record missing. */
export interface DayColumns {
  /** day number of the first entry */
  first: number;
  values: Float64Array;
  flags: Uint8Array;
  texts: string[];
}

/** Lays an answer on the days first to last (day numbers, both included).
 *  @param factor  from the unit answered to the one shown */
export function dayColumns(answer: DaysAnswer | null, first: number, last: number, factor = 1): DayColumns {
  const length = last - first + 1;
  const columns: DayColumns = {
    first,
    values: new Float64Array(length).fill(Number.NaN),
    flags: new Uint8Array(length),
    texts: new Array<string>(length).fill(''),
  };
  if (!answer || answer.dates.length === 0) return columns;
  const offset = parseIsoDate(answer.dates[0]) - first;
  answer.values.forEach((value, i) => {
    const at = offset + i;
    if (at < 0 || at >= length) return;
    columns.values[at] = value === null ? Number.NaN : value * factor;
    columns.flags[at] = answer.flags[i];
    columns.texts[at] = answer.texts[i];
  });
  return columns;
}

export const DAY_FLAGS: readonly { name: FlagName; words: string }[] = [
  { name: 'provisional', words: 'provisional' },
  { name: 'estimated', words: 'estimated' },
  { name: 'ice', words: 'under ice' },
  { name: 'below-detection', words: 'below detection' },
  { name: 'suspect', words: 'suspect' },
  { name: 'rejected', words: 'rejected' },
];

export const hasFlag = (bits: number, name: FlagName): boolean => (bits & FLAG[name]) !== 0;

/** One day in words. Example: "1987-08-14: 0.412 m³/s; suspect; written A:e" */
export function dayWords(
  { first, flags, texts, values }: DayColumns,
  day: number,
  flowText: (value: number) => string,
) {
  const at = day - first;
  const named = DAY_FLAGS.filter(({ name }) => hasFlag(flags[at], name)).map(({ words }) => words);
  return [
    `${isoDate(day)}: ${Number.isNaN(values[at]) ? 'no value' : flowText(values[at])}`,
    named.join(', '),
    texts[at] && `written “${texts[at]}”`,
  ]
    .filter(Boolean)
    .join('; ');
}

/** Stretches of consecutive days for which `holds`, as day numbers, both included. */
export function stretchesOf(first: number, length: number, holds: (at: number) => boolean): [number, number][] {
  const found: [number, number][] = [];
  for (let at = 0; at < length; at++) {
    if (!holds(at)) continue;
    let end = at;
    while (end + 1 < length && holds(end + 1)) end++;
    found.push([first + at, first + end]);
    at = end;
  }
  return found;
}
