import { unitNamedIn } from '../units.ts';
import { isDay, isMonth, isYear, looksLikeDate } from './column-facts.ts';
import { roleOfHeading } from './heading-roles.ts';
import type { SampleRow } from './sample.ts';

export interface TableStart {
  header: string[] | null;
  /** the row of column widths that agency files put under the header */
  widthRow: boolean;
  /** index in the sampled rows of the first row of data */
  firstRow: number;
}

/** `5s 15s 20d 14n 10s` */
export function isWidthRow(fields: readonly string[]): boolean {
  return fields.length > 1 && fields.every((field) => /^\d+[sdn]$/.test(field));
}

/** A row under the header that says the columns' units: `;m³/s;cm` */
function isUnitRow(fields: readonly string[]): boolean {
  const filled = fields.filter((field) => field !== '');
  return (
    fields.length > 1 &&
    !isHeader(fields) &&
    filled.some((field) => unitNamedIn(field) !== null) &&
    filled.every((field) => field.length <= 24 && !/^[\d.,-]+$/.test(field) && !looksLikeDate(field))
  );
}

function hasDate(fields: readonly string[]): boolean {
  return fields.some(
    (field, at) =>
      looksLikeDate(field) ||
      (isYear(field) && isMonth(fields[at + 1] ?? '') && isDay(fields[at + 2] ?? '')) ||
      (isDay(field) && isMonth(fields[at + 1] ?? '') && isYear(fields[at + 2] ?? '')),
  );
}

function isHeader(fields: readonly string[]): boolean {
  const roles = fields.map(roleOfHeading);
  return roles.includes('date') || (roles.includes('year') && roles.includes('month') && roles.includes('day'));
}

/** Rows behind the first with a date that are asked whether they have dates too. */
const ROWS_ASKED = 10;

/** The first row of data: it stands right below a header, or most rows behind it have dates as well and no header stands
 *  among them, unlike behind a line such as "Period: 2001-01-01". */
function firstDated(rows: readonly SampleRow[], least: number): number {
  const dated = (row: SampleRow) => row.fields.length >= least && hasDate(row.fields);
  let first = -1;
  for (const [at, row] of rows.entries()) {
    if (!dated(row)) continue;
    if (first < 0) first = at;
    const apart = isWidthRow(rows[at - 1]?.fields ?? []) || isUnitRow(rows[at - 1]?.fields ?? []);
    const above = rows[apart ? at - 2 : at - 1];
    if (above !== undefined && isHeaderRow(above.fields)) return at;
    const behind = rows.slice(at + 1, at + 1 + ROWS_ASKED);
    const headed = behind.some(
      (next, step) => step + 1 < behind.length && isHeaderRow(next.fields) && dated(behind[step + 1]),
    );
    if (!headed && behind.filter(dated).length * 2 >= behind.length) return at;
  }
  return first;
}

/** A line of a key and its value, "Unit:;m3/s", which is no header. */
const isPair = (fields: readonly string[]): boolean => /:$/.test(fields[0]);

const isHeaderRow = (fields: readonly string[]): boolean =>
  fields.length > 1 && !isPair(fields) && isHeader(fields) && !hasDate(fields);

/** Finds where the data begin: at the first row with a date that has as many fields as most rows. The row before it is
 *  the header when it has as many fields and is not itself data; whatever stands above are title lines.
 *  @param count  the usual number of fields */
export function findTableStart(rows: readonly SampleRow[], count: number): TableStart {
  const dated = firstDated(rows, Math.min(count, 2));
  // A header that says where the date is holds even when the first rows below it have gone wrong.
  const above = dated < 0 ? rows : rows.slice(0, dated);
  const headers = above.flatMap(({ fields }, at) => (isHeaderRow(fields) ? [at] : []));
  // Of several, the one right above the data: blocks of station facts may have keys such as "Time zone".
  const below = (at: number) =>
    at + (isWidthRow(rows[at + 1]?.fields ?? []) || isUnitRow(rows[at + 1]?.fields ?? []) ? 2 : 1);
  const named = headers.findLast((at) => below(at) === dated) ?? headers[0] ?? -1;
  if (named >= 0) {
    const widthRow = isWidthRow(rows[named + 1]?.fields ?? []);
    return { header: rows[named].fields, widthRow, firstRow: below(named) };
  }
  if (dated < 0) return { header: null, widthRow: false, firstRow: rows.length };
  const last = above.at(-1)?.fields ?? null;
  const isHeading =
    last !== null &&
    !isPair(last) &&
    last.length === rows[dated].fields.length &&
    last.filter((field) => field !== '').length > 1 &&
    last.some((field) => /\p{L}/u.test(field));
  return { header: isHeading ? last : null, widthRow: false, firstRow: dated };
}

/** The header that stands in the last of the comment lines above a table: "#Timestamp;Value;Quality code".
 *  @param fields  that line's fields
 *  @returns       null when it is none */
export function headerInComment(fields: readonly string[], count: number): string[] | null {
  return fields.length > 1 && Math.abs(fields.length - count) <= 1 && isHeader(fields) ? [...fields] : null;
}
