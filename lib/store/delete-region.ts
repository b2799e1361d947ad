import { whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';
import { refuseWhileOthersChange } from './import-claim.ts';
import { sweep } from './withdraw.ts';

/** Takes a region away with all that belongs to it: at once for readers, its days in slices afterwards.
 *  @throws StoreError 'not-found'; StoreBusyError while an import is being stored */
export async function deleteRegion(slug: string, path = databasePath()): Promise<void> {
  const connection = sharedConnection(path);
  await whenFree(() => immediately(connection, () => remove(connection, slug)));
  await sweep(connection);
}

function remove(connection: Connection, slug: string): void {
  refuseWhileOthersChange(connection);
  const found = rows(connection, 'SELECT id FROM Region WHERE slug = ?').get([slug]) as [number] | undefined;
  if (!found) throw new StoreError('not-found', `There is no region "${slug}".`);
  for (const table of ['Record', 'Mark', 'Finding']) {
    const sql = `DELETE FROM ${table} WHERE stationId IN (SELECT id FROM Station WHERE regionId = ?)`;
    change(connection, sql).run([found[0]]);
  }
  for (const table of ['Link', 'SavedMapping', 'Station', 'Layer', 'Basis', 'Job', 'Import']) {
    change(connection, `DELETE FROM ${table} WHERE regionId = ?`).run([found[0]]);
  }
  change(connection, 'DELETE FROM Region WHERE id = ?').run([found[0]]);
}
