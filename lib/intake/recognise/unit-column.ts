import { type FlowUnit, IntakeError } from '../types.ts';
import { unitNamedIn } from '../units.ts';
import type { WideColumn } from './assign-columns.ts';
import type { SampleRow } from './sample.ts';

interface Named {
  unit: FlowUnit;
  line: number;
  text: string;
}

/** The first two rows that name unlike units; null when all agree. */
function unlike(rows: readonly { line: number; text: string }[]): [Named, Named] | null {
  let first: Named | null = null;
  for (const { line, text } of rows) {
    const unit = text === '' ? null : unitNamedIn(text);
    if (unit === null) continue;
    if (first === null) first = { unit, line, text };
    else if (unit !== first.unit) return [first, { unit, line, text }];
  }
  return null;
}

/** Two units in one column of flows, one of which would be read as the other.
 *  @param column  heading of the column of units; null where the values carry them */
export function twoUnits(
  file: string,
  [first, second]: [{ line: number; text: string }, { line: number; text: string }],
  column: string | null,
): IntakeError {
  return new IntakeError({
    file,
    row: second.line,
    value: second.text,
    message: `the flows are in two units: “${first.text}” in row ${first.line} and “${second.text}” in row ${second.line}`,
    remedy:
      column === null
        ? 'Bring the values into one unit, or split the file by unit'
        : `Split the file by unit, or read the rows of one unit by a mapping such as {"where": {"column": "${column}", "equals": "${first.text}"}}`,
    needs: 'mapping',
  });
}

/** What stands against reading a table whose rows, values or headings name unlike units; null when nothing does. */
export function mixedUnits(
  file: string,
  data: readonly SampleRow[],
  places: { value: number; unit: number },
  header: readonly string[] | null,
  wide: readonly WideColumn[] | null,
): IntakeError | null {
  const column = (at: number) => (at < 0 ? [] : data.map(({ line, fields }) => ({ line, text: fields[at] ?? '' })));
  const rows = unlike(column(places.unit));
  if (rows) return twoUnits(file, rows, header?.[places.unit] ?? String(places.unit));
  const values = unlike(column(places.value).filter(({ text }) => /^[\d.,]+\s*\p{L}/u.test(text)));
  if (values) return twoUnits(file, values, null);
  const headings = unlike((wide ?? []).map(({ value }) => ({ line: 0, text: header?.[value] ?? '' })));
  if (headings === null) return null;
  return new IntakeError({
    file,
    value: headings[1].text,
    message: `the columns are in unlike units: “${headings[0].text}” and “${headings[1].text}”`,
    remedy: 'Bring all columns into one unit, or split the file by unit',
  });
}
