import { type CsvError, parse } from 'csv-parse/sync';
import { isWidthRow } from './recognise/find-header.ts';
import { detectDelimiter, sampleLines } from './recognise/sample.ts';
import { areaFactorOf, type RegistryColumns, registryColumns } from './registry/registry-columns.ts';
import { type RowProblem, readRegistryRow } from './registry/registry-row.ts';
import { IntakeError, type Registry, type RegistryFact, type RegistryStation, type RejectedRow } from './types.ts';
import { readWholeText } from './whole-text.ts';

const MOST_BYTES = 64e6;
/** Title lines that may stand above the header. */
const MOST_TITLES = 30;
const FACTS: RegistryFact[] = ['name', 'river', 'latitude', 'longitude', 'areaKm2', 'influence'];

interface Row {
  line: number;
  fields: string[];
}

/** Reads a station registry: a table with a header row, one station a row, with commas, semicolons or tabs. Columns are
 *  found by their headings; only the code must be there. Areas come in the unit that the heading or a column says.
 *
 *  A registry is taken whole or not at all, for a station left out would be missing everywhere without a word.
 *  @throws IntakeError naming every row at fault in `problem.rows` */
export async function readRegistry(path: string, fileName: string): Promise<Registry> {
  const { text, sha256 } = await readWholeText(path, fileName, MOST_BYTES);
  const delimiter = delimiterOf(text);
  const rows = split(text, delimiter, fileName);
  const { header, columns, first } = findHeader(rows, fileName);
  const data = rows.slice(first).filter(({ fields }) => fields.some((field) => field.trim() !== ''));
  if (data.length === 0) {
    throw new IntakeError({
      ...{ file: fileName, row: rows[first - 1].line, value: header.join(', ').slice(0, 200) },
      ...{ message: 'the registry has a header but no stations', remedy: 'Give one row for each station' },
    });
  }
  const areaFactor = columns.areaKm2 < 0 ? null : areaFactorOf(header[columns.areaKm2]);
  refuseUnknownArea(columns, areaFactor, header, fileName);
  const format = { areaFactor, decimalComma: delimiter !== ',' && usesComma(data, columns) };
  const stations = readRows(data, header, columns, format, { fileName, delimiter });
  return {
    ...{ stations, rows: data.length, sha256 },
    given: FACTS.filter((fact) => columns[fact] >= 0),
    warnings: warningsOf(stations, columns, header),
  };
}

function delimiterOf(text: string): ',' | ';' | '\t' {
  const lines = sampleLines(Buffer.from(text.slice(0, 200_000)), 10, true);
  return (
    detectDelimiter(
      lines.filter((line) => !line.text.startsWith('#')),
      10,
    ) ?? ','
  );
}

function split(text: string, delimiter: string, file: string): Row[] {
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

function findHeader(rows: Row[], file: string): { header: string[]; columns: RegistryColumns; first: number } {
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

function refuseUnknownArea(columns: RegistryColumns, factor: number | null, header: string[], file: string): void {
  if (columns.areaKm2 < 0 || factor !== null || columns.areaUnit >= 0) return;
  const heading = header[columns.areaKm2];
  throw new IntakeError({
    ...{ file, row: 1, value: heading, needs: 'area' },
    message: 'the registry does not say in which unit its areas are',
    remedy: `Name the column “${heading}_km2” (or _mi2, _ha, _acres, _m2), or add a column area_unit`,
  });
}

function usesComma(data: readonly Row[], columns: RegistryColumns): boolean {
  const places = [columns.latitude, columns.longitude, columns.areaKm2].filter((at) => at >= 0);
  const texts = data.flatMap(({ fields }) => places.map((at) => fields[at] ?? ''));
  return texts.some((text) => /^-?\d+,\d+$/.test(text)) && !texts.some((text) => /\d\.\d/.test(text));
}

function readRows(
  data: readonly Row[],
  header: readonly string[],
  columns: RegistryColumns,
  format: { areaFactor: number | null; decimalComma: boolean },
  { fileName, delimiter }: { fileName: string; delimiter: string },
): RegistryStation[] {
  const stations: RegistryStation[] = [];
  const problems: (RowProblem & RejectedRow)[] = [];
  const firstLine = new Map<string, number>();
  for (const { line, fields } of data) {
    const read = readable(fields, header) ?? readRegistryRow(fields, columns, format);
    const earlier = 'code' in read ? firstLine.get(read.code) : undefined;
    if ('code' in read && earlier === undefined) {
      firstLine.set(read.code, line);
      stations.push(read);
      continue;
    }
    const problem: RowProblem =
      'code' in read
        ? {
            value: read.code,
            reason: `the station code stands already in row ${earlier}`,
            remedy: 'Give each station one row and a code of its own',
          }
        : read;
    problems.push({ ...problem, row: line, text: fields.join(delimiter).slice(0, 500) });
  }
  if (problems.length > 0) throw refusal(problems, fileName);
  return stations;
}

/** A row with more fields than the header holds something in the wrong place; one with fewer was cut. */
function readable(fields: readonly string[], header: readonly string[]): RowProblem | null {
  const surplus = fields.slice(header.length).some((field) => field !== '');
  if (!surplus && fields.length >= header.length) return null;
  const trailing = header.slice(fields.length).every((heading) => heading === '');
  if (!surplus && trailing) return null;
  return {
    value: fields.join(', ').slice(0, 100),
    reason: `the row has ${fields.length} fields where the header has ${header.length}`,
    remedy: 'Put text that holds the delimiter in quotes',
  };
}

function refusal(problems: (RowProblem & RejectedRow)[], file: string): IntakeError {
  const [first, ...others] = problems;
  const more = others.slice(0, 4).map(({ row, reason, value }) => `row ${row}: ${reason} (“${value}”)`);
  const rest = others.length > 4 ? ` and ${others.length - 4} more` : '';
  const also = others.length === 0 ? '' : `. Also ${more.join('; ')}${rest}. The registry is taken whole or not at all`;
  return new IntakeError({
    ...{ file, row: first.row, value: first.value, message: first.reason, remedy: `${first.remedy}${also}` },
    rows: problems.map(({ row, text, reason }) => ({ row, text, reason })),
  });
}

function warningsOf(stations: RegistryStation[], columns: RegistryColumns, header: readonly string[]): string[] {
  const warnings: string[] = [];
  const unplaced = stations.filter(({ latitude }) => latitude === null).length;
  if (unplaced > 0 && columns.latitude >= 0)
    warnings.push(`${unplaced} stations have no position; they are not on the map.`);
  const withoutArea = stations.filter(({ areaKm2 }) => areaKm2 === null).length;
  if (withoutArea > 0 && columns.areaKm2 >= 0)
    warnings.push(`${withoutArea} stations have no drainage area; they are left out where flows are compared by area.`);
  const atZero = stations.filter(({ latitude, longitude }) => latitude === 0 && longitude === 0).length;
  if (atZero > 0) warnings.push(`${atZero} stations lie at latitude 0, longitude 0: are their positions missing?`);
  if (columns.otherAreas.length > 0) {
    const others = columns.otherAreas.map((at) => `“${header[at]}”`).join(', ');
    warnings.push(`The area was taken from “${header[columns.areaKm2]}”, not from ${others}.`);
  }
  return warnings;
}
