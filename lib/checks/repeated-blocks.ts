import { isoDate } from '../calendar/day.ts';
import type { DailySeries } from '../series/daily-series.ts';
import type { Finding } from './finding.ts';

/** A block of so many days that repeats an earlier one is no chance: the shortest month. */
export const BLOCK_DAYS = 28;
/** Days of a window by which a block is found again, and the changes from day to day it must hold: windows of a dry river
 *  or of coarse steps are all alike. */
const WINDOW = 8;
const CHANGES_IN_WINDOW = 4;
/** Of a block's days at least this share must differ from the day before… */
const CHANGING_SHARE = 0.5;
/** …and so many must be higher: a recession written in coarse steps runs the same way every time. */
const LEAST_RISES = 3;

/** Blocks of at least 28 days that repeat, value for value, a block that began at least 28 days earlier: days that stood
 *  twice in what was imported under different dates, such as a month or a year copied into the place of another. (Days
 *  that stand twice under the same date are met at the import: equal ones merge, unlike ones refuse the file.) At least
 *  half of a block's days must differ from the day before, and three be higher, so that dry spells, steady releases and
 *  recessions in coarse steps are no repetition.
 *  @returns one finding for each block, over the later copy; detail: `copyOf`, the ISO date on which the first begins */
export function repeatedBlocks({ firstDay, values }: DailySeries): Finding[] {
  const found: Finding[] = [];
  const windows = new FirstWindows(values);
  let after = 0;
  for (let start = 0; start + WINDOW <= values.length; start++) {
    const earlier = windows.meet(start);
    if (earlier < 0 || start < after || start - earlier < BLOCK_DAYS) continue;
    let from = start;
    while (earlier - (start - from) > 0 && from > after && same(values, from - 1, start - earlier)) from--;
    let end = start;
    while (end < values.length && same(values, end, start - earlier)) end++;
    if (end - from < BLOCK_DAYS || !isLively(values, from, end)) continue;
    found.push({
      ...{ kind: 'repeated', firstDay: firstDay + from, lastDay: firstDay + end - 1, days: end - from },
      detail: { copyOf: isoDate(firstDay + from - (start - earlier)) },
    });
    after = end;
  }
  return found;
}

const same = (values: Float64Array, day: number, lag: number): boolean => values[day] === values[day - lag];

function isLively(values: Float64Array, from: number, end: number): boolean {
  let changes = 0;
  let rises = 0;
  for (let day = from + 1; day < end; day++) {
    if (values[day] !== values[day - 1]) changes++;
    if (values[day] > values[day - 1]) rises++;
  }
  return changes >= CHANGING_SHARE * (end - from) && rises >= LEAST_RISES;
}

/** Windows of 8 days by where each was first met, in a table of open addresses. Every other window will do to find a block
 *  of 28 days, whichever those are, as long as they are the same in both copies: those whose hash is even. */
class FirstWindows {
  private readonly hashes: Int32Array;
  private readonly changes: Uint8Array;
  private readonly slots: Int32Array;
  private readonly mask: number;

  constructor(private readonly values: Float64Array) {
    const size = 2 ** Math.ceil(Math.log2(Math.max(64, values.length)));
    this.slots = new Int32Array(size);
    this.mask = size - 1;
    this.hashes = hashWindows(values);
    this.changes = countChanges(values);
  }

  /** @returns index of the first window that looks like the one that starts here; −1 when this is the first, or when it has
   *           a missing day or holds too few changes to be told from others */
  meet(start: number): number {
    const hash = this.hashes[start];
    if ((hash & 1) === 1 || this.changes[start] < CHANGES_IN_WINDOW) return -1;
    for (let slot = (hash >>> 1) & this.mask; ; slot = (slot + 1) & this.mask) {
      const held = this.slots[slot] - 1;
      if (held < 0) {
        this.slots[slot] = start + 1;
        return -1;
      }
      if (this.hashes[held] === hash && this.startsAlike(held, start)) return held;
    }
  }

  private startsAlike(a: number, b: number): boolean {
    for (let i = 0; i < WINDOW; i++) if (this.values[a + i] !== this.values[b + i]) return false;
    return true;
  }
}

/** A number for the window that starts on each day, from three of its days: those that share it are compared whole. */
function hashWindows(values: Float64Array): Int32Array {
  const words = new Int32Array(values.buffer, values.byteOffset, 2 * values.length);
  const days = new Int32Array(values.length);
  for (let day = 0; day < values.length; day++) {
    const mixed = Math.imul(words[2 * day], 0x85ebca6b) ^ Math.imul(words[2 * day + 1], 0xc2b2ae35);
    days[day] = mixed ^ (mixed >>> 15);
  }
  const hashes = new Int32Array(values.length);
  for (let day = 0; day + WINDOW <= values.length; day++) {
    const mixed = Math.imul(days[day], 0x01000193) + Math.imul(days[day + 3], 0x2c1b3c6d) + days[day + 7];
    hashes[day] = mixed ^ (mixed >>> 16);
  }
  return hashes;
}

/** Changes from day to day in the window that starts on each day; 0 where one of its days is missing. */
function countChanges(values: Float64Array): Uint8Array {
  const counts = new Uint8Array(values.length);
  let changes = 0;
  let missing = 0;
  for (let day = 0; day < values.length; day++) {
    if (values[day] !== values[day - 1]) changes++;
    if (Number.isNaN(values[day])) missing++;
    const start = day - WINDOW + 1;
    if (start > 0) {
      // The change into the window's first day lies outside it.
      if (values[start] !== values[start - 1]) changes--;
      if (Number.isNaN(values[start - 1])) missing--;
    } else if (day === 0) changes = 0;
    if (start >= 0 && missing === 0) counts[start] = changes;
  }
  return counts;
}
