import { whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, sharedConnection, timestamp } from './connection.ts';
import { databasePath } from './database-url.ts';
import { rebuildDerived } from './derived.ts';
import { StoreError } from './errors.ts';
import { MARK_KINDS, type MarkKind, type MarkSpan } from './marks-on-flags.ts';
import { sweep } from './withdraw.ts';

/** A person's rejection, acceptance or note on a stretch of days. Laid over the record on reading; taking it away puts
 *  the record back. */
export interface MarkRow extends MarkSpan {
  id: number;
  stationId: number;
  /** of the station */
  code: string;
  quantity: string;
  reason: string;
  by: string;
  createdAt: Date;
}

const SELECT = `SELECT m.id, m.stationId, s.code, m.quantity, m.firstDay, m.lastDay, m.kind, m.reason, m."by", m.createdAt
  FROM Mark m JOIN Station s ON s.id = m.stationId`;

type Row = [number, number, string, string, number, number, MarkKind, string, string, string];

const toMark = ([id, stationId, code, quantity, firstDay, lastDay, kind, reason, by, createdAt]: Row): MarkRow => ({
  ...{ id, stationId, code, quantity, firstDay, lastDay, kind, reason, by, createdAt: new Date(createdAt) },
});

/** The marks on a station's record, in the order in which they are laid. */
export async function listMarks(stationId: number, quantity = 'flow'): Promise<MarkRow[]> {
  const sql = `${SELECT} WHERE m.stationId = ? AND m.quantity = ? ORDER BY m.id`;
  return (rows(sharedConnection(databasePath()), sql).all([stationId, quantity]) as Row[]).map(toMark);
}

/** The marks on the records of a region, by station and then in the order in which they are laid. */
export async function listRegionMarks(regionId: number): Promise<MarkRow[]> {
  const sql = `${SELECT} WHERE s.regionId = ? ORDER BY s.code, m.id`;
  return (rows(sharedConnection(databasePath()), sql).all([regionId]) as Row[]).map(toMark);
}

export interface NewMark extends MarkSpan {
  stationId: number;
  quantity?: string;
  reason: string;
  by?: string;
}

/** One answer to several stretches of a record. */
export interface NewMarks extends Omit<NewMark, 'firstDay' | 'lastDay'> {
  /** day numbers, both included */
  stretches: readonly Pick<MarkSpan, 'firstDay' | 'lastDay'>[];
}

/** Adds a mark on the days firstDay to lastDay (day numbers, both included). @throws as addMarks */
export async function addMark({ firstDay, lastDay, ...mark }: NewMark): Promise<MarkRow> {
  const [added] = await addMarks({ ...mark, stretches: [{ firstDay, lastDay }] });
  return added;
}

/** Adds the same mark to each of the stretches, all of them or none, and makes the records anew that are derived from the
 *  marked one.
 *  @returns in the order of the stretches
 *  @throws StoreError 'bad-input' when there is no stretch, the days of one run backwards, the kind is unknown or no reason
 *          is given, 'not-found' for a station that is not there */
export async function addMarks(mark: NewMarks): Promise<MarkRow[]> {
  const { stationId, quantity = 'flow', stretches, kind, by = '' } = mark;
  const reason = mark.reason.trim();
  if (!MARK_KINDS.includes(kind))
    throw new StoreError('bad-input', `A mark is ${MARK_KINDS.join(', ')}, not "${kind}".`);
  if (reason === '') throw new StoreError('bad-input', 'A mark needs a reason.');
  if (stretches.length === 0) throw new StoreError('bad-input', 'A mark needs days to lie on.');
  for (const { firstDay, lastDay } of stretches) {
    if (Number.isInteger(firstDay) && Number.isInteger(lastDay) && firstDay <= lastDay) continue;
    throw new StoreError(
      'bad-input',
      `A mark runs from a first day to a last one, and ${firstDay}–${lastDay} does not.`,
    );
  }
  return changing((connection) => {
    const insert = change(
      connection,
      `INSERT INTO Mark (stationId, quantity, firstDay, lastDay, kind, reason, "by", createdAt)
       SELECT id, ?, ?, ?, ?, ?, ?, ? FROM Station WHERE id = ?`,
    );
    const read = rows(connection, `${SELECT} WHERE m.id = ?`);
    const at = timestamp();
    const added = stretches.map(({ firstDay, lastDay }) => {
      const made = insert.run([quantity, firstDay, lastDay, kind, reason, by, at, stationId]);
      if (made.changes === 0) throw new StoreError('not-found', 'The station is not there any more.');
      return toMark(read.get([Number(made.lastInsertRowid)]) as Row);
    });
    rebuildDerived(connection, [stationId]);
    return added;
  });
}

/** Takes a mark away, and makes the records anew that are derived from the one it was on.
 *  @param stationId  the station that it must be on; any by default
 *  @returns false when there is no such mark */
export function removeMark(id: number, stationId?: number): Promise<boolean> {
  return changing((connection) => {
    const found = rows(connection, 'SELECT stationId FROM Mark WHERE id = ?').get([id]) as [number] | undefined;
    if (!found || (stationId !== undefined && found[0] !== stationId)) return false;
    change(connection, 'DELETE FROM Mark WHERE id = ?').run([id]);
    rebuildDerived(connection, found);
    return true;
  });
}

/** One transaction, and then the days go that no record points to any more. */
async function changing<Result>(write: (connection: Connection) => Result): Promise<Result> {
  const connection = sharedConnection(databasePath());
  const result = await whenFree(() => immediately(connection, () => write(connection)));
  await sweep(connection);
  return result;
}
