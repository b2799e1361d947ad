import type { Quantity } from '../series/quantities.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';

/** The quantities of which each station of a region has a record, by the station's id; stations without any are not in it. */
export function quantitiesPresent(regionId: number, path = databasePath()): Map<number, Quantity[]> {
  const found = rows(
    sharedConnection(path),
    `SELECT r.stationId, r.quantity FROM Record r JOIN Station s ON s.id = r.stationId
     WHERE s.regionId = ? AND r.valueCount > 0 ORDER BY r.stationId, r.quantity`,
  ).all([regionId]) as [number, Quantity][];
  const present = new Map<number, Quantity[]>();
  for (const [stationId, quantity] of found) present.set(stationId, [...(present.get(stationId) ?? []), quantity]);
  return present;
}
