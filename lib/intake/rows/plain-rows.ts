import type { CodeTable } from '../code-table.ts';
import { dayOfParts, NO_DAY } from '../dates.ts';
import { SPARE_BYTES } from '../file-blocks.ts';
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

/** A station as rows name it. */
interface NamedStation {
  station: number;
  key: Uint8Array;
  /** the key's whole words, to be compared four bytes at a time */
  words: Int32Array;
  /** the one that came after it last time: a file that goes day by day names its stations in the same order every day */
  next: NamedStation | null;
}

/** Before the first row. */
const NOBODY: NamedStation = { station: -1, key: new Uint8Array(0), words: new Int32Array(0), next: null };

/** Bytes of a station code that are compared four at a time; a longer one is read thoroughly. */
const LONGEST_CODE = SPARE_BYTES / 2;

/** The quick way through long tables: a row that is as plain as nearly all are (`01013500,2001-03-09,12.5,A`: no quotes
 *  or blanks, an ISO date, a number of at most 15 digits) is read in one pass over its bytes, without looking for its
 *  fields first. Any other row is left to the thorough reader, which takes the very same rows in the same way. */
export class PlainRows {
  private named: NamedStation = NOBODY;
  /** those of `named`, to be compared with every row */
  private stationKey: Uint8Array = NOBODY.key;
  private stationWords: Int32Array = NOBODY.words;
  /** by station, as it was last named */
  private readonly known: NamedStation[] = [];
  /** the block last read from, to be looked at four bytes at a time */
  private block: Uint8Array = new Uint8Array(0);
  private view: DataView = new DataView(new ArrayBuffer(0));
  /** bytes of the year and month of the date last read, and the day number before the month's first */
  private yearWord = 0;
  private monthWord = 0;
  private monthStart = 0;
  private monthLength = 0;
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

  /** Reads the row that starts at `from`. One loop and no calls but for what changes: it runs once for every row.
   *  @returns first byte of the next line; −1 when the row is not plain, and nothing was taken */
  read(bytes: Uint8Array, from: number, limit: number, line: number): number {
    const { steps, delimiter, lineEnd } = this;
    const last = steps.length - 1;
    if (bytes !== this.block) {
      this.block = bytes;
      this.view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    }
    const view = this.view;
    let at = from;
    let day = NO_DAY;
    let value = 0;
    let turned: NamedStation | null = null;
    let stationStart = -1;
    let stationEnd = -1;
    let flagStart = -1;
    let flagEnd = -1;
    for (let step = 0; step <= last; step++) {
      const stop = step === last ? lineEnd : delimiter;
      switch (steps[step]) {
        case Step.date: {
          // Nearly every date lies in the month of the date before it: eight equal bytes, and two digits to read.
          const date = twoDigits(bytes, at + 8);
          if (view.getInt32(at) !== this.yearWord || view.getInt32(at + 4) !== this.monthWord) {
            if (!this.turnToMonth(bytes, at)) return -1;
          }
          if (date < 1 || date > this.monthLength) return -1;
          day = this.monthStart + date;
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
          const words = this.stationWords;
          let word = 0;
          while (word < words.length && view.getInt32(at + word * 4) === words[word]) word++;
          if (word === words.length && key.length > 0) {
            let same = word * 4;
            while (same < key.length && bytes[at + same] === key[same]) same++;
            if (same === key.length && bytes[at + same] === stop) {
              at += same;
              break;
            }
          }
          const { next } = this.named;
          if (next !== null) {
            const guess = next.key;
            let same = 0;
            while (same < guess.length && bytes[at + same] === guess[same]) same++;
            if (same === guess.length && bytes[at + same] === stop) {
              at += same;
              turned = next;
              break;
            }
          }
          stationStart = at;
          at = this.plainEnd(bytes, at, stop);
          if (at <= stationStart || at - stationStart > LONGEST_CODE) return -1;
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

    if (stationStart >= 0) turned = this.stationNamed(bytes, stationStart, stationEnd, line);
    if (turned !== null) this.turnTo(turned);
    if (flagStart >= 0 || this.code < 0) {
      const [start, end] = flagStart >= 0 ? [flagStart, flagEnd] : [0, 0];
      this.code = this.parts.codes.code(bytes, start, end, 0, line);
      this.flagKey = this.parts.codes.lastFlag;
    }
    const station = this.onlyStation >= 0 ? this.onlyStation : this.named.station;
    this.parts.sink.take(station, day, value, this.code, line);
    return at + 1;
  }

  private turnTo(named: NamedStation): void {
    this.named = named;
    this.stationKey = named.key;
    this.stationWords = named.words;
  }

  /** The station of a field that is not the one expected, which is expected after the last one from now on. */
  private stationNamed(bytes: Uint8Array, start: number, end: number, line: number): NamedStation {
    const station = this.parts.stations.ofField(bytes, start, end, line);
    const key = this.parts.stations.lastKey;
    let named = this.known[station];
    // A station may be named by its code and by its name.
    if (named === undefined || named.key !== key) {
      const words = new Int32Array(key.length >> 2);
      for (let word = 0; word < words.length; word++) words[word] = this.view.getInt32(start + word * 4);
      named = { station, key, words, next: null };
      this.known[station] = named;
    }
    if (this.named !== NOBODY) this.named.next = named;
    return named;
  }

  /** Reads year and month of an ISO date, `2001-03-`.
   *  @returns false when it is none */
  private turnToMonth(bytes: Uint8Array, at: number): boolean {
    const century = twoDigits(bytes, at);
    const year = twoDigits(bytes, at + 2);
    const month = twoDigits(bytes, at + 5);
    if (century < 0 || year < 0 || month < 0 || bytes[at + 4] !== 45 || bytes[at + 7] !== 45) return false;
    const first = dayOfParts(century * 100 + year, month, 1);
    if (first <= NO_DAY) return false;
    let length = 28;
    while (length < 31 && dayOfParts(century * 100 + year, month, length + 1) > NO_DAY) length++;
    this.yearWord = this.view.getInt32(at);
    this.monthWord = this.view.getInt32(at + 4);
    this.monthStart = first - 1;
    this.monthLength = length;
    return true;
  }

  /** End of a field of plain text; −1 when it holds a quote, or has blanks around it. */
  private plainEnd(bytes: Uint8Array, from: number, stop: number): number {
    let at = from;
    const { delimiter } = this;
    while (bytes[at] !== stop && bytes[at] > 32 && bytes[at] !== 34 && bytes[at] !== delimiter) at++;
    return bytes[at] === stop || bytes[at] === 13 ? at : -1;
  }
}

/** Two digits as a number; below 0 when they are none. */
function twoDigits(bytes: Uint8Array, at: number): number {
  const tens = bytes[at] - 48;
  const ones = bytes[at + 1] - 48;
  // As unsigned numbers, all bytes that are not digits lie above 9.
  return tens >>> 0 <= 9 && ones >>> 0 <= 9 ? tens * 10 + ones : -1;
}
