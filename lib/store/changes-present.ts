import type { StationChange } from '../series/station-history.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { changesOf } from './history-text.ts';

/** The dated changes of a region's stations, by the station's id; stations without any are not in it. */
export function changesPresent(regionId: number, path = databasePath()): Map<number, StationChange[]> {
  const found = rows(
    sharedConnection(path),
    "SELECT id, changes FROM Station WHERE regionId = ? AND changes <> '[]' ORDER BY id",
  ).all([regionId]) as [number, string][];
  return new Map(found.map(([id, changes]) => [id, changesOf(changes)]));
}
