import { whenFree } from './busy.ts';
import { change, immediately, rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';
import { REJECTED } from './links.ts';

/** A pair of stations that a person said are not one below the other, by code. */
export interface RejectedLink {
  upstream: string;
  downstream: string;
}

/** Pairs that are not to be suggested again, by the upper station's code. */
export async function rejectedLinks(regionId: number, path = databasePath()): Promise<RejectedLink[]> {
  const found = rows(
    sharedConnection(path),
    `SELECT u.code, d.code FROM Link l JOIN Station u ON u.id = l.upstreamId JOIN Station d ON d.id = l.downstreamId
     WHERE l.regionId = ? AND l.source = ? ORDER BY u.code, d.code`,
  ).all([regionId, REJECTED]) as [string, string][];
  return found.map(([upstream, downstream]) => ({ upstream, downstream }));
}

/** Remembers that a suggested pair is none, or forgets that again. A link that a person made stays as it is.
 *  @throws StoreError 'not-found' for a code that the region does not have */
export async function rejectLink(
  regionId: number,
  { upstream, downstream }: RejectedLink,
  rejected: boolean,
  path = databasePath(),
): Promise<void> {
  const connection = sharedConnection(path);
  const write = () => {
    const [upperId, lowerId] = [upstream, downstream].map((code) => {
      const find = rows(connection, 'SELECT id FROM Station WHERE regionId = ? AND code = ?');
      const found = find.get([regionId, code]) as [number] | undefined;
      if (!found) throw new StoreError('not-found', `The region has no station "${code}".`);
      return found[0];
    });
    if (!rejected) {
      change(connection, 'DELETE FROM Link WHERE upstreamId = ? AND downstreamId = ? AND source = ?').run([
        ...[upperId, lowerId, REJECTED],
      ]);
      return;
    }
    change(
      connection,
      `INSERT INTO Link (regionId, upstreamId, downstreamId, source) VALUES (?, ?, ?, ?)
       ON CONFLICT (upstreamId, downstreamId) DO NOTHING`,
    ).run([regionId, upperId, lowerId, REJECTED]);
  };
  await whenFree(() => immediately(connection, write));
}
