import { csvLine } from '../intake/csv-line.ts';

/** What a cell may hold. Null and NaN are empty: missing is never 0 and never a word. */
export type Cell = string | number | boolean | null;

/** A column of a table: its name in the header, what it means, and where a row's value comes from. */
export interface Column<Row> {
  name: string;
  /** in words, for the metadata beside the file */
  description: string;
  /** W3C CSV on the Web datatype */
  datatype: 'string' | 'integer' | 'number' | 'boolean' | 'date';
  unit?: string;
  value: (row: Row) => Cell;
}

/** Digits carried by every written number. Flows are rounded to ten digits before they are compared, so that a file
 *  with ten says all that the program knows. */
const SIGNIFICANT_DIGITS = 10;

/** A number as text with `.` decimals and up to 10 significant digits; empty for NaN, infinities and null.
 *  Example: 0.1 + 0.2 → "0.3" */
export function numberText(value: number | null): string {
  if (value === null || !Number.isFinite(value)) return '';
  if (Number.isInteger(value)) return Object.is(value, -0) ? '0' : String(value);
  return String(Number(value.toPrecision(SIGNIFICANT_DIGITS)));
}

function cellText(cell: Cell): string {
  if (cell === null) return '';
  return typeof cell === 'number' ? numberText(cell) : String(cell);
}

/** A table as CSV text: UTF-8 without a mark, one header row, RFC 4180 quoting, no comment lines. */
export function csvTable<Row>(columns: readonly Column<Row>[], rows: Iterable<Row>): string {
  let text = csvLine(columns.map((column) => column.name));
  for (const row of rows) text += csvLine(columns.map((column) => cellText(column.value(row))));
  return text;
}
