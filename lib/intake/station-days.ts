import { NO_ROW } from '../series/day-codes.ts';
import type { PageMemory, StoredPage } from './page-memory.ts';
import { type OpenPage, PAGE, PAGE_BITS } from './pages.ts';

/** What became of a row. */
export const NEW_DAY = 0;
/** the day was there with the same value, or with a value where this row has none */
export const SAME_VALUE = 1;
/** the day was there without a value, and now has one */
export const FILLED = 2;
/** the day was there with another value */
export const OTHER_VALUE = 3;
/** as SAME_VALUE, but this row carries another flag; the first is kept */
export const OTHER_CODE = 4;

/** A run of consecutive days: what `StationDays.run` answers. */
export interface DayRun {
  firstDay: number;
  values: Float64Array;
  codes: Uint8Array;
}

/** The daily values of one station as a file gives them, in any order. */
export class StationDays {
  duplicates = 0;
  private readonly pages = new Map<number, StoredPage>();
  /** pages that were put away and needed again: rows come out of order here, so they stay open while there is room */
  private readonly revisited = new Set<number>();
  private pageNumber = Number.NaN;
  private pageStart = -0x40000000;
  private values: Float64Array = new Float64Array(0);
  private codes: Uint8Array = new Uint8Array(0);

  constructor(private readonly memory: PageMemory) {}

  /** Puts a day's value (NaN = missing) and code in place.
   *  @returns NEW_DAY, SAME_VALUE, FILLED, OTHER_CODE, or OTHER_VALUE: then nothing was changed */
  put(day: number, value: number, code: number): number {
    let at = day - this.pageStart;
    if (at < 0 || at >= PAGE) {
      this.turnTo(day >> PAGE_BITS);
      at = day - this.pageStart;
    }
    if (this.codes[at] === NO_ROW) {
      this.values[at] = value;
      this.codes[at] = code;
      return NEW_DAY;
    }
    return this.meet(at, value, code);
  }

  private meet(at: number, value: number, code: number): number {
    const before = this.values[at];
    if (!Number.isNaN(before) && !Number.isNaN(value) && before !== value) return OTHER_VALUE;
    this.duplicates++;
    if (Number.isNaN(before) && !Number.isNaN(value)) {
      this.values[at] = value;
      this.codes[at] = code;
      return FILLED;
    }
    return this.codes[at] === code || Number.isNaN(value) !== Number.isNaN(before) ? SAME_VALUE : OTHER_CODE;
  }

  private turnTo(pageNumber: number): void {
    if (this.memory.full) this.leave();
    const stored = this.pages.get(pageNumber);
    const page = stored === undefined ? this.memory.take() : this.memory.open(stored);
    if (stored !== undefined && page !== stored) this.revisited.add(pageNumber);
    this.pages.set(pageNumber, page);
    this.pageNumber = pageNumber;
    this.pageStart = pageNumber << PAGE_BITS;
    this.values = page.values;
    this.codes = page.codes;
  }

  private leave(): void {
    const page = this.pages.get(this.pageNumber);
    if (page === undefined || !('values' in page)) return;
    if (this.revisited.has(this.pageNumber) && !this.memory.overfull) return;
    this.pages.set(this.pageNumber, this.memory.put(page));
    this.pageStart = -0x40000000;
  }

  /** True when two days side by side have values: at once for a daily record, whose first page shows it. */
  hasNeighbours(): boolean {
    for (const page of this.pages.values()) {
      const { values } = this.memory.look(page);
      for (let at = 1; at < PAGE; at++) if (!Number.isNaN(values[at]) && !Number.isNaN(values[at - 1])) return true;
    }
    return false;
  }

  /** All days from the first row to the last as one run; null when there was no row. */
  run(): DayRun | null {
    const numbers = [...this.pages.keys()].sort((a, b) => a - b);
    if (numbers.length === 0) return null;
    const opened = (number: number): OpenPage => this.memory.look(this.pages.get(number) as StoredPage);
    const head = opened(numbers[0]).codes;
    const tail = opened(numbers[numbers.length - 1]).codes;
    let first = 0;
    while (head[first] === NO_ROW) first++;
    let last = PAGE - 1;
    while (tail[last] === NO_ROW) last--;
    const firstDay = (numbers[0] << PAGE_BITS) + first;
    const days = (numbers[numbers.length - 1] << PAGE_BITS) + last - firstDay + 1;
    const values = new Float64Array(days).fill(Number.NaN);
    const codes = new Uint8Array(days).fill(NO_ROW);
    for (const number of numbers) {
      const page = opened(number);
      const offset = (number << PAGE_BITS) - firstDay;
      const from = Math.max(0, -offset);
      const to = Math.min(PAGE, days - offset);
      values.set(page.values.subarray(from, to), offset + from);
      codes.set(page.codes.subarray(from, to), offset + from);
    }
    return { firstDay, values, codes };
  }

  /** Gives the memory back; the station is empty afterwards. */
  clear(): void {
    for (const page of this.pages.values()) this.memory.drop(page);
    this.pages.clear();
    this.pageStart = -0x40000000;
  }
}
