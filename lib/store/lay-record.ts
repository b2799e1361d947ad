import { type DayCode, flagsOfCodes } from '../series/day-codes.ts';
import type { Quantity, Unit } from '../series/quantities.ts';
import { blobOf, blobOfValues, bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { type Connection, change, rows } from './connection.ts';
import { VISIBLE } from './import-claim.ts';
import type { LaidDays, LayablePart, OverlapRule } from './lay-parts.ts';
import { type RecordSummary, summarise } from './record-summary.ts';

/** A Record's row but for its own id. */
export interface RecordHead extends RecordSummary {
  stationId: number;
  quantity: Quantity;
  partId: number | null;
  laidId: number | null;
  unit: Unit;
  firstDay: number;
  days: number;
}

/** What a record points to as it stands. */
export type Standing = Pick<RecordHead, 'hash' | 'partId' | 'laidId'>;

export interface StoredPart extends LayablePart {
  id: number;
  importId: number;
}

const PART_SQL = `SELECT p.id, p.importId, p.unit, p.firstDay, p.codeList, p."values", p.codes, i.rule
  FROM Part p JOIN Import i ON i.id = p.importId
  WHERE p.stationId = ? AND p.quantity = ? AND i.state IN ${VISIBLE} ORDER BY p.importId, p.id`;

/** The parts of a station's record in the order in which they are laid. */
export function loadParts(connection: Connection, stationId: number, quantity: string): StoredPart[] {
  return (rows(connection, PART_SQL).all([stationId, quantity]) as PartRow[]).map(
    ([id, importId, unit, firstDay, codeList, values, codes, rule]) => ({
      id,
      importId,
      unit,
      firstDay,
      codeList: JSON.parse(codeList) as DayCode[],
      values: valuesOfBlob(values),
      codes: bytesOfBlob(codes),
      rule,
    }),
  );
}
type PartRow = [number, number, Unit, number, string, Buffer, Buffer, OverlapRule];

interface Place {
  stationId: number;
  quantity: Quantity;
}

/** The record of a station with one part: it points to it. */
export function pointAtPart({ stationId, quantity }: Place, part: LayablePart & { id: number }): RecordHead {
  const { unit, firstDay, values } = part;
  const summary = summarise({ unit, firstDay, values, flags: flagsOfCodes(part.codes, part.codeList) });
  return { stationId, quantity, unit, firstDay, days: values.length, ...summary, partId: part.id, laidId: null };
}

/** Stores laid days for a record to point to; when they are what the record holds already, nothing is stored anew.
 *  @param importId  the import on whose behalf they are laid: until it is over, no record points to them; null where the
 *                   record comes to point to them in the same transaction */
export function storeLaid(
  connection: Connection,
  { stationId, quantity }: Place,
  laid: LaidDays,
  { standing, importId }: { standing: Standing | null; importId: number | null },
): RecordHead {
  const summary = summarise(laid);
  const { unit, firstDay, values, flags } = laid;
  const head = { stationId, quantity, unit, firstDay, days: values.length, ...summary };
  if (standing?.hash === summary.hash) return { ...head, partId: standing.partId, laidId: standing.laidId };
  const { lastInsertRowid } = change(connection, 'INSERT INTO Laid (importId, "values", flags) VALUES (?, ?, ?)').run([
    importId,
    blobOfValues(values),
    blobOf(flags),
  ]);
  return { ...head, partId: null, laidId: Number(lastInsertRowid) };
}

/** Writes Records' rows: what readers go by. What the checks found on other days than these is forgotten. */
export function saveRecords(connection: Connection, heads: Iterable<RecordHead>): void {
  const save = change(
    connection,
    `INSERT INTO Record (stationId, quantity, partId, laidId, unit, firstDay, days, hash, valueCount, firstValueDay,
       lastValueDay, zeroCount) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)
     ON CONFLICT (stationId, quantity) DO UPDATE SET partId = excluded.partId, laidId = excluded.laidId,
       unit = excluded.unit, firstDay = excluded.firstDay, days = excluded.days, hash = excluded.hash,
       valueCount = excluded.valueCount, firstValueDay = excluded.firstValueDay, lastValueDay = excluded.lastValueDay,
       zeroCount = excluded.zeroCount, checked = CASE WHEN hash = excluded.hash THEN checked END,
       suspect = CASE WHEN hash = excluded.hash THEN suspect END`,
  );
  for (const head of heads) {
    save.run([
      ...[head.stationId, head.quantity, head.partId, head.laidId, head.unit, head.firstDay, head.days, head.hash],
      ...[head.valueCount, head.firstValueDay, head.lastValueDay, head.zeroCount],
    ]);
  }
}

/** A Record's pointers and hash, or null. */
export function standingRecord(connection: Connection, stationId: number, quantity: string): Standing | null {
  const row = rows(connection, 'SELECT hash, partId, laidId FROM Record WHERE stationId = ? AND quantity = ?').get([
    stationId,
    quantity,
  ]) as [string, number | null, number | null] | undefined;
  return row ? { hash: row[0], partId: row[1], laidId: row[2] } : null;
}
