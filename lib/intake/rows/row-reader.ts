import { dateProblem, dayOfParts, fullYear, NO_CENTURY, NO_DAY, parseDate, parseMonth, parseWhole } from '../dates.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import { decodeText } from '../text-encoding.ts';
import type { Fields } from './fields.ts';

/** Takes the values of rows as they are read. */
export interface DaySink {
  /** @param station  number of the station, in order of appearance in the file */
  take(station: number, day: number, value: number, code: number, line: number): void;
}

/** Answer of a reader for a line between rows of data: a heading, a line of totals that is left out. */
export const NO_ROW_OF_DATA = '';

/** Reads rows that have been split into fields. */
export interface RowReader {
  /** @returns null when the row was taken (or does not count), else why it was not; NO_ROW_OF_DATA for a line that is none */
  read(bytes: Uint8Array, fields: Fields, line: number): string | null;
  /** Looks at a comment line between the rows. */
  comment?(text: string, line: number): void;
  /** The quick way, where a table has one: takes the line that starts at `from` without splitting it.
   *  @returns first byte of the next line; −1 when the line must be split and read */
  readPlain?(bytes: Uint8Array, from: number, limit: number, line: number): number;
}

/** Reads the date of a row, in one column or in three. */
export class DayReader {
  private readonly columns: readonly number[];
  private readonly firstYear: number;

  constructor(private readonly plan: TablePlan) {
    this.columns = plan.places.date;
    this.firstYear = plan.mapping.firstYear ?? NO_CENTURY;
  }

  /** Day number; below NO_DAY when the row names none. */
  day(bytes: Uint8Array, fields: Fields): number {
    const columns = this.columns;
    const { order } = this.plan.mapping.date;
    if (columns.length === 1) {
      return parseDate(bytes, fields.start[columns[0]], fields.end[columns[0]], order, this.firstYear);
    }
    const [first, second, third] = columns;
    const whole = (column: number) => parseWhole(bytes, fields.start[column], fields.end[column]);
    const month = (column: number) => parseMonth(bytes, fields.start[column], fields.end[column]);
    if (order === 'ymd') return dayOfParts(this.year(whole(first)), month(second), whole(third));
    if (order === 'dmy') return dayOfParts(this.year(whole(third)), month(second), whole(first));
    return dayOfParts(this.year(whole(third)), month(first), whole(second));
  }

  private year(written: number): number {
    const short = written >= 0 && written < 100 && this.firstYear !== NO_CENTURY;
    return short ? fullYear(written, this.firstYear) : written;
  }

  /** Why `day` answered below NO_DAY. */
  problem(day: number, bytes: Uint8Array, fields: Fields): string {
    const texts = this.columns.map((column) => textOf(bytes, fields, column));
    if (this.columns.length === 1) return dateProblem(day, texts[0]);
    const numeric = texts.every((text) => /^\d+$/.test(text));
    return dateProblem(numeric ? day : NO_DAY, texts.every((text) => text === '') ? '' : texts.join(' '));
  }
}

/** Text of a field, shortened for a message. */
export function textOf(bytes: Uint8Array, fields: Fields, column: number): string {
  if (column < 0 || column >= fields.count) return '';
  return decodeText(bytes, fields.start[column], Math.min(fields.end[column], fields.start[column] + 60));
}

/** Why a row of the wrong number of fields is not taken; null when the surplus is empty, or no more is needed. */
export function countProblem(bytes: Uint8Array, fields: Fields, plan: TablePlan): string | null {
  if (fields.unclosed) return 'a quoted field is not closed on its row';
  const { count } = fields;
  if (count === plan.fieldCount) return null;
  if (count < plan.fieldCount) {
    if (count >= plan.leastFields) return null;
    if (plan.mapping.layout === 'fixed-width') return 'the row ends before its last field: it is cut short';
    return `the row has ${count} of ${plan.fieldCount} fields: it is cut short or damaged`;
  }
  for (let at = plan.fieldCount; at < count; at++) {
    if (fields.end[at] > fields.start[at]) {
      const wanted = `${count} fields where ${plan.header ? 'the header has' : 'other rows have'} ${plan.fieldCount}`;
      return `the row has ${wanted} (${textOf(bytes, fields, at)})`;
    }
  }
  return null;
}

/** True when a row's field holds exactly these bytes. */
export function fieldIs(bytes: Uint8Array, fields: Fields, column: number, wanted: Uint8Array): boolean {
  const start = fields.start[column];
  if (column >= fields.count || fields.end[column] - start !== wanted.length) return false;
  for (let at = 0; at < wanted.length; at++) if (bytes[start + at] !== wanted[at]) return false;
  return true;
}

/** True when none of a row's fields holds anything: a line of delimiters, as spreadsheets leave behind. */
export function isEmptyRow(fields: Fields): boolean {
  for (let at = 0; at < fields.count; at++) if (fields.end[at] > fields.start[at]) return false;
  return true;
}
