import { createHash } from 'node:crypto';
import type { DailySeries } from '../series/daily-series.ts';
import { type DayCode, flagsOfCodes } from '../series/day-codes.ts';
import type { FlowUnit } from '../series/flow-units.ts';
import { toM3s } from '../series/flow-units.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { hashAsRead } from './hash-as-read.ts';
import { layMarks, laySuspect, type MarkSpan } from './marks-on-flags.ts';

/** The suspect stretches of a record as JSON; null for none. */
const SUSPECT = "NULLIF(r.suspect, '[]')";

const RECORD_SQL = `SELECT r.hash, r.unit, r.firstDay, s.areaKm2, p.codeList, COALESCE(l."values", p."values"),
    COALESCE(l.flags, p.codes), ${SUSPECT}
  FROM Record r JOIN Station s ON s.id = r.stationId
  LEFT JOIN Laid l ON l.id = r.laidId LEFT JOIN Part p ON p.id = r.partId
  WHERE r.stationId = ? AND r.quantity = ?`;

const MARKS_SQL = 'SELECT firstDay, lastDay, kind FROM Mark WHERE stationId = ? AND quantity = ? ORDER BY id';

/** Reads records one after the other, each only while it is visited, so that memory holds one at a time.
 *
 *  Synchronous, by libsql alone: good in worker threads. A station without a record is not visited.
 *  @param visit  gets the station's id, its days and the hash of the record as read. Values are m³/s; NaN throughout where
 *                they are a depth and the station has no drainage area. Days that the checks found suspect carry that bit
 *                unless a person accepted them; rejected days carry the rejected bit. The arrays are the visitor's to keep. */
export function readSeries(
  stationIds: readonly number[] | Int32Array,
  visit: (stationId: number, series: DailySeries, hash: string) => void,
  { quantity = 'flow', path = databasePath() } = {},
): void {
  const marksOf = rows(sharedConnection(path), MARKS_SQL);
  readStored(
    stationIds,
    (stationId, series, { hash, ...record }) => {
      const marks = marksOf.all([stationId, quantity]).map(toSpan);
      if (record.suspect !== null) laySuspect(series.flags, series.firstDay, JSON.parse(record.suspect) as number[]);
      layMarks(series.flags, series.firstDay, marks);
      visit(stationId, series, hashAsRead(hash, { ...record, marks }));
    },
    { quantity, path },
  );
}

/** What stands beside the days of a record. */
export interface StoredRecord {
  /** its own hash, whatever is laid over it */
  hash: string;
  unit: FlowUnit;
  areaKm2: number | null;
  suspect: string | null;
}

/** Reads records as they are stored, without suspect stretches and marks; otherwise as readSeries does. */
export function readStored(
  stationIds: readonly number[] | Int32Array,
  visit: (stationId: number, series: DailySeries, record: StoredRecord) => void,
  { quantity = 'flow', path = databasePath() } = {},
): void {
  const record = rows(sharedConnection(path), RECORD_SQL);
  for (const stationId of stationIds) {
    const row = record.get([stationId, quantity]) as
      | [string, FlowUnit, number, number | null, string | null, Buffer, Buffer, string | null]
      | undefined;
    if (!row) continue;
    const [hash, unit, firstDay, areaKm2, codeList, values, flags, suspect] = row;
    const series = {
      firstDay,
      values: quantity === 'flow' ? inM3s(valuesOfBlob(values), unit, areaKm2) : valuesOfBlob(values),
      flags:
        codeList === null ? bytesOfBlob(flags) : flagsOfCodes(bytesOfBlob(flags), JSON.parse(codeList) as DayCode[]),
    };
    visit(stationId, series, { hash, unit, areaKm2, suspect });
  }
}

function toSpan(row: unknown): MarkSpan {
  const [firstDay, lastDay, kind] = row as [number, number, MarkSpan['kind']];
  return { firstDay, lastDay, kind };
}

function inM3s(values: Float64Array, unit: FlowUnit, areaKm2: number | null): Float64Array {
  if (unit === 'm3/s') return values;
  const factor = toM3s(unit, areaKm2);
  // The blob was made for this call: nobody else sees it change.
  for (let day = 0; day < values.length; day++) values[day] *= factor;
  return values;
}

/** What a station's record of daily flows holds, without its days. */
export interface StationRecord {
  stationId: number;
  code: string;
  /** of the record as read: days, flags, suspect stretches, marks, and the area where values are a depth over it */
  hash: string;
  /** as the first part was written */
  unit: FlowUnit;
  firstDay: number;
  days: number;
  /** days with a value, and the first and last of them; null when there is none */
  valueCount: number;
  firstValueDay: number | null;
  lastValueDay: number | null;
  zeroCount: number;
}

const HEADS_SQL = `SELECT s.id, s.code, s.areaKm2, r.hash, r.unit, r.firstDay, r.days, r.valueCount, r.firstValueDay,
    r.lastValueDay, r.zeroCount, ${SUSPECT}
  FROM Station s JOIN Record r ON r.stationId = s.id AND r.quantity = 'flow' WHERE s.regionId = ? ORDER BY s.code`;

const REGION_MARKS_SQL = `SELECT m.firstDay, m.lastDay, m.kind, m.stationId FROM Mark m JOIN Station s ON s.id = m.stationId
  WHERE s.regionId = ? AND m.quantity = 'flow' ORDER BY m.id`;

/** The records of a region's stations, by code; stations without one are not in the list. */
export async function stationRecords(regionId: number): Promise<StationRecord[]> {
  return recordsOf(regionId, databasePath());
}

function recordsOf(regionId: number, path: string): StationRecord[] {
  const marks = new Map<number, MarkSpan[]>();
  for (const row of rows(sharedConnection(path), REGION_MARKS_SQL).all([regionId])) {
    const stationId = (row as number[])[3];
    marks.set(stationId, [...(marks.get(stationId) ?? []), toSpan(row)]);
  }
  return (rows(sharedConnection(path), HEADS_SQL).all([regionId]) as HeadRow[]).map(
    ([
      stationId,
      code,
      areaKm2,
      hash,
      unit,
      firstDay,
      days,
      valueCount,
      firstValueDay,
      lastValueDay,
      zeroCount,
      suspect,
    ]) => ({
      stationId,
      code,
      hash: hashAsRead(hash, { unit, areaKm2, suspect, marks: marks.get(stationId) ?? [] }),
      unit,
      firstDay,
      days,
      valueCount,
      firstValueDay,
      lastValueDay,
      zeroCount,
    }),
  );
}

type HeadRow = [
  stationId: number,
  code: string,
  areaKm2: number | null,
  hash: string,
  unit: FlowUnit,
  firstDay: number,
  days: number,
  valueCount: number,
  firstValueDay: number | null,
  lastValueDay: number | null,
  zeroCount: number,
  suspect: string | null,
];

/** SHA-256, hexadecimal, of all that analyses read of a region: the facts of its stations and their records with marks and suspect stretches.
 *  Equal exactly when these are. */
export function regionDataHash(regionId: number, path = databasePath()): string {
  const hash = createHash('sha256');
  const facts = rows(
    sharedConnection(path),
    `SELECT code, name, river, latitude, longitude, areaKm2, influence, derived FROM Station WHERE regionId = ?
     ORDER BY code`,
  );
  for (const row of facts.all([regionId])) hash.update(JSON.stringify(row)).update('\n');
  for (const record of recordsOf(regionId, path)) hash.update(`${record.code}\t${record.hash}\n`);
  return hash.digest('hex');
}
