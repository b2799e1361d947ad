import { StoreBusyError } from './busy.ts';
import { type Connection, change, rows, timestamp } from './connection.ts';
import { DEAD_AFTER_MS } from './dead-after.ts';
import { StoreError } from './errors.ts';

/** An import's life. Its parts are in records, and it is listed, while applied or undoing; otherwise it is not yet, or no
 *  longer, there for readers. */
export type ImportState = 'applying' | 'applied' | 'undoing' | 'undone';

/** In SQL: the imports whose parts make up the records. */
export const VISIBLE = "('applied', 'undoing')";

/** One change of records at a time: refuses while another import is being applied or undone and its writer lives. Call it
 *  inside the transaction that begins a change.
 *  @throws StoreBusyError */
export function refuseWhileOthersChange(connection: Connection, now = Date.now()): void {
  const alive = rows(
    connection,
    "SELECT fileName FROM Import WHERE state IN ('applying', 'undoing') AND heartbeat >= ? LIMIT 1",
  ).get([timestamp(new Date(now - DEAD_AFTER_MS))]) as [string] | undefined;
  if (alive) throw new StoreBusyError(`Another import (${alive[0]}) is being stored; try again when it is done.`);
}

/** Shows that the writer of these imports lives, and makes sure that nobody took it for dead meanwhile.
 *  @throws StoreError 'lost' when they are no longer in the state */
export function beatImports(connection: Connection, ids: readonly number[], state: 'applying' | 'undoing'): void {
  const beat = change(connection, 'UPDATE Import SET heartbeat = ? WHERE id = ? AND state = ?');
  for (const id of ids) {
    if (beat.run([timestamp(), id, state]).changes === 1) continue;
    throw new StoreError(
      'lost',
      'The import stood still for too long and was taken back; nothing was changed. Try again.',
    );
  }
}

const NUMBERED = ['Region', 'Station', 'Import', 'Part', 'Laid'] as const;
type Numbered = (typeof NUMBERED)[number];
export type Counters = Map<Numbered, number | null>;

/** The last id each table gave out; null where it gave none. */
export function readCounters(connection: Connection): Counters {
  const read = rows(connection, 'SELECT seq FROM sqlite_sequence WHERE name = ?');
  return new Map(NUMBERED.map((table) => [table, (read.get([table]) as [number] | undefined)?.[0] ?? null]));
}

/** Sets the counters back, so that a change that was taken back leaves no trace; never below an id in use. */
export function restoreCounters(connection: Connection, counters: Counters): void {
  for (const [table, before] of counters) {
    const [highest] = rows(connection, `SELECT MAX(id) FROM "${table}"`).get([]) as [number | null];
    if (before === null && highest === null) {
      change(connection, 'DELETE FROM sqlite_sequence WHERE name = ?').run([table]);
    } else {
      const seq = Math.max(before ?? 0, highest ?? 0);
      change(connection, 'UPDATE sqlite_sequence SET seq = ? WHERE name = ?').run([seq, table]);
    }
  }
}

/** Sets ids aside that no other writer will get: rows may name them before they exist. @returns the first of them */
export function reserveIds(connection: Connection, table: Numbered, count: number): number {
  const [last] = (rows(connection, 'SELECT seq FROM sqlite_sequence WHERE name = ?').get([table]) as
    | [number]
    | undefined) ?? [null];
  const sql =
    last === null
      ? 'INSERT INTO sqlite_sequence (seq, name) VALUES (?, ?)'
      : 'UPDATE sqlite_sequence SET seq = ? WHERE name = ?';
  change(connection, sql).run([(last ?? 0) + count, table]);
  return (last ?? 0) + 1;
}
