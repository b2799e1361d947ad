import { monthOfName } from '../month-names.ts';
import { parseYearMonth } from '../year-month.ts';
import type { CalendarCell } from './calendar-plan.ts';
import { isDay, isMonth, isYear, looksLikeNumber } from './column-facts.ts';
import { roleOfHeading } from './heading-roles.ts';
import { type SampleRow, usualCount } from './sample.ts';

/** A calendar layout as its rows show it. */
export interface CalendarShape {
  layout: 'month-rows' | 'day-rows';
  header: string[] | null;
  /** index of the first row of data */
  firstRow: number;
  cells: CalendarCell[];
  /** −1: the year stands in heading lines, or in the column of the month */
  year: number;
  /** column of the month, or of the day */
  row: number;
  /** month of the first column of a row a day; 1 for a row a month */
  firstMonth: number;
}

const SHARE = 0.9;
const ROMAN = ['i', 'ii', 'iii', 'iv', 'v', 'vi', 'vii', 'viii', 'ix', 'x', 'xi', 'xii'];

/** The number that ends a heading: "D01", "Tag 1", "1" → 1; −1 for other headings. */
function numberIn(heading: string): number {
  const found = /^[\p{L}_ .-]{0,20}?0?(\d{1,2})\.?$/u.exec(heading.trim());
  return found ? Number(found[1]) : -1;
}

/** The month that a heading names: "Jan", "März", "VII", "7"; 0 for other headings. */
function monthIn(heading: string): number {
  const text = heading.trim().toLowerCase().replace(/\.$/, '');
  const roman = ROMAN.indexOf(text) + 1;
  if (roman > 0) return roman;
  return /^\d{1,2}$/.test(text) && Number(text) <= 12 ? Number(text) : monthOfName(text);
}

/** Equal steps through a header: the place of the first cell, and the columns from one to the next. */
function stepsThrough(
  header: readonly string[],
  count: number,
  numberOf: (heading: string) => number,
): { start: number; step: number; first: number } | null {
  for (let start = 0; start < header.length; start++) {
    const first = numberOf(header[start]);
    if (first < 1 || (count === 31 && first !== 1)) continue;
    for (const step of [1, 2]) {
      let at = 0;
      while (at < count && start + at * step < header.length) {
        if (numberOf(header[start + at * step]) !== ((first - 1 + at) % count) + 1) break;
        at++;
      }
      if (at === count) return { start, step, first };
    }
  }
  return null;
}

function cellsOf(
  { start, step, first }: { start: number; step: number; first: number },
  count: number,
): CalendarCell[] {
  return Array.from({ length: count }, (_, at) => ({
    number: ((first - 1 + at) % count) + 1,
    value: start + at * step,
    flag: step === 2 ? start + at * step + 1 : null,
  }));
}

/** Finds a table with a column for each day of the month, or for each month; null when the rows are of another kind. */
export function findCalendar(rows: readonly SampleRow[]): CalendarShape | null {
  for (const [at, { fields }] of rows.entries()) {
    // A row of numbers alone is no header, whatever they are.
    if (fields.length < 13 || !fields.some((field) => /\p{L}/u.test(field))) continue;
    const days = stepsThrough(fields, 31, numberIn);
    const shape = days ? monthRows(rows, at, days) : dayRows(rows, at);
    if (shape) return shape;
    // Title lines are short; a table of another kind is not searched to its end.
    if (at > 200) return null;
  }
  return withoutHeader(rows);
}

type Steps = { start: number; step: number; first: number };

function monthRows(rows: readonly SampleRow[], headerRow: number, steps: Steps): CalendarShape | null {
  const header = rows[headerRow].fields;
  const data = rows.slice(headerRow + 1);
  const cells = cellsOf(steps, 31);
  const leading = header.map((_, at) => at).filter((at) => at < steps.start || at > cells[30].value + 1);
  const places = yearAndMonth(header, data, leading);
  // With a day beside the month, the numbered columns are stations.
  if (places === null || leading.some((at) => roleOfHeading(header[at]) === 'day')) return null;
  const first = data.findIndex((row) => isMonthRow(row.fields, places));
  return first < 0
    ? null
    : { layout: 'month-rows', header, firstRow: headerRow + 1 + first, cells, ...places, firstMonth: 1 };
}

