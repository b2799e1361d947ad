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
  const firsts = earlierWindows(values);
  let after = 0;
  for (let start = 0; start + WINDOW <= values.length; start++) {
    const earlier = firsts[start];
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

/** For the window of 8 days that starts on each day: the first window that is like it, −1 when it is the first itself, or
 *  when it has a missing day or holds too few changes to be told from others.
 *
 *  By a table of open addresses. Every other window will do to find a block of 28 days, whichever those are, as long as
 *  they are the same in both copies: those whose hash is even. */
function earlierWindows(values: Float64Array): Int32Array {
  const earlier = new Int32Array(values.length).fill(-1);
  const words = new Int32Array(values.buffer, values.byteOffset, 2 * values.length);
  const mask = 2 ** Math.ceil(Math.log2(Math.max(64, values.length))) - 1;
  const slots = new Int32Array(mask + 1);
  // changes into the window's days but its first, and its missing days
  let changes = 0;
  let missing = 0;
  for (let end = 0; end < values.length; end++) {
    const start = end - WINDOW + 1;
    const value = values[end];
    if (end > 0 && value !== values[end - 1]) changes++;
    if (Number.isNaN(value)) missing++;
    if (start > 0) {
      const left = values[start - 1];
      if (values[start] !== left) changes--;
      if (Number.isNaN(left)) missing--;
    }
    if (start < 0 || missing > 0 || changes < CHANGES_IN_WINDOW) continue;
    const hash = hashOf(words, start);
    if ((hash & 1) === 1) continue;
    let slot = (hash >>> 1) & mask;
    while (slots[slot] > 0 && !startAlike(values, slots[slot] - 1, start)) slot = (slot + 1) & mask;
    if (slots[slot] > 0) earlier[start] = slots[slot] - 1;
    else slots[slot] = start + 1;
  }
  return earlier;
}

/** From three of the window's days: windows that share it are compared whole. */
function hashOf(words: Int32Array, start: number): number {
  const last = start + WINDOW - 1;
  const mixed =
    Math.imul(words[2 * start] ^ Math.imul(words[2 * start + 1], 0xc2b2ae35), 0x01000193) +
    Math.imul(words[2 * start + 6] ^ Math.imul(words[2 * start + 7], 0x85ebca6b), 0x2c1b3c6d) +
    (words[2 * last] ^ Math.imul(words[2 * last + 1], 0x27d4eb2f));
  return Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b) ^ (mixed >>> 13);
}

function startAlike(values: Float64Array, a: number, b: number): boolean {
  for (let i = 0; i < WINDOW; i++) if (values[a + i] !== values[b + i]) return false;
  return true;
}
