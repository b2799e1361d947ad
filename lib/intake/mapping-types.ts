import type { FlagName } from '../series/daily-series.ts';
import type { Quantity, Unit } from '../series/quantities.ts';

/** How the days lie in a file. `month-rows`: a row a month with a column for each day of it; `day-rows`: a row a day of the
 *  month with a column for each month, in blocks of a year. The last three are documents, whose places are not by column. */
export const LAYOUTS = [
  ...(['long', 'wide', 'agency-tab', 'whitespace', 'fixed-width', 'month-rows', 'day-rows'] as const),
  ...(['waterml-2', 'waterml-1', 'waterml-json'] as const),
] as const;
export type Layout = (typeof LAYOUTS)[number];

/** Where a field stands: a column of delimited text (position from 0, or header name), or characters of a line
 *  (from 0, end exclusive). */
export type FieldPlace = { column: number | string } | { slice: [number, number] };

/** How a file is to be read: as recognised, or as a person gave it by `--mapping` or on the screen. */
export interface Mapping {
  layout: Layout;
  station:
    | { from: 'file-name' }
    | { from: 'column'; column: number | string }
    | { from: 'given'; code: string }
    /** wide layouts: each column's heading names its station */
    | { from: 'header' }
    /** the lines above the table name it: "Station number: 0306" */
    | { from: 'lines-above' };
  /** columns in the order that `order` names; one column holds a whole date. Calendar layouts: the columns of year and
   *  month, in this order, or one that holds both (`month-rows`); those of year and day of the month (`day-rows`); only
   *  that of the month, or of the day, where `year` says the year */
  date: {
    columns: (number | string | [number, number])[];
    order: 'ymd' | 'dmy' | 'mdy';
    /** calendar layouts without a column of years: a line above each block names its year, or all rows are of this one */
    year?: number | 'heading';
    /** calendar layouts whose years begin in another month than January: that month, and whether the calendar year in
     *  which they begin or the one in which they end names them */
    yearBegins?: { month: number; named: 'first' | 'last' };
  };
  /** null in wide layouts, where every other column is a station. Calendar layouts: the first column of a day (of a month);
   *  the others follow it at equal steps, a flag behind each when there are flags */
  value: FieldPlace | null;
  /** calendar layouts: the flag of the first day (month) */
  flag: FieldPlace | null;
  unit: Unit | null;
  /** text that means "no value", beyond the usual ones */
  missing: string[];
  decimal: '.' | ',';
  /** sign between groups of three digits ("1,234.5"); absent: none */
  thousands?: ',' | '.' | ' ' | "'";
  /** two-digit years: the year that the first of the hundred they stand for is (1930: "29" is 2029, "30" is 1930) */
  firstYear?: number;
  /** several values a day: their mean is the day's, where at least this share (0 to 1) of the day is covered */
  dailyMean?: number;
  /** what the values are of; absent: flow */
  quantity?: Quantity;
  /** what flags mean in this file, by their text; goes before what their words say by themselves */
  flags?: Record<string, FlagName[]>;
  /** further quantities of the same file, each laid over this mapping in a reading of its own */
  also?: AlsoQuantity[];
  /** name of the sheet of a workbook */
  sheet?: string;
  /** delimited layouts only */
  delimiter?: string;
  /** only the rows whose column holds this text are flows; for files that mix several quantities */
  where?: { column: number | string; equals: string };
}

/** Where a file has another quantity than the mapping's own. */
export interface AlsoQuantity {
  quantity: Quantity;
  unit: Unit;
  value: FieldPlace | null;
  flag?: FieldPlace | null;
  where?: { column: number | string; equals: string };
}