interface RowPlaces {
  year: number;
  row: number;
}

/** The columns of year and month among those that hold no days, by heading and by what most rows hold. */
function yearAndMonth(
  header: readonly string[],
  data: readonly SampleRow[],
  leading: readonly number[],
): RowPlaces | null {
  const full = data.filter(({ fields }) => fields.length > 12);
  const share = (at: number, test: (text: string) => boolean) =>
    full.length > 0 && full.filter(({ fields }) => test(fields[at] ?? '')).length >= full.length * SHARE;
  const ofRole = (role: string) => leading.find((at) => roleOfHeading(header[at]) === role);
  const both = leading.find((at) => share(at, (text) => parseYearMonth(text) !== null));
  if (both !== undefined) return { year: -1, row: both };
  const year = ofRole('year') ?? leading.find((at) => share(at, isYear));
  const month = ofRole('month') ?? leading.find((at) => at !== year && share(at, isMonth));
  if (month === undefined) return null;
  return { year: year ?? -1, row: month };
}

function isMonthRow(fields: readonly string[], { year, row }: RowPlaces): boolean {
  const text = fields[row] ?? '';
  if (year >= 0) return /^\d{2}(?:\d{2})?$/.test(fields[year] ?? '') && isMonth(text);
  return parseYearMonth(text) !== null || isMonth(text);
}

function dayRows(rows: readonly SampleRow[], headerRow: number): CalendarShape | null {
  const header = rows[headerRow].fields;
  const steps = stepsThrough(header, 12, monthIn);
  if (steps === null || steps.start === 0) return null;
  const cells = cellsOf(steps, 12);
  const leading = header.map((_, at) => at).filter((at) => at < steps.start || at > cells[11].value + 1);
  if (leading.some((at) => roleOfHeading(header[at]) === 'month')) return null;
  const data = rows.slice(headerRow + 1);
  const full = data.filter(({ fields }) => fields.length > 3);
  // Rows of totals stand among those of days, twelve for every 31 at most.
  const share = (at: number, test: (text: string) => boolean) =>
    full.length > 0 && full.filter(({ fields }) => test(fields[at] ?? '')).length >= full.length * 0.7;
  const row = leading.find((at) => roleOfHeading(header[at]) === 'day') ?? leading.find((at) => share(at, isDay));
  if (row === undefined) return null;
  const year =
    leading.find((at) => roleOfHeading(header[at]) === 'year') ??
    leading.find((at) => at !== row && share(at, isYear)) ??
    -1;
  const first = data.findIndex(({ fields }) => isDay(fields[row] ?? ''));
  if (first < 0 || !share(row, isDay)) return null;
  return {
    ...{ layout: 'day-rows', header, firstRow: headerRow + 1 + first, cells, year, row },
    firstMonth: steps.first,
  };
}

/** Rows of year, month and 31 numbers, with or without a text behind each, under no header. */
function withoutHeader(rows: readonly SampleRow[]): CalendarShape | null {
  const count = usualCount(rows);
  const data = rows.filter(({ fields }) => fields.length === count);
  if (count < 33 || data.length * 2 < rows.length) return null;
  const share = (at: number, test: (text: string) => boolean) =>
    data.filter(({ fields }) => test(fields[at])).length >= data.length * SHARE;
  for (let year = 0; year < 4; year++) {
    const behind = count - year - 2;
    if ((behind !== 31 && behind !== 62) || !share(year, isYear) || !share(year + 1, isMonth)) continue;
    const step = behind / 31;
    const cells = cellsOf({ start: year + 2, step, first: 1 }, 31);
    const numeric = cells
      .slice(0, 28)
      .every(({ value }) => share(value, (text) => text === '' || looksLikeNumber(text)));
    if (!numeric) return null;
    const firstRow = rows.findIndex((row) => isMonthRow(row.fields, { year, row: year + 1 }));
    return { layout: 'month-rows', header: null, firstRow, cells, year, row: year + 1, firstMonth: 1 };
  }
  return null;
}
