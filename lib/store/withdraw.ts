import { isBusy, whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, timestamp } from './connection.ts';
import { DEAD_AFTER_MS } from './dead-after.ts';
import { type Counters, restoreCounters } from './import-claim.ts';
import { inSlices, type SliceOptions } from './slices.ts';

/** Takes back imports that were being applied: nothing of them was to be seen yet, and then nothing of them is left. */
export async function withdraw(
  connection: Connection,
  importIds: readonly number[],
  counters?: Counters,
): Promise<void> {
  await whenFree(() =>
    immediately(connection, () => {
      const remove = change(connection, "UPDATE Import SET state = 'undone' WHERE id = ? AND state = 'applying'");
      for (const id of importIds) remove.run([id]);
    }),
  );
  await sweep(connection);
  if (counters) await whenFree(() => immediately(connection, () => restoreCounters(connection, counters)));
}

/** Removes what no reader can reach: parts of imports that are undone or gone, days laid for a record that moved on. What
 *  cannot be removed because others keep writing goes with the next sweep. */
export async function sweep(connection: Connection, { sliceMs }: Pick<SliceOptions, 'sliceMs'> = {}): Promise<void> {
  const removePart = change(connection, 'DELETE FROM Part WHERE id = ?');
  const removeLaid = change(connection, 'DELETE FROM Laid WHERE id = ?');
  try {
    await inSlices(connection, ids(connection, LOST_PARTS), (id) => void removePart.run([id]), { sliceMs });
    await inSlices(connection, ids(connection, LOST_LAID), (id) => void removeLaid.run([id]), { sliceMs });
    await whenFree(() => connection.exec(EMPTY_IMPORTS));
  } catch (error) {
    if (!isBusy(error)) throw error;
  }
}

const EMPTY_IMPORTS = `DELETE FROM Import
  WHERE state = 'undone' AND NOT EXISTS (SELECT 1 FROM Part WHERE Part.importId = Import.id)`;
const LOST_PARTS = "SELECT id FROM Part WHERE importId NOT IN (SELECT id FROM Import WHERE state <> 'undone')";
const LOST_LAID = `SELECT id FROM Laid WHERE id NOT IN (SELECT laidId FROM Record WHERE laidId IS NOT NULL)
  AND (importId IS NULL OR importId NOT IN (SELECT id FROM Import WHERE state IN ('applying', 'undoing')))`;

const ids = (connection: Connection, sql: string): number[] => rows(connection, sql).all([]).flat() as number[];

/** Takes back what imports left whose writer died: those being applied vanish, those being undone stand as before, and
 *  undone ones are cleared away. Harmless beside imports that live. */
export async function recoverImports(connection: Connection, deadAfterMs = DEAD_AFTER_MS): Promise<number[]> {
  const before = timestamp(new Date(Date.now() - deadAfterMs));
  const dead = await whenFree(() =>
    immediately(connection, () => {
      const applying = rows(connection, "SELECT id FROM Import WHERE state = 'applying' AND heartbeat < ?").all([
        before,
      ]);
      const end = change(
        connection,
        `UPDATE Import SET state = CASE state WHEN 'applying' THEN 'undone' ELSE 'applied' END
         WHERE state IN ('applying', 'undoing') AND heartbeat < ?`,
      );
      end.run([before]);
      return applying.flat() as number[];
    }),
  );
  await sweep(connection);
  return dead;
}
