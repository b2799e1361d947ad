import type { DayCode } from '../series/day-codes.ts';
import type { Unit } from '../series/quantities.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { type Connection, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { VISIBLE } from './import-claim.ts';

/** What one import said of one station and quantity, as its file had it. */
export interface PartDays {
  id: number;
  importId: number;
  quantity: string;
  unit: Unit;
  /** day number of values[0] */
  firstDay: number;
  /** as written, in `unit`; NaN = missing */
  values: Float64Array;
  /** index into codeList a day; NO_ROW where the file has no row for the day */
  codes: Uint8Array;
  /** the quality codes as written, each with the flag bits it was understood as */
  codeList: DayCode[];
}

/** The parts of one import, each with its station's code, by code and quantity. One at a time, as readParts. */
export function* readImportParts(importId: number, path = databasePath()): Generator<PartDays & { code: string }> {
  const connection = sharedConnection(path);
  const found = rows(
    connection,
    `SELECT p.id, s.code FROM Part p JOIN Station s ON s.id = p.stationId WHERE p.importId = ? ORDER BY s.code, p.quantity`,
  ).all([importId]) as [number, string][];
  for (const [id, code] of found) {
    const part = readPart(connection, id);
    if (part) yield { ...part, code };
  }
}

/** Units and codes of an import's parts, without their days. */
export function importPartHeads(
  importId: number,
  path = databasePath(),
): { quantity: string; unit: Unit; codeList: DayCode[] }[] {
  const found = rows(sharedConnection(path), 'SELECT quantity, unit, codeList FROM Part WHERE importId = ?');
  return (found.all([importId]) as [string, Unit, string][]).map(([quantity, unit, codeList]) => ({
    ...{ quantity, unit, codeList: JSON.parse(codeList) as DayCode[] },
  }));
}

/** The parts of a station's records, value for value and code for code as imported, in the order of the imports. One at a
 *  time: stop reading, or read on, as memory allows. */
export function* readParts(stationId: number, path = databasePath()): Generator<PartDays> {
  const connection = sharedConnection(path);
  const ids = rows(
    connection,
    `SELECT p.id FROM Part p JOIN Import i ON i.id = p.importId WHERE p.stationId = ? AND i.state IN ${VISIBLE}
     ORDER BY p.importId, p.id`,
  ).all([stationId]);
  for (const [id] of ids as [number][]) {
    const part = readPart(connection, id);
    if (part) yield part;
  }
}

/** One part by its number; null when it has gone meanwhile. */
function readPart(connection: Connection, id: number): PartDays | null {
  const row = rows(
    connection,
    'SELECT importId, quantity, unit, firstDay, codeList, "values", codes FROM Part WHERE id = ?',
  ).get([id]) as [number, string, Unit, number, string, Buffer, Buffer] | undefined;
  if (!row) return null;
  const [importId, quantity, unit, firstDay, codeList, values, codes] = row;
  const days = { values: valuesOfBlob(values), codes: bytesOfBlob(codes) };
  return { id, importId, quantity, unit, firstDay, ...days, codeList: JSON.parse(codeList) as DayCode[] };
}
