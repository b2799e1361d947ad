import type { DayCode } from '../intake/types.ts';
import { FLAG } from '../series/daily-series.ts';
import { databasePath } from '../store/database-url.ts';
import { type PartDays, readParts } from '../store/parts.ts';
import { stationDays } from '../store/station-days.ts';
import { stationQuantities } from '../store/station-quantities.ts';
import type { WrittenSeries } from './waterml.ts';

const NO_ROW = 255;
/** Bits that a check or a person may lay over what a file said. */
const LAID_OVER = FLAG.suspect | FLAG.rejected;
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
    const numbers = days.flags.map((bits, at) => {
      if (alone) {
        const code = part.codes[at];
        return code === NO_ROW
          ? NO_ROW
          : codes.of({ ...part.codeList[code], bits: part.codeList[code].bits | (bits & LAID_OVER) });
      }
      const text = days.texts[at];
      return Number.isNaN(days.values[at]) && bits === 0 && text === '' ? NO_ROW : codes.of({ text, bits });
    });
    yield {
      ...{ quantity, firstDay: days.firstDay, codes: numbers, codeList: codes.list },
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

/** Numbers the codes of a record anew, since laid-over bits make more of them. */
class CodeNumbers {
  readonly list: DayCode[] = [];
  private readonly numbers = new Map<string, number>();

  of(code: DayCode): number {
    const key = `${code.bits}\u0000${code.text}\u0000${code.valueText ?? '\u0001'}`;
    const known = this.numbers.get(key);
    if (known !== undefined) return known;
    // A byte tells 255 codes apart: beyond them the text gives way to the bits, of which there are fewer.
    if (this.list.length >= NO_ROW - 64 && code.text !== '') return this.of({ text: '', bits: code.bits });
    const number = this.list.push(code) - 1;
    this.numbers.set(key, number);
    return number;
  }
}
