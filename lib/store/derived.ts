import type { DailySeries } from '../series/daily-series.ts';
import { type DayCode, flagsOfCodes } from '../series/day-codes.ts';
import { type DerivedTerm, derive } from '../series/derive.ts';
import { type Quantity, toShownUnit, UNITS_OF, type Unit } from '../series/quantities.ts';
import type { DerivedRecipe } from '../series/station-history.ts';
import { bytesOfBlob, valuesOfBlob } from './blobs.ts';
import { type Connection, change, rows } from './connection.ts';
import { recipeOf } from './history-text.ts';
import { VISIBLE } from './import-claim.ts';
import { saveRecords, standingRecord, storeLaid } from './lay-record.ts';
import { layMarks, type MarkSpan } from './marks-on-flags.ts';

/** A station with a recipe. */
export interface DerivedStation {
  id: number;
  code: string;
  recipe: DerivedRecipe;
}

/** The derived stations of a region, by code. */
export function derivedStations(connection: Connection, regionId: number): DerivedStation[] {
  const found = rows(
    connection,
    'SELECT id, code, derived FROM Station WHERE regionId = ? AND derived IS NOT NULL ORDER BY code',
  ).all([regionId]) as [number, string, string][];
  return found.map(([id, code, text]) => ({ id, code, recipe: recipeOf(text)! }));
}

/** Makes derived records anew that depend, directly or through others, on stations whose days, marks, area or recipe
 *  changed; and takes away those whose recipe is gone. Synchronous: call it inside the transaction that changes the
 *  stations, so that no reader sees a derived record beside parts it does not come from.
 *
 *  A station with measured days keeps these, whatever its recipe. Suspect flags stay with the stations they were found at.
 *  @returns  the stations whose records changed */
export function rebuildDerived(connection: Connection, stationIds: Iterable<number>): number[] {
  const changed = new Set(stationIds);
  const regionOf = rows(connection, 'SELECT regionId FROM Station WHERE id = ?');
  const regions = new Set([...changed].flatMap((id) => (regionOf.get([id]) as [number] | undefined) ?? []));
  return [...regions].flatMap((regionId) => rebuildRegion(connection, regionId, changed));
}

/** @param changed  of the region or not; null: rebuild all that the region derives */
export function rebuildRegion(connection: Connection, regionId: number, changed: ReadonlySet<number> | null): number[] {
  const derived = derivedStations(connection, regionId);
  const rebuilt = removeUnderived(connection, regionId, derived);
  if (derived.length === 0) return rebuilt;
  const dirty = new Set(changed);
  const idOf = rows(connection, 'SELECT id FROM Station WHERE regionId = ? AND code = ?');
  for (const { id, recipe } of inOrder(derived)) {
    const terms = recipe.terms.map(({ code }) => (idOf.get([regionId, code]) as [number] | undefined)?.[0] ?? null);
    if (changed !== null && !dirty.has(id) && !terms.some((term) => term !== null && dirty.has(term))) continue;
    if (hasParts(connection, id, recipe.quantity)) continue;
    if (rebuild(connection, id, recipe, terms)) rebuilt.push(id);
    dirty.add(id);
  }
  return rebuilt;
}

/** Every derived station after those that it comes from. */
export function inOrder(derived: readonly DerivedStation[]): DerivedStation[] {
  const byCode = new Map(derived.map((station) => [station.code, station]));
  const done = new Set<string>();
  const sorted: DerivedStation[] = [];
  const visit = (station: DerivedStation, quantity: Quantity) => {
    if (station.recipe.quantity !== quantity || done.has(station.code)) return;
    done.add(station.code);
    for (const { code } of station.recipe.terms) {
      const term = byCode.get(code);
      if (term) visit(term, quantity);
    }
    sorted.push(station);
  };
  for (const station of derived) visit(station, station.recipe.quantity);
  return sorted;
}

