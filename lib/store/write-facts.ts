import type { Plan, PlannedStation } from './apply-plan.ts';
import { type Connection, change, rows } from './connection.ts';
import { FACT_NAMES } from './station-facts.ts';
import type { LayerBefore, StationsBefore } from './undo-trail.ts';

/** Writes the stations that an import makes or changes, and into each file's import what it said and what stood before. */
export function writeFacts(
  connection: Connection,
  regionId: number,
  { stations, said }: Pick<Plan, 'stations' | 'said'>,
  imports: ReadonlyMap<number, number>,
): void {
  for (const station of stations.values()) {
    if (station.madeBy !== null) insertStation(connection, regionId, station, imports.get(station.madeBy) ?? null);
    else if (station.changed) updateStation(connection, station);
  }
  for (const [file, changes] of said) {
    const before: StationsBefore = { stations: changes };
    remember(connection, imports.get(file)!, before);
  }
}

/** @param createdBy  the import that brings the station, whose undo takes it away; null for one made by hand */
export function insertStation(
  connection: Connection,
  regionId: number,
  { id, code, facts }: Pick<PlannedStation, 'id' | 'code' | 'facts'>,
  createdBy: number | null,
): void {
  change(
    connection,
    `INSERT INTO Station (id, regionId, code, createdBy, ${FACT_NAMES.join(', ')})
       VALUES (?, ?, ?, ?, ${FACT_NAMES.map(() => '?').join(', ')})`,
  ).run([id, regionId, code, createdBy, ...FACT_NAMES.map((name) => facts[name])]);
}

/** Writes all facts of a station that is there. */
export function updateStation(connection: Connection, { id, facts }: Pick<PlannedStation, 'id' | 'facts'>): void {
  change(connection, `UPDATE Station SET ${FACT_NAMES.map((name) => `${name} = ?`).join(', ')} WHERE id = ?`).run([
    ...FACT_NAMES.map((name) => facts[name]),
    id,
  ]);
}

/** Writes the staged layers, each over the one of its name, and into its import what stood before. */
export function writeLayers(connection: Connection, regionId: number, imports: ReadonlyMap<number, number>): void {
  const staged = rows(connection, 'SELECT file, name, kind, geojson FROM staging.layer ORDER BY file').all([]);
  const save = change(
    connection,
    `INSERT INTO main.Layer (regionId, name, kind, geojson, importId) VALUES (?, ?, ?, ?, ?)
     ON CONFLICT (regionId, name) DO UPDATE SET kind = excluded.kind, geojson = excluded.geojson, importId = excluded.importId`,
  );
  const standing = rows(connection, 'SELECT kind, geojson, importId FROM main.Layer WHERE regionId = ? AND name = ?');
  for (const [file, name, kind, geojson] of staged as [number, string, string, string][]) {
    const old = standing.get([regionId, name]) as [string, string, number | null] | undefined;
    const before: LayerBefore = {
      layer: { name, old: old ? { kind: old[0], geojson: old[1], importId: old[2] } : null },
    };
    remember(connection, imports.get(file)!, before);
    save.run([regionId, name, kind, geojson, imports.get(file)!]);
  }
}

function remember(connection: Connection, importId: number, before: StationsBefore | LayerBefore): void {
  change(connection, 'UPDATE Import SET "before" = ? WHERE id = ?').run([JSON.stringify(before), importId]);
}
