import { QUANTITIES, type Quantity, UNITS_OF, type Unit } from '../series/quantities.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';

/** What a station's record of one quantity holds, without its days. */
export interface QuantityRow {
  stationId: number;
  code: string;
  quantity: Quantity;
  /** as the first part was written */
  unit: Unit;
  /** in which the quantity is shown */
  shownUnit: Unit;
  /** days with a value, and the first and last of them as day numbers; null when there is none */
  valueCount: number;
  firstValueDay: number | null;
  lastValueDay: number | null;
  /** true when it comes from other records */
  derived: boolean;
}

const SELECT = `SELECT s.id, s.code, r.quantity, r.unit, r.valueCount, r.firstValueDay, r.lastValueDay,
    r.laidId IS NOT NULL AND NOT EXISTS (SELECT 1 FROM Part p WHERE p.stationId = r.stationId AND p.quantity = r.quantity)
  FROM Record r JOIN Station s ON s.id = r.stationId`;

const IN_ORDER = `CASE r.quantity ${QUANTITIES.map((one, place) => `WHEN '${one}' THEN ${place}`).join(' ')} END`;

/** The records of a region, or of one of its stations, of every quantity: by code, flow first. */
export async function listQuantities(
  of: { regionId: number } | { stationId: number },
  path = databasePath(),
): Promise<QuantityRow[]> {
  const [column, id] = 'stationId' in of ? ['s.id', of.stationId] : ['s.regionId', of.regionId];
  const sql = `${SELECT} WHERE ${column} = ? ORDER BY s.code, ${IN_ORDER}`;
  return (rows(sharedConnection(path), sql).all([id]) as Row[]).map(
    ([stationId, code, quantity, unit, valueCount, firstValueDay, lastValueDay, derived]): QuantityRow => ({
      ...{ stationId, code, quantity, unit, shownUnit: UNITS_OF[quantity][0] },
      ...{ valueCount, firstValueDay, lastValueDay, derived: derived !== 0 },
    }),
  );
}

type Row = [number, string, Quantity, Unit, number, number | null, number | null, number];
