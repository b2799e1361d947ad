/** Code of a day that the file has no row for. */
export const NO_ROW = 255;

/** Days to a page. A record is kept in pages, so that rows may come in any order, a stray date costs one page, and
 *  growing copies nothing. */
const PAGE_BITS = 10;
const PAGE = 1 << PAGE_BITS;
const MISSING = -0x80000000;

interface OpenPage {
  values: Float64Array;
  codes: Uint8Array;
}

/** A page that has been left: whole numbers of 10^−decimals, four bytes a day, NaN as MISSING. */
interface PackedPage {
  mantissas: Int32Array;
  decimals: number;
  /** one number when all days share a code */
  codes: Uint8Array | number;
}

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

/** The pages that all stations of a file share a memory for. Up to the budget pages stay as they are; beyond it, those
 *  that their station has left are packed, which halves them. */
export class PageMemory {
  private readonly spare: OpenPage[] = [];
  private open = 0;

  /** @param budget  number of pages (9 kB each) that may stay open before pages that were left are packed */
  constructor(private readonly budget: number = 8192) {}

  take(): OpenPage {
    this.open++;
    const page = this.spare.pop() ?? { values: new Float64Array(PAGE), codes: new Uint8Array(PAGE) };
    page.values.fill(Number.NaN);
    page.codes.fill(NO_ROW);
    return page;
  }

  give(page: OpenPage): void {
    this.open--;
    if (this.spare.length < 64) this.spare.push(page);
  }

  get full(): boolean {
    return this.open > this.budget;
  }
}

/** A run of consecutive days: what `StationDays.run` answers. */
export interface DayRun {
  firstDay: number;
  values: Float64Array;
  codes: Uint8Array;
}

/** The daily values of one station as a file gives them, in any order. */
export class StationDays {
  duplicates = 0;
  private readonly pages = new Map<number, OpenPage | PackedPage>();
  /** pages that were packed and needed again: rows come out of order here, so they stay open */
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
    let page = this.pages.get(pageNumber);
    if (page === undefined) page = this.memory.take();
    else if ('mantissas' in page) {
      page = unpack(page, this.memory.take());
      this.revisited.add(pageNumber);
    }
    this.pages.set(pageNumber, page);
    this.pageNumber = pageNumber;
    this.pageStart = pageNumber << PAGE_BITS;
    this.values = page.values;
    this.codes = page.codes;
  }

  private leave(): void {
    const page = this.pages.get(this.pageNumber);
    if (page === undefined || 'mantissas' in page || this.revisited.has(this.pageNumber)) return;
    const packed = pack(page);
    if (packed === null) return;
    this.pages.set(this.pageNumber, packed);
    this.memory.give(page);
  }

  /** True when two days side by side have values: at once for a daily record, whose first page shows it. */
  hasNeighbours(): boolean {
    for (const page of this.pages.values()) {
      const { values } =
        'mantissas' in page ? unpack(page, { values: new Float64Array(PAGE), codes: new Uint8Array(PAGE) }) : page;
      for (let at = 1; at < PAGE; at++) if (!Number.isNaN(values[at]) && !Number.isNaN(values[at - 1])) return true;
    }
    return false;
  }

  /** All days from the first row to the last as one run; null when there was no row. */
  run(): DayRun | null {
    const numbers = [...this.pages.keys()].sort((a, b) => a - b);
    if (numbers.length === 0) return null;
    const opened = (number: number): OpenPage => {
      const page = this.pages.get(number) as OpenPage | PackedPage;
      return 'mantissas' in page ? unpack(page, { values: new Float64Array(PAGE), codes: new Uint8Array(PAGE) }) : page;
    };
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
    this.pages.clear();
    this.pageStart = -0x40000000;
  }
}

/** Flows have few decimals: as whole numbers of 10^−decimals they fit in four bytes. A whole number divided by an exact
 *  power of ten gives back the very double that reading the text gave.
 *  @returns null when some value does not fit */
function pack(page: OpenPage): PackedPage | null {
  const mantissas = new Int32Array(PAGE);
  let decimals = 0;
  let scale = 1;
  for (let at = 0; at < PAGE; at++) {
    const value = page.values[at];
    if (Number.isNaN(value)) continue;
    while (Math.round(value * scale) / scale !== value) {
      if (++decimals > 9) return null;
      scale *= 10;
    }
  }
  for (let at = 0; at < PAGE; at++) {
    const value = page.values[at];
    const mantissa = Math.round(value * scale);
    if (Math.abs(mantissa) > 0x7fffffff || (value === 0 && Object.is(value, -0))) return null;
    if (!Number.isNaN(value) && mantissa / scale !== value) return null;
    mantissas[at] = Number.isNaN(value) ? MISSING : mantissa;
  }
  const first = page.codes[0];
  const alike = page.codes.every((code) => code === first);
  return { mantissas, decimals, codes: alike ? first : page.codes.slice() };
}

function unpack(packed: PackedPage, into: OpenPage): OpenPage {
  const scale = 10 ** packed.decimals;
  for (let at = 0; at < PAGE; at++) {
    const mantissa = packed.mantissas[at];
    into.values[at] = mantissa === MISSING ? Number.NaN : mantissa / scale;
  }
  if (typeof packed.codes === 'number') into.codes.fill(packed.codes);
  else into.codes.set(packed.codes);
  return into;
}
