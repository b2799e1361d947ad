import type { IntakeError, Mapping } from '../types.ts';
import type { Heading } from './calendar-years.ts';
import { mappingProblem } from './plan-problems.ts';

/** What a calendar layout leaves open of the days that its values are of.
 *  @param firstMonth  month with which the columns, or the rows of a block, begin */
export function calendarProblems(
  file: string,
  { date, layout, value }: Mapping,
  headings: readonly Heading[],
  { firstMonth, header }: { firstMonth: number; header: readonly string[] | null },
): IntakeError[] {
  const row = layout === 'month-rows' ? 'month' : 'day';
  const shown = header?.join(', ').slice(0, 200);
  if (date.columns.length === 0) return [mappingProblem(file, `no column is known to hold the ${row}`, shown)];
  if (value === null) {
    const first = layout === 'month-rows' ? 'first day' : 'January';
    const remedy = 'Say it in a mapping such as {"value": {"column": 2}}; the others follow it';
    return [mappingProblem(file, `no column is known to hold the ${first}`, shown, remedy)];
  }
  const columns = JSON.stringify(date.columns);
  if (date.year === 'heading' && headings.length === 0) {
    const remedy = `Say it in a mapping such as {"date": {"columns": ${columns}, "order": "ymd", "year": 1987}}`;
    return [mappingProblem(file, 'no column, and no line above the rows, says their year', undefined, remedy)];
  }
  if (firstMonth === 1 || date.yearBegins !== undefined) return [];
  const year = date.year === undefined ? '' : `, "year": ${JSON.stringify(date.year)}`;
  const begins = `"yearBegins": {"month": ${firstMonth}, "named": "last"}`;
  return [
    mappingProblem(
      file,
      'the years do not begin in January; whether the year of their first or of their last month names them is not said',
      shown,
      `Say it in a mapping: {"date": {"columns": ${columns}, "order": "ymd"${year}, ${begins}}}, or "first"`,
    ),
  ];
}
