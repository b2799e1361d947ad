import { type Connection, change } from './connection.ts';

/** Takes a station away with all that hangs on it but its parts, which only an undo takes. Inside a transaction; foreign
 *  keys are not enforced here, so that each table is named. */
export function deleteStation(connection: Connection, id: number): void {
  for (const table of ['Record', 'Mark', 'Finding']) {
    change(connection, `DELETE FROM ${table} WHERE stationId = ?`).run([id]);
  }
  change(connection, 'DELETE FROM Link WHERE upstreamId = ? OR downstreamId = ?').run([id, id]);
  change(connection, 'DELETE FROM Station WHERE id = ?').run([id]);
}
