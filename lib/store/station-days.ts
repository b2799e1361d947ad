import { NO_ROW } from '../series/day-codes.ts';
import { type Quantity, toShownUnit, UNITS_OF, type Unit } from '../series/quantities.ts';
import { rows, sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { isSame } from './lay-parts.ts';
import { loadParts, type StoredPart } from './lay-record.ts';
import { LAID_OVER } from './marks-on-flags.ts';
import { readSeries } from './records.ts';

/** A stretch of one station's days as they are read: marks and checks laid over them. */
export interface StationDays {
  quantity: Quantity;
  /** in which the quantity is shown: m³/s, m or mm */
  unit: Unit;
  /** day number of the first entry */
  firstDay: number;
  /** in `unit`; NaN where missing */
  values: Float64Array;
  flags: Uint8Array;
  /** the quality code that the file wrote beside the value; '' for none */
  texts: string[];
  /** of the record as read */
  hash: string;
}

const RECORD_SQL = `SELECT r.unit, s.areaKm2 FROM Record r JOIN Station s ON s.id = r.stationId
  WHERE r.stationId = ? AND r.quantity = ?`;

/** The days from first to last (day numbers, both included) that lie inside a station's record; null without a record. */
export function stationDays(
  { stationId, quantity, first, last }: { stationId: number; quantity: Quantity; first: number; last: number },
  path = databasePath(),
): StationDays | null {
  const connection = sharedConnection(path);
  const row = rows(connection, RECORD_SQL).get([stationId, quantity]) as [Unit, number | null] | undefined;
  if (!row) return null;
  const [unit, areaKm2] = row;
  let days: StationDays | null = null;
  readSeries(
    [stationId],
    (_, series, hash) => {
      const from = Math.max(0, first - series.firstDay);
      const to = Math.max(from, Math.min(series.values.length, last + 1 - series.firstDay));
      days = {
        quantity,
        unit: UNITS_OF[quantity][0],
        firstDay: series.firstDay + from,
        values: series.values.slice(from, to),
        flags: series.flags.slice(from, to),
        texts: [],
        hash,
      };
    },
    { quantity, path },
  );
  const found = days as StationDays | null;
  if (!found) return null;
  if (quantity !== 'flow') found.values = found.values.map((value) => value * toShownUnit(quantity, unit, areaKm2));
  const factors = (part: StoredPart) => toShownUnit(quantity, part.unit, areaKm2);
  found.texts = textsOf(found, loadParts(connection, stationId, quantity), factors);
  return found;
}

/** The text that stood beside each day's value: that of the last part which wrote this value with these flags. */
function textsOf(
  { firstDay, values, flags }: StationDays,
  parts: readonly StoredPart[],
  factorOf: (part: StoredPart) => number,
): string[] {
  const texts = new Array<string>(values.length).fill('');
  for (const part of parts) {
    if (part.codeList.every(({ text }) => text === '')) continue;
    const factor = factorOf(part);
    for (let i = 0; i < values.length; i++) {
      const at = firstDay + i - part.firstDay;
      if (at < 0 || at >= part.codes.length || part.codes[at] === NO_ROW) continue;
      const { text, bits } = part.codeList[part.codes[at]];
      if (text === '' || (bits & ~LAID_OVER) !== (flags[i] & ~LAID_OVER)) continue;
      const value = part.values[at] * factor;
      if (Object.is(value, values[i]) || isSame(value, values[i], false)) texts[i] = text;
    }
  }
  return texts;
}
