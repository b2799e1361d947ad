import type { Quantity, Unit } from '../series/quantities.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { recipeOf } from './history-text.ts';

/** What one record of a station holds, without its days. */
export interface QuantityHead {
  quantity: Quantity;
  /** as stored */
  unit: Unit;
  /** days with a value, and the first and last of them; null when there is none */
  valueCount: number;
  firstValueDay: number | null;
  lastValueDay: number | null;
}

/** The records of a station, flow among them. */
export function stationQuantities(stationId: number, path = databasePath()): QuantityHead[] {
  const found = rows(
    sharedConnection(path),
    `SELECT quantity, unit, valueCount, firstValueDay, lastValueDay FROM Record WHERE stationId = ? ORDER BY quantity`,
  ).all([stationId]) as [Quantity, Unit, number, number | null, number | null][];
  return found.map(([quantity, unit, valueCount, firstValueDay, lastValueDay]) => ({
    ...{ quantity, unit, valueCount, firstValueDay, lastValueDay },
  }));
}

/** The records of some quantities in a region, by station and quantity, those without a value left out. */
export function recordsOfQuantities<Wanted extends Quantity>(
  regionId: number,
  quantities: readonly Wanted[],
  path = databasePath(),
): {
  stationId: number;
  code: string;
  name: string;
  quantity: Wanted;
  unit: Unit;
  firstDay: number;
  lastDay: number;
}[] {
  const found = rows(
    sharedConnection(path),
    `SELECT s.id, s.code, s.name, r.quantity, r.unit, r.firstValueDay, r.lastValueDay
     FROM Record r JOIN Station s ON s.id = r.stationId
     WHERE s.regionId = ? AND r.firstValueDay IS NOT NULL AND r.quantity IN (${quantities.map(() => '?').join(', ')})
     ORDER BY s.code, r.quantity`,
  ).all([regionId, ...quantities]) as [number, string, string, Wanted, Unit, number, number][];
  return found.map(([stationId, code, name, quantity, unit, firstDay, lastDay]) => ({
    ...{ stationId, code, name, quantity, unit, firstDay, lastDay },
  }));
}

/** The stations of a region whose records are derived with that of a given one. */
export function derivedWith(regionId: number, code: string, path = databasePath()): { code: string; name: string }[] {
  const found = rows(
    sharedConnection(path),
    'SELECT code, name, derived FROM Station WHERE regionId = ? AND derived IS NOT NULL ORDER BY code',
  ).all([regionId]) as [string, string, string][];
  return found
    .filter(([, , recipe]) => recipeOf(recipe)?.terms.some((term) => term.code === code))
    .map(([own, name]) => ({ code: own, name }));
}
