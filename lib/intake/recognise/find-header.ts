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

/** Finds where the data begin: at the first row with a date that has as many fields as most rows. The row before it is
 *  the header when it has as many fields and is not itself data; whatever stands above are title lines.
 *  @param count  the usual number of fields */
export function findTableStart(rows: readonly SampleRow[], count: number): TableStart {
  const dated = rows.findIndex(({ fields }) => fields.length >= Math.min(count, 2) && hasDate(fields));
  // A header that says where the date is holds even when the first rows below it have gone wrong.
  const above = dated < 0 ? rows : rows.slice(0, dated);
  const named = above.findIndex(({ fields }) => fields.length > 1 && isHeader(fields) && !hasDate(fields));
  if (named >= 0) {
    const widthRow = rows[named + 1] !== undefined && isWidthRow(rows[named + 1].fields);
    return { header: rows[named].fields, widthRow, firstRow: named + (widthRow ? 2 : 1) };
  }
  if (dated < 0) return { header: null, widthRow: false, firstRow: rows.length };
  const last = above.at(-1)?.fields ?? null;
  const isHeading =
    last !== null &&
    last.length === rows[dated].fields.length &&
    last.filter((field) => field !== '').length > 1 &&
    last.some((field) => /\p{L}/u.test(field));
  return { header: isHeading ? last : null, widthRow: false, firstRow: dated };
}
