import type { Quantity } from '../series/quantities.ts';
import { refuseForArea } from './area-error.ts';
import { whenFree } from './busy.ts';
import { type Connection, change, immediately, rows, sharedConnection, timestamp } from './connection.ts';
import { databasePath } from './database-url.ts';
import { rebuildRegion } from './derived.ts';
import { StoreError } from './errors.ts';
import { beatImports, refuseWhileOthersChange, VISIBLE } from './import-claim.ts';
import { layParts } from './lay-parts.ts';
import { loadParts, pointAtPart, type RecordHead, saveRecords, standingRecord, storeLaid } from './lay-record.ts';
import { inSlices, type SliceOptions } from './slices.ts';
import { areasAfterUndo, undoFacts } from './undo-facts.ts';
import { recoverImports, sweep } from './withdraw.ts';

export interface Undone {
  regionId: number;
  /** records that changed or went */
  records: number;
  stationsRemoved: number;
}

/** Undoes an import, whichever came after it: its parts go, the records they touched are laid anew from the parts that
 *  remain, the facts and layers it changed are as they would be without it, and the stations it made go (with a person's
 *  marks on them) unless another import has days of them or names them. The region stays.
 *
 *  All of it shows at once. When the process dies on the way, recoverImports leaves the import as it was, or gone.
 *  @throws StoreError 'not-found'; StoreBusyError while another import is being stored; ImportRefused when what remains
 *          cannot be put into one unit without a drainage area that this import brought */
export async function undoImport(
  importId: number,
  { path = databasePath(), ...slices }: Pick<SliceOptions, 'sliceMs' | 'signal'> & { path?: string } = {},
): Promise<Undone> {
  const connection = sharedConnection(path);
  await recoverImports(connection);
  const regionId = await whenFree(() => immediately(connection, () => claim(connection, importId)), { waitMs: 30_000 });
  try {
    const undone = await undoClaimed(connection, { importId, regionId }, slices);
    await sweep(connection, slices);
    return undone;
  } catch (error) {
    const back = "UPDATE Import SET state = 'applied' WHERE id = ? AND state = 'undoing'";
    await whenFree(() => immediately(connection, () => change(connection, back).run([importId])));
    await sweep(connection, slices);
    throw error;
  }
}

function claim(connection: Connection, importId: number): number {
  refuseWhileOthersChange(connection);
  const found = rows(connection, "SELECT regionId FROM Import WHERE id = ? AND state = 'applied'").get([importId]);
  if (!found) throw new StoreError('not-found', `There is no import ${importId} to undo.`);
  change(connection, "UPDATE Import SET state = 'undoing', heartbeat = ? WHERE id = ?").run([timestamp(), importId]);
  return (found as [number])[0];
}

interface Touched {
  stationId: number;
  code: string;
  quantity: Quantity;
  areaKm2: number | null;
}

async function undoClaimed(
  connection: Connection,
  { importId, regionId }: { importId: number; regionId: number },
  slices: SliceOptions,
): Promise<Undone> {
  const touched = touchedRecords(connection, importId, regionId);
  const heads: RecordHead[] = [];
  const gone: Touched[] = [];
  const before = () => beatImports(connection, [importId], 'undoing');
  await inSlices(connection, touched, (record) => relay(connection, importId, record, heads, gone), {
    ...slices,
    before,
  });
  return whenFree(
    () =>
      immediately(connection, () => {
        before();
        const remove = change(connection, 'DELETE FROM Record WHERE stationId = ? AND quantity = ?');
        for (const { stationId, quantity } of gone) remove.run([stationId, quantity]);
        saveRecords(connection, heads);
        change(connection, "UPDATE Import SET state = 'undone' WHERE id = ?").run([importId]);
        const stationsRemoved = undoFacts(connection, { importId, regionId });
        rebuildRegion(connection, regionId, null);
        return { regionId, records: touched.length, stationsRemoved };
      }),
    { waitMs: 60_000 },
  );
}

/** The records with a part of the import, and those that lie in another way once its drainage areas are gone. */
function touchedRecords(connection: Connection, importId: number, regionId: number): Touched[] {
  const areas = areasAfterUndo(connection, { importId, regionId });
  const found = rows(
    connection,
    `SELECT s.id, s.code, p.quantity, s.areaKm2, MAX(p.importId = ?), SUM(p.importId <> ?) FROM Part p
     JOIN Station s ON s.id = p.stationId JOIN Import i ON i.id = p.importId
     WHERE s.regionId = ? AND i.state IN ${VISIBLE} GROUP BY s.id, p.quantity`,
  ).all([importId, importId, regionId]) as [number, string, Quantity, number | null, number, number][];
  return found
    .filter(([, code, , , mine, others]) => mine === 1 || (areas.has(code) && others > 1))
    .map(([stationId, code, quantity, areaKm2]) => ({
      ...{ stationId, code, quantity },
      areaKm2: areas.has(code) ? (areas.get(code) ?? null) : areaKm2,
    }));
}

function relay(connection: Connection, importId: number, record: Touched, heads: RecordHead[], gone: Touched[]): void {
  const parts = loadParts(connection, record.stationId, record.quantity).filter((part) => part.importId !== importId);
  if (parts.length === 0) {
    gone.push(record);
    return;
  }
  if (parts.length === 1) {
    heads.push(pointAtPart(record, parts[0]));
    return;
  }
  const { code, areaKm2 } = record;
  refuseForArea(parts, { code, areaKm2 }, () => nameOf(connection, importId));
  const standing = standingRecord(connection, record.stationId, record.quantity);
  // A record that points to a part of this import must move on even where its days stay the same.
  const mayStay = standing?.partId == null || parts.some(({ id }) => id === standing.partId);
  const laid = layParts(parts, { quantity: record.quantity, areaKm2 });
  heads.push(storeLaid(connection, record, laid, { standing: mayStay ? standing : null, importId }));
}

const nameOf = (connection: Connection, importId: number): string =>
  (rows(connection, 'SELECT fileName FROM Import WHERE id = ?').get([importId]) as [string])[0];
