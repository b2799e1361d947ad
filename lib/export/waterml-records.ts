import { CodeNumbers, NO_ROW } from '../series/day-codes.ts';
import { databasePath } from '../store/database-url.ts';
import { LAID_OVER } from '../store/marks-on-flags.ts';
import { type PartDays, readParts } from '../store/parts.ts';
import { stationDays } from '../store/station-days.ts';
import { stationQuantities } from '../store/station-quantities.ts';
import type { WrittenSeries } from './waterml.ts';

/** Day numbers beyond every record. */
const EVER = { first: -1_000_000, last: 1_000_000 };

/** A station's records as they stand, one quantity at a time: of one import, in its unit and with its codes; of several
 *  laid over one another, in the unit that the quantity is shown in. Marks and suspect stretches are among the flags. */
export function* recordsAsTheyStand(stationId: number, path = databasePath()): Generator<WrittenSeries> {
  for (const { quantity } of stationQuantities(stationId, path)) {
    const days = stationDays({ stationId, quantity, ...EVER }, path);
    if (days === null || days.values.length === 0) continue;
    const part = onlyPart(stationId, quantity, path);
    const alone = part !== null && part.firstDay === days.firstDay && part.values.length === days.values.length;
    const codes = new CodeNumbers();
    // Laid-over bits make more codes of those that a part has.
    const numberOf = (bits: number, at: number): number => {
      if (!alone) {
        const text = days.texts[at];
        return Number.isNaN(days.values[at]) && bits === 0 && text === '' ? NO_ROW : codes.of({ text, bits }, '');
      }
      if (part.codes[at] === NO_ROW) return NO_ROW;
      const code = part.codeList[part.codes[at]];
      return codes.of({ ...code, bits: code.bits | (bits & LAID_OVER) }, '');
    };
    yield {
      ...{ quantity, firstDay: days.firstDay, codes: days.flags.map(numberOf), codeList: codes.list },
      ...(alone ? { unit: part.unit, values: part.values } : { unit: days.unit, values: days.values }),
    };
  }
}

/** The part of a record that comes from one import alone; null where several are laid over one another, or none. */
function onlyPart(stationId: number, quantity: string, path: string): PartDays | null {
  let only: PartDays | null = null;
  for (const part of readParts(stationId, path)) {
    if (part.quantity !== quantity) continue;
    if (only !== null) return null;
    only = part;
  }
  return only;
}
