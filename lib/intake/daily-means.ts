import { DAY_SECONDS, isoDate } from '../calendar/day.ts';
import { FLAG, FLAG_NAMES } from '../series/daily-series.ts';
import { CodeNumbers, type DayCode, NO_ROW } from '../series/day-codes.ts';
import type { DaySink } from './rows/row-reader.ts';
import { NO_TIME } from './time-of-day.ts';
import type { StagedPart } from './types.ts';

const PAGE_BITS = 8;
const PAGE = 1 << PAGE_BITS;
/** Days of a month with one reading each from which on that is taken for the station's way of measuring in that month. */
const SINGLE_READINGS = 15;

/** What the rows of a day come to; a page of days at a time. */
interface Page {
  sums: Float64Array;
  /** values, and rows with and without a value */
  counts: Uint32Array;
  rows: Uint32Array;
  /** seconds between the readings of the day, 0 while there is one; and how much more often than all other steps */
  steps: Uint32Array;
  votes: Int32Array;
  /** code of the day's first row with a value (before there is one: of its first row), and whether others differ */
  codes: Uint8Array;
  mixed: Uint8Array;
  bits: Uint8Array;
}

/** The readings of one station, by day. */
interface Station {
  pages: Map<number, Page>;
  day: number;
  second: number;
  value: number;
}

const emptyPage = (): Page => ({
  ...{ sums: new Float64Array(PAGE), counts: new Uint32Array(PAGE), rows: new Uint32Array(PAGE) },
  ...{ steps: new Uint32Array(PAGE), votes: new Int32Array(PAGE) },
  ...{ codes: new Uint8Array(PAGE), mixed: new Uint8Array(PAGE), bits: new Uint8Array(PAGE) },
});

/** Several readings a day become daily means, in memory of 27 bytes a day however many readings there are.
 *
 *  Readings stand at a usual interval, which is found for each month: that between most readings. A day's mean is that of
 *  its values, each of which stands for one interval; it counts where they cover at least a given share of the day, else
 *  the day is missing. A month of days with one reading each is of daily values. Flags of a day's values are joined bit
 *  by bit; their text is kept where all of them have the same, else the flags stand in words. */
export class DailyMeans implements DaySink {
  /** seconds since midnight of the row being read, for `take`; NO_TIME where it says none */
  second = NO_TIME;
  /** readings that stand twice, value for value, right after one another */
  repeated = 0;
  /** readings that are earlier than the one before */
  backwards = 0;
  /** days whose values covered too little, over the stations handed on */
  thinDays = 0;
  private readonly stations: (Station | undefined)[] = [];

  /** @param codes  codes of the file, by the numbers that `take` is given; may grow as it is read
   *  @param share  of the day that its values must cover, 0 to 1 */
  constructor(
    public codes: readonly DayCode[],
    private readonly share: number,
  ) {
    if (!(share >= 0 && share <= 1)) throw new RangeError(`DailyMeans: share must be from 0 to 1, got ${share}`);
  }

  /** Takes a reading at `second` of the day. */
  take(station: number, day: number, value: number, code: number): void {
    const { second } = this;
    let record = this.stations[station];
    if (record === undefined) {
      record = { pages: new Map(), day: Number.NaN, second: NO_TIME, value: Number.NaN };
      this.stations[station] = record;
    }
    const sameTime = record.day === day && record.second === second && second !== NO_TIME;
    if (sameTime && Object.is(record.value, value)) {
      this.repeated++;
      return;
    }
    if (day < record.day || (day === record.day && second < record.second)) this.backwards++;
    let page = record.pages.get(day >> PAGE_BITS);
    if (page === undefined) {
      page = emptyPage();
      record.pages.set(day >> PAGE_BITS, page);
    }
    const at = day & (PAGE - 1);
    if (record.day === day && second !== NO_TIME && !sameTime) vote(page, at, Math.abs(second - record.second));
    this.add(page, at, value, code);
    record.day = day;
    record.second = second;
    record.value = value;
  }

  private add(page: Page, at: number, value: number, code: number): void {
    const valued = !Number.isNaN(value);
    // A flag says something of the mean only where it stands beside a value.
    if (page.rows[at] === 0 || (valued && page.counts[at] === 0)) {
      page.codes[at] = code;
      page.mixed[at] = 0;
      page.bits[at] = this.codes[code].bits;
    } else if (valued === page.counts[at] > 0) {
      if (page.codes[at] !== code) page.mixed[at] = 1;
      page.bits[at] |= this.codes[code].bits;
    }
    page.rows[at]++;
    if (!valued) return;
    page.sums[at] += value;
    page.counts[at]++;
  }

