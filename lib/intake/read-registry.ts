import { type AreaUnit, KM2_OF } from '../series/area-units.ts';
import { looksLikeRegistry } from './registry/looks-like-registry.ts';
import { commaMeaning } from './registry/number-signs.ts';
import { checkPositions, type PlacedRow } from './registry/positions.ts';
import { refuseForCorrection, refuseOpenCommas, refuseRows, refuseUnknownArea } from './registry/refusals.ts';
import { areaFactorOf, type RegistryColumns } from './registry/registry-columns.ts';
import { type RowFormat, readRegistryRow } from './registry/registry-row.ts';
import { type RegistryTable, registryTable } from './registry/registry-table.ts';
import { registryWarnings } from './registry/registry-warnings.ts';
import type { RowProblem } from './registry/row-problem.ts';
import { REGISTRY_FACTS, type Registry, type RegistryFact, type RegistryOptions, type RejectedRow } from './types.ts';
import { readWholeText } from './whole-text.ts';
import { sheetAsText } from './workbook/index.ts';

const MOST_BYTES = 64e6;

/** Reads a station registry: a table with a header row, one station a row, as text with commas, semicolons or tabs or as a
 *  workbook, or GeoJSON points. Columns are found by their headings; only the code must be there. Areas come in the unit
 *  that the heading or a column says.
 *
 *  A registry is taken whole or not at all, for a station left out would be missing everywhere without a word.
 *  @throws IntakeError naming every row at fault in `problem.rows`; `needs: 'correction'` where coordinates seem to be
 *          swapped, or run from 0 to 360 */
export async function readRegistry(path: string, fileName: string, options: RegistryOptions = {}): Promise<Registry> {
  const sheet = await sheetAsText(path, {
    fileName,
    sheet: options.sheet,
    wanted: (head) => looksLikeRegistry(head, true),
  });
  if (sheet === null) return registryOf(await readWholeText(path, fileName, MOST_BYTES), fileName, options);
  try {
    const { text } = await readWholeText(sheet.path, fileName, MOST_BYTES);
    const registry = registryOf({ text, sha256: sheet.sha256 }, fileName, options);
    return { ...registry, warnings: [...sheet.warnings, ...registry.warnings] };
  } finally {
    await sheet.dispose();
  }
}

function registryOf(
  { text, sha256 }: { text: string; sha256: string },
  file: string,
  options: RegistryOptions,
): Registry {
  const table = registryTable(text, file);
  const format = formatOf(table, file, options.areaUnit);
  const { rows, problems } = readRows(table, format);
  const positions = checkPositions(rows, options);
  problems.push(
    ...positions.problems.map(({ row: { line, text: shown }, problem }) => ({ ...problem, row: line, text: shown })),
  );
  if (problems.length > 0)
    throw refuseRows(
      problems.sort((a, b) => a.row - b.row),
      file,
    );
  if (positions.asks !== null) throw refuseForCorrection(positions.asks, file);
  const stations = positions.rows.map(({ station }) => station);
  return {
    ...{ stations, rows: table.rows.length, sha256 },
    given: REGISTRY_FACTS.filter((fact) => hasFact(fact, table.columns)),
    warnings: registryWarnings(stations, table, positions),
  };
}

const hasFact = (fact: RegistryFact, columns: RegistryColumns): boolean =>
  columns[fact] >= 0 || (fact === 'namedFlows' && columns.flows.length > 0);

function formatOf(
  { rows, columns, header, headerLine }: RegistryTable,
  file: string,
  areaUnit: AreaUnit | undefined,
): RowFormat {
  const stated = columns.areaKm2 < 0 ? null : areaFactorOf(header[columns.areaKm2]);
  const said = areaUnit === undefined || columns.areaUnit >= 0 ? null : KM2_OF[areaUnit];
  const areaFactor = stated ?? said;
  if (columns.areaKm2 >= 0 && areaFactor === null && columns.areaUnit < 0)
    throw refuseUnknownArea(header[columns.areaKm2], headerLine, file);
  const texts = (...places: number[]) =>
    places.filter((at) => at >= 0).flatMap((at) => rows.map(({ fields }) => (fields[at] ?? '').trim()));
  const comma = commaMeaning(
    texts(columns.latitude, columns.longitude),
    texts(columns.areaKm2, ...columns.flows.map(({ value }) => value)),
  );
  if (comma === 'open') throw refuseOpenCommas(texts(columns.areaKm2).find((text) => text.includes(',')) ?? '', file);
  return { areaFactor, comma };
}

function readRows(
  { rows, header, columns, delimiter }: RegistryTable,
  format: RowFormat,
): { rows: PlacedRow[]; problems: (RowProblem & RejectedRow)[] } {
  const placed: PlacedRow[] = [];
  const problems: (RowProblem & RejectedRow)[] = [];
  const firstLine = new Map<string, number>();
  for (const { line, fields } of rows) {
    const text = fields.join(delimiter).slice(0, 500);
    const read = unfitting(fields, header) ?? readRegistryRow(fields, columns, format);
    const earlier = 'code' in read ? firstLine.get(read.code) : undefined;
    if ('code' in read && earlier === undefined) {
      firstLine.set(read.code, line);
      placed.push({ station: read, line, text });
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
    problems.push({ ...problem, row: line, text });
  }
  return { rows: placed, problems };
}

/** A row with more fields than the header holds something in the wrong place; one with fewer was cut. */
function unfitting(fields: readonly string[], header: readonly string[]): RowProblem | null {
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
