import type { DateOrder } from '../dates.ts';
import type { LineSplitter } from '../rows/fields.ts';
import type { AlsoCandidate, IntakeError, Mapping, StatedFacts, ValueCandidate } from '../types.ts';
import type { WideColumn } from './assign-columns.ts';
import type { CalendarPlan } from './calendar-plan.ts';

/** Rows that a person is shown as they stand in the file, beside its header. */
export const SHOWN_ROWS = 20;

/** How a file is going to be read: the mapping, worked out to positions. */
export interface TablePlan {
  file: string;
  mapping: Mapping;
  splitter: LineSplitter;
  lineEnd: number;
  /** the file begins with the UTF-8 mark */
  marked: boolean;
  header: string[] | null;
  /** line number of the first row of data */
  firstLine: number;
  /** fields that a row has, and the fewest that will do */
  fieldCount: number;
  leastFields: number;
  /** positions among the fields of a row; −1 where there is none */
  places: { date: number[]; station: number; value: number; flag: number; where: number; unit: number };
  wide: WideColumn[] | null;
  /** text that the unit column must hold on every row */
  unitText: string;
  /** day and month order are not yet known: the whole file must be asked */
  orderOpen: boolean;
  /** in this file's symbols the letter means ice */
  iceLetter?: string;
  /** agency files repeat their header for each station */
  repeatsHeader: boolean;
  preview: string[][];
  /** line number of each row of `preview`, from 1 */
  previewLines: number[];
  valueCandidates: ValueCandidate[];
  /** quantities beside the one that the mapping reads; absent: none */
  others?: AlsoCandidate[];
  /** stations' facts stated above the table; absent: none. `factsOf` gives them their codes */
  facts?: StatedFacts[];
  /** every number of a station that those lines state; absent: none */
  codesAbove?: string[];
  /** bytes that a comment line begins with, beside `#`; absent: none */
  comment?: Uint8Array;
  /** layouts with a column for each day or month; absent: others */
  calendar?: CalendarPlan;
  /** what stands against reading the file */
  problems: IntakeError[];
  warnings: string[];
}

/** The three orders with an example each, for messages. */
export const ORDER_WORDS: Record<DateOrder, string> = {
  ymd: 'year, month, day',
  dmy: 'day, month, year',
  mdy: 'month, day, year',
};
