/** Units in which flows arrive. mm/d is a depth over the drainage area. */
export const FLOW_UNITS = ['m3/s', 'L/s', 'ft3/s', 'ML/d', 'mm/d'] as const;
export type FlowUnit = (typeof FLOW_UNITS)[number];

export const LAYOUTS = ['long', 'wide', 'agency-tab', 'whitespace', 'fixed-width'] as const;
export type Layout = (typeof LAYOUTS)[number];

/** Where a field stands: a column of delimited text (position from 0, or header name), or characters of a line
 *  (from 0, end exclusive). */
export type FieldPlace = { column: number | string } | { slice: [number, number] };

/** How a file is to be read: as recognised, or as a person gave it by `--mapping` or on the screen. */
export interface Mapping {
  layout: Layout;
  station: { from: 'file-name' } | { from: 'column'; column: number | string } | { from: 'given'; code: string };
  /** columns in the order that `order` names; one column holds a whole date */
  date: { columns: (number | string | [number, number])[]; order: 'ymd' | 'dmy' | 'mdy' };
  /** null in wide layouts, where every other column is a station */
  value: FieldPlace | null;
  flag: FieldPlace | null;
  unit: FlowUnit | null;
  /** text that means "no value", beyond the usual ones */
  missing: string[];
  decimal: '.' | ',';
  /** delimited layouts only */
  delimiter?: string;
}

/** A row that was not taken, with its place in the file. */
export interface RejectedRow {
  /** line number in the file, from 1 */
  row: number;
  text: string;
  reason: string;
}

/** Counts of one station in one file, values as imported (in the file's unit). */
export interface StationReport {
  code: string;
  values: number;
  missing: number;
  /** ISO dates of the first and last row with a value; null when there is none */
  first: string | null;
  last: string | null;
  zeros: number;
  min: number | null;
  max: number | null;
  /** stretches of days between first and last value without a value, and the longest of them in days */
  gaps: number;
  longestGapDays: number;
  duplicates: number;
}

/** What became of one file. Every reader ends in one. */
export interface ImportReport {
  file: string;
  layout: Layout;
  unit: FlowUnit;
  mapping: Mapping;
  rows: number;
  accepted: number;
  rejectedTotal: number;
  /** where all rejected rows can be had as CSV; null when there are none */
  rejectedFile: string | null;
  /** at most 1,000 */
  rejected: RejectedRow[];
  stations: StationReport[];
  sha256: string;
  warnings: string[];
}

/** A file that cannot be taken: names the file, the row where there is one, the value and the remedy. */
export class IntakeError extends Error {
  override name = 'IntakeError';
  constructor(
    readonly problem: {
      file: string;
      /** line number from 1 */
      row?: number;
      value?: string;
      /** what is wrong */
      message: string;
      /** what to do about it */
      remedy: string;
      /** machine-readable: the screen asks for what is missing */
      needs?: 'unit' | 'station' | 'date-order' | 'mapping' | 'area' | 'revise';
    },
  ) {
    const place = problem.row === undefined ? problem.file : `${problem.file}, row ${problem.row}`;
    const value = problem.value === undefined ? '' : ` (“${problem.value}”)`;
    super(`${place}: ${problem.message}${value}. ${problem.remedy}`);
  }
}

/** One station's values of one file: consecutive days from `firstDay`, as written. */
export interface StagedPart {
  code: string;
  unit: FlowUnit;
  firstDay: number;
  /** in `unit`, NaN = missing */
  values: Float64Array;
  /** index into `codeList` a day; 255 = the file has no row for this day */
  codes: Uint8Array;
  codeList: { text: string; bits: number }[];
}