  /** The daily means of one station and its memory back; null when there was no row.
   *  @param station  number as given to `take` */
  part(station: number, about: Pick<StagedPart, 'code' | 'unit' | 'quantity'>): StagedPart | null {
    const record = this.stations[station];
    if (record === undefined) return null;
    this.stations[station] = undefined;
    const numbers = [...record.pages.keys()].sort((a, b) => a - b);
    const start = numbers[0] << PAGE_BITS;
    const length = (numbers[numbers.length - 1] + 1 - numbers[0]) << PAGE_BITS;
    const values = new Float64Array(length).fill(Number.NaN);
    const codes = new Uint8Array(length).fill(NO_ROW);
    const numbered = new CodeNumbers();
    const expected = expectedReadings(record.pages);
    for (const number of numbers) {
      const page = record.pages.get(number) as Page;
      for (let at = 0; at < PAGE; at++) {
        if (page.rows[at] === 0) continue;
        const day = (number << PAGE_BITS) + at;
        const enough = page.counts[at] > 0 && Math.min(1, page.counts[at] / expected(day)) >= this.share - 1e-9;
        if (enough) values[day - start] = page.sums[at] / page.counts[at];
        else if (page.counts[at] > 0) this.thinDays++;
        // What stood in the place of a value says nothing of a day whose values were too few.
        const written = enough || page.counts[at] === 0;
        const bits = page.bits[at];
        const code = dayCode(this.codes[page.codes[at]], bits, { mixed: page.mixed[at] === 1, written });
        codes[day - start] = numbered.of(code, wordsOf(bits));
      }
    }
    const first = codes.findIndex((code) => code !== NO_ROW);
    const last = codes.findLastIndex((code) => code !== NO_ROW);
    return {
      ...about,
      ...{ firstDay: start + first, values: values.slice(first, last + 1), codes: codes.slice(first, last + 1) },
      codeList: numbered.list,
    };
  }
}

/** Counts a step between two readings of a day for the step that most of them have (majority vote of Boyer and Moore,
 *  1981, which holds one candidate). */
function vote(page: Page, at: number, step: number): void {
  if (page.votes[at] === 0) page.steps[at] = step;
  page.votes[at] += page.steps[at] === step ? 1 : -1;
}

/** Flags in words that mean them wherever they are read. */
const WORDS: [number, string][] = FLAG_NAMES.map((name) => [FLAG[name], name === 'below-detection' ? '<' : name]);

const wordsOf = (bits: number): string => WORDS.flatMap(([bit, word]) => (bits & bit ? [word] : [])).join(' ');

/** The day's code: the one that all its rows share, else their flags in words.
 *  @param written  what stood in the place of a value is kept as well */
function dayCode(
  { text, valueText }: DayCode,
  bits: number,
  { mixed, written }: { mixed: boolean; written: boolean },
): DayCode {
  if (mixed || (!written && text === valueText)) return { text: wordsOf(bits), bits };
  return { text, bits, ...(written && valueText !== undefined ? { valueText } : {}) };
}

/** How many readings a whole day has, by the usual step of its month, else by that of the whole record. */
function expectedReadings(pages: ReadonlyMap<number, Page>): (day: number) => number {
  const months = new Map<string, { steps: Map<number, number>; singles: number }>();
  const overall = new Map<number, number>();
  const monthOf = (day: number): string => isoDate(day).slice(0, 7);
  for (const [number, page] of pages) {
    for (let at = 0; at < PAGE; at++) {
      if (page.rows[at] === 0) continue;
      const key = monthOf((number << PAGE_BITS) + at);
      const month = months.get(key) ?? { steps: new Map(), singles: 0 };
      months.set(key, month);
      const step = page.steps[at];
      if (step === 0) {
        if (page.rows[at] === 1) month.singles++;
        continue;
      }
      for (const steps of [month.steps, overall]) steps.set(step, (steps.get(step) ?? 0) + page.rows[at] - 1);
    }
  }
  const usual = mostFrequent(overall) ?? rowsADay(pages);
  return (day) => {
    const month = months.get(monthOf(day));
    const step = mostFrequent(month?.steps ?? new Map());
    if (step !== null) return DAY_SECONDS / step;
    return (month?.singles ?? 0) >= SINGLE_READINGS ? 1 : DAY_SECONDS / usual;
  };
}

/** The step with the most readings; of equals the shorter. */
function mostFrequent(steps: ReadonlyMap<number, number>): number | null {
  let best: number | null = null;
  for (const [step, count] of steps) {
    const most = best === null ? 0 : (steps.get(best) as number);
    if (best === null || count > most || (count === most && step < best)) best = step;
  }
  return best;
}

/** Where rows say no time: the step that the usual number of rows a day comes to. */
function rowsADay(pages: ReadonlyMap<number, Page>): number {
  const counts = new Map<number, number>();
  for (const page of pages.values()) {
    for (const rows of page.rows) if (rows > 0) counts.set(rows, (counts.get(rows) ?? 0) + 1);
  }
  return DAY_SECONDS / (mostFrequent(counts) ?? 1);
}
