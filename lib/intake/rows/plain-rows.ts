import type { CodeTable } from '../code-table.ts';
import { dayOfParts, NO_DAY } from '../dates.ts';
import { POWERS_OF_TEN } from '../numbers.ts';
import type { TablePlan } from '../recognise/table-plan.ts';
import type { StationCodes } from '../station-codes.ts';
import type { DaySink } from './row-reader.ts';

enum Step {
  station,
  date,
  value,
  flag,
}

/** The quick way through long tables: a row that is as plain as nearly all are (`01013500,2001-03-09,12.5,A`: no quotes
 *  or blanks, an ISO date, a number of at most 15 digits) is read in one pass over its bytes, without looking for its
 *  fields first. Any other row is left to the thorough reader, which takes the very same rows in the same way. */
export class PlainRows {
  private station = -1;
  private stationKey: Uint8Array = new Uint8Array(0);
  private code = -1;
  private flagKey: Uint8Array = new Uint8Array(0);

  private constructor(
    private readonly steps: readonly Step[],
    private readonly delimiter: number,
    private readonly lineEnd: number,
    private readonly parts: { stations: StationCodes; codes: CodeTable; sink: DaySink },
    private readonly onlyStation: number,
  ) {}

  /** @returns null for tables that have columns of other kinds, other dates, or a decimal comma */
  static for(
    plan: TablePlan,
    parts: { stations: StationCodes; codes: CodeTable; sink: DaySink },
    onlyStation: number,
  ): PlainRows | null {
    const { places, mapping, fieldCount } = plan;
    const delimiter = mapping.delimiter;
    const special = places.where >= 0 || places.unit >= 0 || mapping.missing.length > 0 || plan.repeatsHeader;
    if (delimiter === undefined || special || mapping.decimal !== '.' || mapping.layout !== 'long') return null;
    if (places.date.length !== 1 || mapping.date.order !== 'ymd') return null;
    const roles = new Map([
      [places.station, Step.station],
      [places.date[0], Step.date],
      [places.value, Step.value],
      [places.flag, Step.flag],
    ]);
    const steps = Array.from({ length: fieldCount }, (_, column) => roles.get(column));
    if (!steps.every((step): step is Step => step !== undefined)) return null;
    return new PlainRows(steps, delimiter.charCodeAt(0), plan.lineEnd, parts, onlyStation);
  }

  /** Reads the row that starts at `from`.
   *  @returns first byte of the next line; −1 when the row is not plain, and nothing was taken */
  read(bytes: Uint8Array, from: number, limit: number, line: number): number {
    const { steps, delimiter, lineEnd } = this;
    const last = steps.length - 1;
    let at = from;
    let day = NO_DAY;
    let value = 0;
    let stationStart = -1;
    let stationEnd = -1;
    let flagStart = -1;
    let flagEnd = -1;
    for (let step = 0; step <= last; step++) {
      const stop = step === last ? lineEnd : delimiter;
      switch (steps[step]) {
        case Step.date: {
          const y1 = bytes[at] - 48;
          const y2 = bytes[at + 1] - 48;
          const y3 = bytes[at + 2] - 48;
          const y4 = bytes[at + 3] - 48;
          const m1 = bytes[at + 5] - 48;
          const m2 = bytes[at + 6] - 48;
          const d1 = bytes[at + 8] - 48;
          const d2 = bytes[at + 9] - 48;
          if (bytes[at + 4] !== 45 || bytes[at + 7] !== 45) return -1;
          // As unsigned numbers, all bytes that are not digits lie above 9.
          if (y1 >>> 0 > 9 || y2 >>> 0 > 9 || y3 >>> 0 > 9 || y4 >>> 0 > 9) return -1;
          if (m1 >>> 0 > 9 || m2 >>> 0 > 9 || d1 >>> 0 > 9 || d2 >>> 0 > 9) return -1;
          day = dayOfParts(y1 * 1000 + y2 * 100 + y3 * 10 + y4, m1 * 10 + m2, d1 * 10 + d2);
          if (day <= NO_DAY) return -1;
          at += 10;
          break;
        }
        case Step.value: {
          let whole = 0;
          const start = at;
          let digit = bytes[at] - 48;
          while (digit >>> 0 <= 9) {
            whole = whole * 10 + digit;
            digit = bytes[++at] - 48;
          }
          let decimals = 0;
          if (digit === -2) {
            const point = at;
            digit = bytes[++at] - 48;
            while (digit >>> 0 <= 9) {
              whole = whole * 10 + digit;
              digit = bytes[++at] - 48;
            }
            decimals = at - point - 1;
          }
          const length = at - start;
          if (length === 0 || length > 15 || (length === 1 && digit === -2)) return -1;
          if (decimals === 0 && bytes[at - 1] === 46 && length === 1) return -1;
          value = decimals > 0 ? whole / POWERS_OF_TEN[decimals] : whole;
          break;
        }
        case Step.station: {
          const key = this.stationKey;
          let same = 0;
          while (same < key.length && bytes[at + same] === key[same]) same++;
          if (this.station >= 0 && same === key.length && bytes[at + same] === stop) {
            at += same;
            break;
          }
          stationStart = at;
          at = this.plainEnd(bytes, at, stop);
          if (at <= stationStart) return -1;
          stationEnd = at;
          break;
        }
        default: {
          flagStart = at;
          const key = this.flagKey;
          let same = 0;
          while (same < key.length && bytes[at + same] === key[same]) same++;
          const next = bytes[at + same];
          if (this.code >= 0 && same === key.length && (next === stop || next === 13)) {
            at += same;
            flagStart = -1;
            break;
          }
          at = this.plainEnd(bytes, at, stop);
          if (at < 0) return -1;
          flagEnd = at;
        }
      }
      if (step < last) {
        if (bytes[at] !== delimiter) return -1;
        at++;
      }
    }
    if (bytes[at] === 13) at++;
    if (at >= limit || bytes[at] !== lineEnd) return -1;

    if (stationStart >= 0) this.turnToStation(bytes, stationStart, stationEnd, line);
    if (flagStart >= 0 || this.code < 0) {
      const [start, end] = flagStart >= 0 ? [flagStart, flagEnd] : [0, 0];
      this.code = this.parts.codes.code(bytes, start, end, 0, line);
      this.flagKey = this.parts.codes.lastFlag;
    }
    const station = this.onlyStation >= 0 ? this.onlyStation : this.station;
    this.parts.sink.take(station, day, value, this.code, line);
    return at + 1;
  }

  private turnToStation(bytes: Uint8Array, start: number, end: number, line: number): void {
    this.station = this.parts.stations.ofField(bytes, start, end, line);
    this.stationKey = this.parts.stations.lastKey;
  }

  /** End of a field of plain text; −1 when it holds a quote, or has blanks around it. */
  private plainEnd(bytes: Uint8Array, from: number, stop: number): number {
    let at = from;
    const { delimiter } = this;
    while (bytes[at] !== stop && bytes[at] > 32 && bytes[at] !== 34 && bytes[at] !== delimiter) at++;
    return bytes[at] === stop || bytes[at] === 13 ? at : -1;
  }
}
