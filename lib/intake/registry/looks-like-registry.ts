import { LF } from '../file-blocks.ts';
import { looksLikeDate } from '../recognise/column-facts.ts';
import { findCalendar } from '../recognise/find-calendar.ts';
import { isWidthRow } from '../recognise/find-header.ts';
import { roleOfHeading } from '../recognise/heading-roles.ts';
import { type SampleRow, sampleLines, splitSample, splitterFor } from '../recognise/sample.ts';
import { holdsCodes, registryColumns } from './registry-columns.ts';
import { MOST_TITLES, registryDelimiter } from './registry-delimiter.ts';

/** Rows below the header that are looked through. */
const ROWS_LOOKED_AT = 50;

/** Whether a table's first lines are those of a station registry: a row a station, with its place, or with other facts and
 *  no dates.
 *  @param head       the first bytes of the file, UTF-8
 *  @param wholeFile  they are all of it: also the last line is whole */
export function looksLikeRegistry(head: Uint8Array, wholeFile: boolean): boolean {
  const lines = sampleLines(head, LF, wholeFile).filter(({ text }) => !text.startsWith('#'));
  const delimiter = registryDelimiter(lines);
  if (delimiter === null) return false;
  const rows = splitSample(lines.slice(0, MOST_TITLES + ROWS_LOOKED_AT), splitterFor(delimiter, LF));
  // Days by month have no dates to tell them by.
  if (findCalendar(rows) !== null) return false;
  return rows
    .slice(0, MOST_TITLES)
    .some(({ fields }, at) => fields.length > 1 && isRegistry(fields, rows.slice(at + 1, at + 1 + ROWS_LOOKED_AT)));
}

function isRegistry(header: readonly string[], below: readonly SampleRow[]): boolean {
  if (!holdsCodes(header)) return false;
  const columns = registryColumns(header);
  const rows = below.filter(({ fields }) => !isWidthRow(fields));
  const roles = header.map(roleOfHeading);
  const placed = columns.latitude >= 0 && columns.longitude >= 0;
  const codes = rows.map(({ fields }) => fields[columns.code] ?? '');
  // Flows of placed stations name each of them day after day; a list of stations may say when each was opened.
  const onceEach = rows.length > 0 && new Set(codes).size === codes.length && !roles.includes('value');
  if (placed && onceEach) return true;
  if (roles.includes('date') || rows.some(({ fields }) => fields.some(looksLikeDate))) return false;
  const named = roles.includes('station') || roles.includes('maybe-station');
  const facts = columns.areaKm2 >= 0 || columns.name >= 0 || columns.river >= 0;
  return placed || (named && facts && !roles.includes('value'));
}
