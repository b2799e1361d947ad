import type { DayCode } from '../series/day-codes.ts';
import type { Unit } from '../series/quantities.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { type Connection, rows } from './connection.ts';
import type { LayablePart, OverlapRule } from './lay-parts.ts';
import type { RecordHead } from './lay-record.ts';

/** Reads of a staging database that is attached to the main one. */
export const stagedFileName = (connection: Connection, file: number): string =>
  (rows(connection, 'SELECT fileName FROM staging.file WHERE id = ?').get([file]) as [string])[0];

/** Number of the first file that is a registry. */
export const registryFile = (connection: Connection): number =>
  (rows(connection, 'SELECT MIN(file) FROM staging.registry').get([]) as [number])[0];

/** What a record says of itself when it is this part alone. */
export function stagedHead(connection: Connection, id: number): Omit<RecordHead, 'stationId' | 'quantity' | 'partId'> {
  const [unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount] = rows(
    connection,
    'SELECT unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount FROM staging.part WHERE id = ?',
  ).get([id]) as [Unit, number, number, string, number, number | null, number | null, number];
  return { unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay, zeroCount, laidId: null };
}

/** A part with its days, to be laid by a rule. */
export function stagedPart(connection: Connection, id: number, rule: OverlapRule): LayablePart {
  const [unit, firstDay, codeList, values, codes] = rows(
    connection,
    'SELECT unit, firstDay, codeList, "values", codes FROM staging.part WHERE id = ?',
  ).get([id]) as [Unit, number, string, Buffer, Buffer];
  const days = { values: valuesOfBlob(values), codes: bytesOfBlob(codes) };
  return { unit, firstDay, codeList: JSON.parse(codeList) as DayCode[], ...days, rule };
}
