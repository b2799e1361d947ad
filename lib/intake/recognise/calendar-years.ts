import { monthOfName } from '../month-names.ts';
import { type HeadingYear, yearOfHeading } from '../year-month.ts';
import { isMonth } from './column-facts.ts';
import type { CalendarShape } from './find-calendar.ts';
import type { SampleRow } from './sample.ts';
import { withoutSign } from './stated-facts.ts';

/** A heading line of the sample that names a year. */
export interface Heading extends HeadingYear {
  /** index among the rows; −1 for comment lines above them */
  at: number;
}

/** Lines of a calendar layout that name the year of the rows below them. */
export function yearHeadings(
  rows: readonly SampleRow[],
  remarks: readonly string[],
  { row }: Pick<CalendarShape, 'row'>,
): Heading[] {
  const above = remarks.flatMap((text) => {
    const found = yearOfHeading(withoutSign(text));
    return found ? [{ ...found, at: -1 }] : [];
  });
  const between = rows.flatMap(({ fields }, at) => {
    const filled = fields.filter((field) => field !== '');
    // A row of data may hold a number that looks like a year.
    if (filled.length > 4 && /^\d+$/.test(fields[row] ?? '')) return [];
    const found = filled.length === 0 ? null : yearOfHeading(filled.join(' '));
    return found ? [{ ...found, at }] : [];
  });
  return [...above, ...between];
}

/** The month with which the rows of a block begin, where they run over into another year: 1 when they do not. */
export function firstMonthOfBlock(
  rows: readonly SampleRow[],
  shape: CalendarShape,
  headings: readonly Heading[],
): number {
  if (shape.layout === 'day-rows') return shape.firstMonth;
  const next = headings.find(({ at }) => at > shape.firstRow)?.at ?? rows.length;
  const months = rows
    .slice(shape.firstRow, next)
    .map(({ fields }) => fields[shape.row] ?? '')
    .filter(isMonth)
    .map(monthNumber);
  const wraps = months.some((month, at) => at > 0 && month < months[at - 1]);
  return wraps && months.length > 0 ? months[0] : 1;
}

const monthNumber = (text: string): number => (/^\d+$/.test(text) ? Number(text) : monthOfName(text));
