import { type CsvError, parse } from 'csv-parse/sync';
import { isWidthRow } from '../recognise/find-header.ts';
import { sampleLines } from '../recognise/sample.ts';
import { IntakeError } from '../types.ts';
import { geoJsonTable } from './geojson-table.ts';
import { type RegistryColumns, registryColumns } from './registry-columns.ts';
import { MOST_TITLES, registryDelimiter } from './registry-delimiter.ts';

/** A row with the line it stands in; of GeoJSON, the number of its feature. */
export interface TableRow {
  line: number;
  fields: string[];
}

/** A registry as a table, whatever its format. */
export interface RegistryTable {
  header: string[];
  headerLine: number;
  columns: RegistryColumns;
  /** rows that hold anything */
  rows: TableRow[];
  /** sets the fields of a row apart where it is shown */
  delimiter: string;
}

/** Takes a registry's text apart: comma, semicolon or tab, or GeoJSON.
 *  @throws IntakeError when no header names a column of codes, or there are no rows */
export function registryTable(text: string, file: string): RegistryTable {
  if (/^\s*[{[]/.test(text)) return withRows(geoJsonTable(text, file), file);
  const delimiter = delimiterOf(text);
  const rows = split(text, delimiter, file);
  const { header, columns, first } = findHeader(rows, file);
  return withRows({ header, headerLine: rows[first - 1].line, columns, rows: rows.slice(first), delimiter }, file);
}

function withRows(table: RegistryTable, file: string): RegistryTable {
  const rows = table.rows.filter(({ fields }) => fields.some((field) => field.trim() !== ''));
  if (rows.length > 0) return { ...table, rows };
  throw new IntakeError({
    ...{ file, row: table.headerLine, value: table.header.join(', ').slice(0, 200) },
    ...{ message: 'the registry has a header but no stations', remedy: 'Give one row for each station' },
  });
}

function delimiterOf(text: string): ',' | ';' | '\t' {
  const lines = sampleLines(Buffer.from(text.slice(0, 200_000)), 10, true);
  return registryDelimiter(lines.filter((line) => !line.text.startsWith('#'))) ?? ',';
}

function split(text: string, delimiter: string, file: string): TableRow[] {
  try {
    const records = parse(text, {
      ...{ delimiter, info: true, trim: true, relax_column_count: true, skip_empty_lines: true },
      ...{ comment: '#', comment_no_infix: true, record_delimiter: ['\r\n', '\n', '\r'] },
    }) as unknown as { info: { lines: number }; record: string[] }[];
    return records.map(({ info, record }) => ({ line: info.lines, fields: record }));
  } catch (error) {
    const { message, lines } = error as CsvError & { lines?: number };
    throw new IntakeError({
      file,
      ...(lines === undefined ? {} : { row: lines }),
      message: `the table cannot be split into fields: ${message}`,
      remedy: 'Close every quoted field with a quote, and double quotes inside it',
    });
  }
}

function findHeader(rows: TableRow[], file: string): { header: string[]; columns: RegistryColumns; first: number } {
  for (const [at, { fields }] of rows.slice(0, MOST_TITLES).entries()) {
    if (fields.length < 2) continue;
    const columns = registryColumns(fields);
    if (columns.code < 0) continue;
    const widths = rows[at + 1] !== undefined && isWidthRow(rows[at + 1].fields);
    return { header: fields, columns, first: at + (widths ? 2 : 1) };
  }
  const shown = rows[0];
  throw new IntakeError({
    file,
    ...(shown ? { row: shown.line, value: shown.fields.join(', ').slice(0, 200) } : {}),
    message: shown ? 'no header names a column of station codes' : 'the file has no rows',
    remedy:
      'Give a table whose header has a column code (or id, site_no, station), and name, latitude, longitude, area_km2',
  });
}
