import { type Connection, change, rows } from './connection.ts';
import { FACT_NAMES, type FactChange, type FactName } from './station-facts.ts';
import type { LayerBefore, RegistryBefore } from './undo-trail.ts';

interface UndoTask {
  importId: number;
  regionId: number;
}

interface Trail {
  id: number;
  before: Partial<RegistryBefore & LayerBefore>;
}

/** The drainage areas that stations will have once a registry's import is undone, by code; only those that change. */
export function areasAfterUndo(connection: Connection, task: UndoTask): Map<string, number | null> {
  const areas = new Map<string, number | null>();
  const { mine, later } = readTrails(connection, task);
  const area = rows(connection, 'SELECT areaKm2 FROM Station WHERE regionId = ? AND code = ?');
  for (const { code, fields } of mine.before.stations ?? []) {
    const change = fields.areaKm2;
    if (!change || laterChange(later, code, 'areaKm2')) continue;
    const stands = area.get([task.regionId, code]) as [number | null] | undefined;
    if (stands?.[0] === change[1]) areas.set(code, change[0] as number | null);
  }
  return areas;
}

/** Puts back the facts and the layer that an import changed, and takes away the stations it made that nobody else needs.
 *
 *  What a later import changed again stays as that one left it, and that one then takes over what stood before; what a
 *  person changed since stays too.
 *  @returns the number of stations taken away */
export function undoFacts(connection: Connection, task: UndoTask): number {
  const { mine, later, others } = readTrails(connection, task);
  for (const change of mine.before.stations ?? []) restoreFacts(connection, task.regionId, change, later);
  if (mine.before.layer) restoreLayer(connection, task, mine.before.layer, later);
  return releaseStations(connection, task.importId, others);
}

function readTrails(connection: Connection, { importId, regionId }: UndoTask) {
  const found = rows(
    connection,
    `SELECT id, "before" FROM Import WHERE regionId = ? AND (state = 'applied' OR id = ?) AND kind <> 'flows' ORDER BY id`,
  ).all([regionId, importId]) as [number, string][];
  const trails: Trail[] = found.map(([id, before]) => ({ id, before: JSON.parse(before) }));
  return {
    mine: trails.find(({ id }) => id === importId) ?? { id: importId, before: {} },
    later: trails.filter(({ id }) => id > importId),
    others: trails.filter(({ id }) => id !== importId),
  };
}

/** The first later import that changed a fact again, with what it did. */
function laterChange(later: readonly Trail[], code: string, name: FactName) {
  for (const trail of later) {
    const change = trail.before.stations?.find((station) => station.code === code);
    if (change?.fields[name]) return { trail, change };
  }
  return null;
}

function restoreFacts(
  connection: Connection,
  regionId: number,
  { code, fields }: FactChange,
  later: readonly Trail[],
): void {
  for (const name of FACT_NAMES) {
    const field = fields[name];
    if (!field) continue;
    const [old, mine] = field;
    const next = laterChange(later, code, name);
    if (next) {
      const given = next.change.fields[name]![1];
      if (given === old) delete next.change.fields[name];
      else next.change.fields[name] = [old, given];
      saveTrail(connection, next.trail);
    } else {
      change(connection, `UPDATE Station SET ${name} = ? WHERE regionId = ? AND code = ? AND ${name} IS ?`).run([
        old,
        regionId,
        code,
        mine,
      ]);
    }
  }
}

function restoreLayer(
  connection: Connection,
  { importId, regionId }: UndoTask,
  { name, old }: LayerBefore['layer'],
  later: readonly Trail[],
): void {
  const next = later.find(({ before }) => before.layer?.name === name);
  if (next?.before.layer) {
    next.before.layer.old = old;
    saveTrail(connection, next);
  } else if (old) {
    change(
      connection,
      'UPDATE Layer SET kind = ?, geojson = ?, importId = ? WHERE regionId = ? AND name = ? AND importId = ?',
    ).run([old.kind, old.geojson, old.importId, regionId, name, importId]);
  } else {
    change(connection, 'DELETE FROM Layer WHERE regionId = ? AND name = ? AND importId = ?').run([
      regionId,
      name,
      importId,
    ]);
  }
}

const saveTrail = (connection: Connection, { id, before }: Trail): void =>
  void change(connection, 'UPDATE Import SET "before" = ? WHERE id = ?').run([JSON.stringify(before), id]);

/** Stations that the import made pass to the next import that has days of them or names them; the others go. */
function releaseStations(connection: Connection, importId: number, others: readonly Trail[]): number {
  const namedBy = new Map<string, number>();
  for (const { id, before } of [...others].reverse()) {
    for (const { code } of before.stations ?? []) namedBy.set(code, id);
  }
  const made = rows(connection, 'SELECT id, code FROM Station WHERE createdBy = ?').all([importId]) as [
    number,
    string,
  ][];
  const nextPart = rows(
    connection,
    "SELECT MIN(p.importId) FROM Part p JOIN Import i ON i.id = p.importId WHERE p.stationId = ? AND i.state = 'applied'",
  );
  let removed = 0;
  for (const [id, code] of made) {
    const [withDays] = nextPart.get([id]) as [number | null];
    const heirs = [withDays, namedBy.get(code)].filter((heir) => typeof heir === 'number');
    if (heirs.length > 0) {
      change(connection, 'UPDATE Station SET createdBy = ? WHERE id = ?').run([Math.min(...heirs), id]);
      continue;
    }
    change(connection, 'DELETE FROM Mark WHERE stationId = ?').run([id]);
    change(connection, 'DELETE FROM Station WHERE id = ?').run([id]);
    removed++;
  }
  return removed;
}
