import { parseWhole } from './dates.ts';
import type { TablePlan } from './recognise/table-plan.ts';
import type { Fields } from './rows/fields.ts';

/** Answer where a row says no time of day. */
export const NO_TIME = -1;

const isDigit = (byte: number): boolean => byte >= 48 && byte <= 57;

/** Seconds since midnight of a clock time in bytes: `09:15`, `9:15:00`, `24:00`, `0915`, `12:30 PM`; what stands behind it
 *  (a fraction, `Z`, `+01:00`) is not used: the day of a value is that of the clock by which it was written.
 *  @returns NO_TIME when the bytes do not begin with one */
function secondOfDay(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  while (at < end && !isDigit(bytes[at])) at++;
  const parts = [0, 0, 0];
  let part = 0;
  const first = at;
  for (; part < 3; part++) {
    const from = at;
    while (at < end && at - from < 2 && isDigit(bytes[at])) {
      parts[part] = parts[part] * 10 + bytes[at] - 48;
      at++;
    }
    if (at === from) break;
    if (bytes[at] === 58 && at < end) at++;
    else if (!(at < end && isDigit(bytes[at]))) {
      part++;
      break;
    }
  }
  if (at === first) return NO_TIME;
  const [hour, minute, second] = withNoon(parts, bytes, at, end);
  if (hour > 24 || minute > 59 || second > 60) return NO_TIME;
  return hour * 3600 + minute * 60 + second;
}

/** Hours by the clock of twenty-four, where `AM` or `PM` stands behind. */
function withNoon(parts: number[], bytes: Uint8Array, from: number, end: number): number[] {
  let at = from;
  while (at < end && bytes[at] === 32) at++;
  const letter = at + 1 < end && (bytes[at + 1] | 32) === 109 ? bytes[at] | 32 : 0;
  if (letter !== 97 && letter !== 112) return parts;
  return [(parts[0] % 12) + (letter === 112 ? 12 : 0), parts[1], parts[2]];
}

/** Where the rows of a table say their time of day: behind the date in its own field, or in a column of its own. */
export class TimeOfDay {
  private readonly date: number;
  private readonly column: number;
  /** column of the minutes beside one of hours; −1 where there is none */
  private readonly minutes: number;

  constructor(plan: TablePlan) {
    this.date = plan.places.date.length === 1 ? plan.places.date[0] : -1;
    this.column = timeColumn(plan);
    this.minutes = this.column < 0 ? -1 : headed(plan, MINUTES);
  }

  /** Seconds since midnight of a row that has been split; NO_TIME where it says none. */
  of(bytes: Uint8Array, fields: Fields): number {
    const { column, date } = this;
    if (column >= 0) return this.inColumns(bytes, fields);
    if (date < 0 || date >= fields.count) return NO_TIME;
    const end = fields.end[date];
    for (let at = fields.start[date] + 6; at < end; at++) {
      if (bytes[at] === 84 || bytes[at] === 32) return secondOfDay(bytes, at + 1, end);
    }
    return NO_TIME;
  }

  private inColumns(bytes: Uint8Array, fields: Fields): number {
    const { column, minutes } = this;
    if (column >= fields.count) return NO_TIME;
    const time = secondOfDay(bytes, fields.start[column], fields.end[column]);
    if (time === NO_TIME || minutes < 0 || minutes >= fields.count) return time;
    const minute = parseWhole(bytes, fields.start[minutes], fields.end[minutes]);
    return minute >= 0 && minute < 60 ? time + minute * 60 : time;
  }
}

const HEADING = /^(time|hour|hours|hh:?mm(:?ss)?|hh|hr|local ?time|time of day|uhrzeit|zeit|stunde|heure|hora)$/;
const MINUTES = /^(minutes?|min|minuten?|minuto)$/;
const CLOCK = /^([01]?\d|2[0-4]):[0-5]\d(:[0-5]\d(\.\d+)?)?(Z|[+-]\d\d:?\d\d)?( ?[AP]M)?$/i;

/** The column of clock times: that with such a heading, else one in which every previewed row has a clock time; −1 where
 *  there is none. */
function timeColumn(plan: TablePlan): number {
  const { header, preview } = plan;
  const named = headed(plan, HEADING);
  if (named >= 0) return named;
  const rows = header === null ? preview : preview.slice(1);
  for (let at = 0; at < plan.fieldCount; at++) {
    if (isFree(plan, at) && rows.length > 0 && rows.every((row) => CLOCK.test(row[at] ?? ''))) return at;
  }
  return -1;
}

/** The column with such a heading that holds nothing else; −1 where there is none. */
function headed(plan: TablePlan, pattern: RegExp): number {
  const plain = (name: string) => name.trim().toLowerCase().replaceAll('_', ' ');
  return plan.header?.findIndex((name, at) => isFree(plan, at) && pattern.test(plain(name))) ?? -1;
}

function isFree({ places }: TablePlan, column: number): boolean {
  return ![...places.date, places.station, places.value, places.flag].includes(column);
}
