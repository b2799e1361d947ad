import type { Plan } from './apply-plan.ts';
import { type ArchivedRegion, writeArchivedRegion } from './archived-region.ts';
import type { Claim } from './claim-import.ts';
import { type Connection, change, rows, timestamp } from './connection.ts';
import { rebuildRegion } from './derived.ts';
import { StoreError } from './errors.ts';
import { saveRecords } from './lay-record.ts';
import type { GroupWork } from './store-group.ts';
import { writeFacts, writeLayers } from './write-facts.ts';

/** The last slice of an import: writes all that readers go by, with the records that are derived from what it brings. */
export function showImport(connection: Connection, claim: Claim, plan: Plan, work: GroupWork): void {
  const { regionId, newRegion, imports } = claim;
  if (newRegion) insertRegion(connection, claim);
  writeFacts(connection, regionId, plan, imports);
  writeLayers(connection, regionId, imports);
  saveRecords(connection, work.heads);
  const archived = rows(connection, 'SELECT facts FROM staging.region').get([]) as [string] | undefined;
  if (archived) {
    const about = { regionId, regionMade: newRegion !== null };
    writeArchivedRegion(connection, about, JSON.parse(archived[0]) as ArchivedRegion);
  }
  // Before what is derived: records rest on the parts of applied imports.
  const end = change(connection, "UPDATE Import SET state = 'applied' WHERE id = ?");
  for (const id of imports.values()) end.run([id]);
  const touched = [...plan.stations.values()].filter(({ changed, madeBy }) => changed || madeBy !== null);
  const changed = [...work.heads.map(({ stationId }) => stationId), ...touched.map(({ id }) => id)];
  rebuildRegion(connection, regionId, new Set(changed));
  const flows = rows(connection, "SELECT id FROM staging.file WHERE kind = 'flows'").all([]).flat() as number[];
  const revised = change(connection, 'UPDATE Import SET revisions = ? WHERE id = ?');
  for (const file of flows) revised.run([JSON.stringify(work.counterOf(file).revisions()), imports.get(file)!]);
}

function insertRegion(connection: Connection, { regionId, slug, newRegion }: Claim): void {
  const { name, invented } = newRegion!;
  if (rows(connection, 'SELECT 1 FROM Region WHERE slug = ?').get([slug])) {
    throw new StoreError('exists', `A region named "${name}" was made meanwhile; import into it.`);
  }
  const values = [regionId, slug, name, invented ? 1 : 0, timestamp()];
  change(connection, 'INSERT INTO Region (id, slug, name, invented, createdAt) VALUES (?, ?, ?, ?, ?)').run(values);
}
