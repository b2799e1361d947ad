import { type Connection, change, rows } from './connection.ts';
import { deleteStation } from './delete-station.ts';
import { FACT_NAMES, type FactChange, type FactName, type FactValue, isEmptyFact } from './station-facts.ts';
import type { LayerBefore, StationsBefore } from './undo-trail.ts';

interface UndoTask {
  importId: number;
  regionId: number;
}

interface Trail {
  id: number;
  kind: string;
  before: Partial<StationsBefore & LayerBefore>;
  byCode: Map<string, FactChange>;
  touched: boolean;
}

/** The drainage areas that stations will have once an import is undone, by code; only those that change. */
export function areasAfterUndo(connection: Connection, task: UndoTask): Map<string, number | null> {
  const areas = new Map<string, number | null>();
  const { mine, later } = readTrails(connection, task);
  const area = rows(connection, 'SELECT areaKm2 FROM Station WHERE regionId = ? AND code = ?');
  for (const said of mine.byCode.values()) {
    const end = followFact(later, said, 'areaKm2').end;
    if (!end || end.from === end.to) continue;
    const stands = area.get([task.regionId, said.code]) as [number | null] | undefined;
    if (stands?.[0] === end.from) areas.set(said.code, end.to as number | null);
  }
  return areas;
}

/** Puts back the facts and the layer that an import changed, and takes away the stations it made that nobody else needs.
 *
 *  What a later import said again stays as that one left it, and that one then takes over what stood before; what a later
 *  file offered for an empty fact fills it; what a person changed since stays.
 *  @returns the number of stations taken away */
export function undoFacts(connection: Connection, task: UndoTask): number {
  const { mine, later, others } = readTrails(connection, task);
  for (const said of mine.byCode.values()) restoreFacts(connection, task.regionId, said, later);
  if (mine.before.layer) restoreLayer(connection, task, mine.before.layer, later);
  for (const trail of later) if (trail.touched) saveTrail(connection, trail);
  return releaseStations(connection, task.importId, others);
}

function readTrails(connection: Connection, { importId, regionId }: UndoTask) {
  const found = rows(
    connection,
    `SELECT id, kind, "before" FROM Import
     WHERE regionId = ? AND (state = 'applied' OR id = ?) AND "before" <> '{}' ORDER BY id`,
  ).all([regionId, importId]) as [number, string, string][];
  const trails = found.map(([id, kind, text]): Trail => {
    const before = JSON.parse(text) as Trail['before'];
    const byCode = new Map((before.stations ?? []).map((said) => [said.code, said]));
    return { id, kind, before, byCode, touched: false };
  });
  const none: Trail = { id: importId, kind: '', before: {}, byCode: new Map(), touched: false };
  return {
    mine: trails.find(({ id }) => id === importId) ?? none,
    later: trails.filter(({ id }) => id > importId),
    others: trails.filter(({ id }) => id !== importId),
  };
}

/** Where a fact goes when one import's word on it is taken away: what the later imports that spoke of it then keep as
 *  [before, after], and what happens to the station's own fact; null when it stays as it is. */
function followFact(later: readonly Trail[], { code, fields }: FactChange, name: FactName) {
  const steps: { trail: Trail; said: FactChange; field: [FactValue, FactValue] }[] = [];
  const field = fields[name];
  if (!field) return { steps, end: null };
  let [now, was] = field;
  for (const trail of later) {
    const said = trail.byCode.get(code);
    const next = said?.fields[name];
    if (!said || !next) continue;
    // A person changed it in between, and that stays.
    if (next[0] !== was) return { steps, end: null };
    const offer = said.offers?.[name];
    const after = offer === undefined ? next[1] : isEmptyFact(code, name, now) ? offer : now;
    steps.push({ trail, said, field: [now, after] });
    if (after === next[1]) return { steps, end: null };
    [was, now] = [next[1], after];
  }
  return { steps, end: { from: was, to: now } };
}

function restoreFacts(connection: Connection, regionId: number, mine: FactChange, later: readonly Trail[]): void {
  for (const name of FACT_NAMES) {
    const { steps, end } = followFact(later, mine, name);
    for (const { trail, said, field } of steps) {
      said.fields[name] = field;
      trail.touched = true;
    }
    if (!end || end.from === end.to) continue;
    change(connection, `UPDATE Station SET ${name} = ? WHERE regionId = ? AND code = ? AND ${name} IS ?`).run([
      end.to,
      regionId,
      mine.code,
      end.from,
    ]);
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
    next.touched = true;
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

/** Stations that the import made pass to the next import that has days of them, or is a registry that names them; the
 *  others go. */
function releaseStations(connection: Connection, importId: number, others: readonly Trail[]): number {
  const namedBy = new Map<string, number>();
  for (const { id, kind, byCode } of [...others].reverse()) {
    if (kind === 'registry') for (const code of byCode.keys()) namedBy.set(code, id);
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
    deleteStation(connection, id);
    removed++;
  }
  return removed;
}
