/** A column of a calendar layout. */
export interface CalendarCell {
  /** day of the month (a row a month), or month (a row a day), from 1 */
  number: number;
  value: number;
  flag: number | null;
}

/** Where the days of a calendar layout stand, by position among the fields of a row. */
export interface CalendarPlan {
  cells: CalendarCell[];
  /** column of the year; −1 where it stands elsewhere, or together with the month */
  year: number;
  /** column of the month (a row a month), or of the day (a row a day) */
  row: number;
  /** year of the first rows, where no column holds it; null when none is known yet */
  firstYear: number | null;
  /** lines between blocks may name the year of the rows below them */
  headings: boolean;
  /** first month of a year, and whether the calendar year of its first or of its last month names it */
  begins: { month: number; named: 'first' | 'last' };
}
