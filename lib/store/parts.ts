import type { FlowUnit } from '../series/flow-units.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import type { Code } from './codes.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { VISIBLE } from './import-claim.ts';

/** What one import said of one station and quantity, as its file had it. */
export interface PartDays {
  id: number;
  importId: number;
  quantity: string;
  unit: FlowUnit;
  /** day number of values[0] */
  firstDay: number;
  /** as written, in `unit`; NaN = missing */
  values: Float64Array;
  /** index into codeList a day; 255 = the file has no row for this day */
  codes: Uint8Array;
  /** the quality codes as written, each with the flag bits it was understood as */
  codeList: Code[];
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
  const read = rows(
    connection,
    'SELECT importId, quantity, unit, firstDay, codeList, "values", codes FROM Part WHERE id = ?',
  );
  for (const [id] of ids as [number][]) {
    const row = read.get([id]) as [number, string, FlowUnit, number, string, Buffer, Buffer] | undefined;
    if (!row) continue;
    const [importId, quantity, unit, firstDay, codeList, values, codes] = row;
    const days = { values: valuesOfBlob(values), codes: bytesOfBlob(codes) };
    yield { id, importId, quantity, unit, firstDay, ...days, codeList: JSON.parse(codeList) as Code[] };
  }
}