const PARTS = `SELECT 1 FROM Part p JOIN Import i ON i.id = p.importId
  WHERE p.stationId = ? AND p.quantity = ? AND i.state IN ${VISIBLE} LIMIT 1`;

/** True when a station has measured days of a quantity. */
export const hasParts = (connection: Connection, stationId: number, quantity: string): boolean =>
  rows(connection, PARTS).get([stationId, quantity]) !== undefined;

/** @returns true when the record is another one than before */
function rebuild(
  connection: Connection,
  stationId: number,
  { quantity, terms }: DerivedRecipe,
  termIds: readonly (number | null)[],
): boolean {
  const standing = standingRecord(connection, stationId, quantity);
  const series = termIds.map((id) => (id === null ? null : readShown(connection, id, quantity)));
  const whole = terms.flatMap(({ factor, lagDays }, index): DerivedTerm[] => {
    const one = series[index];
    return one ? [{ series: one, factor, lagDays }] : [];
  });
  const days = whole.length === terms.length ? derive(whole) : null;
  if (days === null) {
    change(connection, 'DELETE FROM Record WHERE stationId = ? AND quantity = ?').run([stationId, quantity]);
    return standing !== null;
  }
  const laid = { ...days, unit: UNITS_OF[quantity][0] };
  const head = storeLaid(connection, { stationId, quantity }, laid, { standing, importId: null });
  saveRecords(connection, [head]);
  return standing?.hash !== head.hash;
}

const RECORD = `SELECT r.unit, r.firstDay, s.areaKm2, p.codeList, COALESCE(l."values", p."values"),
    COALESCE(l.flags, p.codes)
  FROM Record r JOIN Station s ON s.id = r.stationId
  LEFT JOIN Laid l ON l.id = r.laidId LEFT JOIN Part p ON p.id = r.partId
  WHERE r.stationId = ? AND r.quantity = ?`;
const MARKS = 'SELECT firstDay, lastDay, kind FROM Mark WHERE stationId = ? AND quantity = ? ORDER BY id';

/** A record with a person's marks, in the unit its quantity is shown in; null without one. */
function readShown(connection: Connection, stationId: number, quantity: Quantity): DailySeries | null {
  const row = rows(connection, RECORD).get([stationId, quantity]) as
    | [Unit, number, number | null, string | null, Buffer, Buffer]
    | undefined;
  if (!row) return null;
  const [unit, firstDay, areaKm2, codeList, blob, codes] = row;
  const factor = toShownUnit(quantity, unit, areaKm2);
  const values = valuesOfBlob(blob);
  if (factor !== 1) for (let day = 0; day < values.length; day++) values[day] *= factor;
  const bytes = bytesOfBlob(codes);
  const flags = codeList === null ? bytes : flagsOfCodes(bytes, JSON.parse(codeList) as DayCode[]);
  const marks = rows(connection, MARKS).all([stationId, quantity]) as [number, number, MarkSpan['kind']][];
  layMarks(
    flags,
    firstDay,
    marks.map(([first, lastDay, kind]) => ({ firstDay: first, lastDay, kind })),
  );
  return { firstDay, values, flags };
}

/** Takes away the records that rest on no parts and on no recipe any more. */
function removeUnderived(connection: Connection, regionId: number, derived: readonly DerivedStation[]): number[] {
  const quantities = new Map(derived.map(({ id, recipe }) => [id, recipe.quantity]));
  const laid = rows(
    connection,
    `SELECT r.stationId, r.quantity FROM Record r JOIN Station s ON s.id = r.stationId
     WHERE s.regionId = ? AND r.laidId IS NOT NULL`,
  ).all([regionId]) as [number, Quantity][];
  const removed: number[] = [];
  for (const [stationId, quantity] of laid) {
    if (quantities.get(stationId) === quantity || hasParts(connection, stationId, quantity)) continue;
    change(connection, 'DELETE FROM Record WHERE stationId = ? AND quantity = ?').run([stationId, quantity]);
    removed.push(stationId);
  }
  return removed;
}
