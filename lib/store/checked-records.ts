import { CHECKS_VERSION } from '../checks/checks-version.ts';
import type { Finding } from '../checks/finding.ts';
import { whenFree } from './busy.ts';
import { change, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';

/** What a check of a record rests on: while this is equal, so is what it finds. The day of checking is left out: a value on
 *  a day to come is found where it is, and checking anew after that day takes the finding away. */
const checkedText = (hash: string, areaKm2: number | null): string => `${CHECKS_VERSION}:${hash}:${areaKm2 ?? ''}`;

/** What the checks found on one record. */
export interface CheckedRecord {
  stationId: number;
  /** of the record that was checked, without what is laid over it */
  hash: string;
  areaKm2: number | null;
  findings: readonly Finding[];
  /** first and last day of every suspect stretch */
  suspect: readonly number[];
}

/** Puts what the checks found on records of daily flows in the place of what was found before, all in one transaction.
 *  A record that changed since it was checked is passed over: it stays unchecked.
 *  @returns how many records took their findings */
export function replaceFindings(checked: readonly CheckedRecord[], path = databasePath()): Promise<number> {
  const connection = sharedConnection(path);
  const claim = change(
    connection,
    "UPDATE Record SET checked = ?, suspect = ? WHERE stationId = ? AND quantity = 'flow' AND hash = ?",
  );
  const remove = change(connection, "DELETE FROM Finding WHERE stationId = ? AND quantity = 'flow'");
  const insert = change(
    connection,
    "INSERT INTO Finding (stationId, quantity, kind, firstDay, lastDay, days, detail) VALUES (?, 'flow', ?, ?, ?, ?, ?)",
  );
  const replace = (): number => {
    let taken = 0;
    for (const { stationId, hash, areaKm2, findings, suspect } of checked) {
      const stretches = suspect.length === 0 ? null : JSON.stringify(suspect);
      if (claim.run([checkedText(hash, areaKm2), stretches, stationId, hash]).changes === 0) continue;
      taken++;
      remove.run([stationId]);
      for (const { kind, firstDay, lastDay, days, detail } of findings) {
        insert.run([stationId, kind, firstDay, lastDay, days, JSON.stringify(detail)]);
      }
    }
    return taken;
  };
  return whenFree(() => immediately(connection, replace), { waitMs: 60_000 });
}

const FLOW_RECORDS = `SELECT r.stationId, r.checked, r.hash, s.areaKm2 FROM Record r JOIN Station s ON s.id = r.stationId
  WHERE s.regionId = ? AND r.quantity = 'flow' ORDER BY r.stationId`;

/** The stations of a region whose record of daily flows was never checked as it stands: by these checks, with these days and
 *  this drainage area. */
export function uncheckedRecords(regionId: number, path = databasePath()): number[] {
  const found = rows(sharedConnection(path), FLOW_RECORDS).all([regionId]) as [
    number,
    string | null,
    string,
    number | null,
  ][];
  return found
    .filter(([, checked, hash, areaKm2]) => checked !== checkedText(hash, areaKm2))
    .map(([stationId]) => stationId);
}

/** Every region's id. */
export function allRegions(path = databasePath()): number[] {
  return rows(sharedConnection(path), 'SELECT id FROM Region ORDER BY id').all([]).flat() as number[];
}
