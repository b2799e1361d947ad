import { isBusy, whenFree } from './busy.ts';
import { change, immediately, rows, sharedConnection, timestamp } from './connection.ts';
import { databasePath } from './database-url.ts';

/** Size of all stored results at most, bytes; the least recently used go first. */
const RESULTS_LIMIT = 256 * 2 ** 20;

/** How stale `lastUsed` may grow before a reading is noted, milliseconds: a write for every reading would cost more than
 *  it tells. */
const NOTE_AFTER_MS = 60_000;

/** The stored result of an analysis under the key of all that it depends on, or null. Synchronous, by libsql alone. */
export function getResult(kind: string, key: string, path = databasePath()): Uint8Array | null {
  const found = rows(sharedConnection(path), 'SELECT id, lastUsed, bytes FROM Result WHERE kind = ? AND key = ?').get([
    kind,
    key,
  ]) as [number, string, Buffer] | undefined;
  if (!found) return null;
  const [id, lastUsed, bytes] = found;
  if (Date.now() - Date.parse(lastUsed) > NOTE_AFTER_MS) noteUse(id, path);
  return bytes;
}

/** A reading that cannot be noted, because someone else writes, is noted another time. */
function noteUse(id: number, path: string): void {
  try {
    const connection = sharedConnection(path);
    immediately(connection, () =>
      change(connection, 'UPDATE Result SET lastUsed = ? WHERE id = ?').run([timestamp(), id]),
    );
  } catch (error) {
    if (!isBusy(error)) throw error;
  }
}

/** Stores a result, replacing the one of that key, and makes room for it. Call it off the request's path.
 *  @returns false when the result alone is larger than the limit, and was not stored
 *  @throws StoreBusyError when others kept the lock */
export async function putResult(
  kind: string,
  key: string,
  bytes: Uint8Array,
  { limitBytes = RESULTS_LIMIT, path = databasePath() } = {},
): Promise<boolean> {
  if (bytes.byteLength > limitBytes) return false;
  const connection = sharedConnection(path);
  await whenFree(() =>
    immediately(connection, () => {
      change(connection, 'DELETE FROM Result WHERE kind = ? AND key = ?').run([kind, key]);
      makeRoom(path, limitBytes - bytes.byteLength);
      change(connection, 'INSERT INTO Result (kind, key, size, lastUsed, bytes) VALUES (?, ?, ?, ?, ?)').run([
        kind,
        key,
        bytes.byteLength,
        timestamp(),
        Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength),
      ]);
    }),
  );
  return true;
}

function makeRoom(path: string, limit: number): void {
  const connection = sharedConnection(path);
  let [total] = rows(connection, 'SELECT COALESCE(SUM(size), 0) FROM Result').get([]) as [number];
  if (total <= limit) return;
  const oldest = rows(connection, 'SELECT id, size FROM Result ORDER BY lastUsed, id').all([]) as [number, number][];
  const remove = change(connection, 'DELETE FROM Result WHERE id = ?');
  for (const [id, size] of oldest) {
    if (total <= limit) return;
    remove.run([id]);
    total -= size;
  }
}
