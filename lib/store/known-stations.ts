import type { KnownStation } from '../intake/types.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';

/** Whether a region's stations come from a registry, or measured ones were made by hand, and not only by flows. */
export const HAS_REGISTRY = `SELECT EXISTS (SELECT 1 FROM Import WHERE regionId = ? AND kind = 'registry' AND state = 'applied')
  OR EXISTS (SELECT 1 FROM Station WHERE regionId = ? AND createdBy IS NULL AND derived IS NULL)`;

/** The stations that flows of a region may name; null where the region has no registry, so that flows make stations. */
export function knownStations(regionId: number, path = databasePath()): KnownStation[] | null {
  const [hasRegistry] = rows(sharedConnection(path), HAS_REGISTRY).get([regionId, regionId]) as [number];
  if (hasRegistry === 0) return null;
  const found = rows(sharedConnection(path), 'SELECT code, name FROM Station WHERE regionId = ? ORDER BY code').all([
    regionId,
  ]);
  return (found as [string, string][]).map(([code, name]) => ({ code, name }));
}
