import type { ExcludableFlag } from '../basis.ts';
import { type DailySeries, FLAG } from './daily-series.ts';

/** Flag bits whose days count as missing: rejected always, and those that the basis excludes. */
export function missingMask(exclude: readonly ExcludableFlag[]): number {
  return exclude.reduce<number>((mask, flag) => mask | FLAG[flag], FLAG.rejected);
}

/** Flags four days at a time, where the bytes lie so that they can be read as words: most days carry no flag. Signed
 *  words, for V8 keeps those as plain integers. */
function fourDaysAtATime(flags: Uint8Array): Int32Array {
  const words = flags.byteOffset % 4 === 0 ? Math.floor(flags.length / 4) : 0;
  return words > 0 ? new Int32Array(flags.buffer, flags.byteOffset, words) : new Int32Array(0);
}

/** All flag bits that occur anywhere in a record, in one byte. */
export function flagBitsPresent(flags: Uint8Array): number {
  const fourDays = fourDaysAtATime(flags);
  let bits = 0;
  for (let i = 0; i < fourDays.length; i += 1) bits |= fourDays[i];
  bits = (bits | (bits >>> 8) | (bits >>> 16) | (bits >>> 24)) & 0xff;
  for (let i = fourDays.length * 4; i < flags.length; i += 1) bits |= flags[i];
  return bits;
}

/** Daily flows with NaN where a person rejected the value or the basis excludes its flag.
 *
 *  The series' own array is returned, uncopied, when there is nothing to take out: treat the result as read-only.
 *  @param exclude  flags treated as missing
 *  @returns        m³/s, NaN where missing; same length as `series.values`
 *  @throws RangeError when values and flags differ in length */
export function usableFlow(series: DailySeries, exclude: readonly ExcludableFlag[]): Float64Array {
  const { values, flags } = series;
  if (values.length !== flags.length) {
    throw new RangeError(
      `usableFlow: values and flags must be of one length, got ${values.length} and ${flags.length}`,
    );
  }
  const mask = missingMask(exclude);
  if ((flagBitsPresent(flags) & mask) === 0) return values;

  const flow = values.slice();
  const blank = (from: number, to: number) => {
    for (let i = from; i < to; i += 1) if ((flags[i] & mask) !== 0) flow[i] = Number.NaN;
  };
  const fourDays = fourDaysAtATime(flags);
  for (let word = 0; word < fourDays.length; word += 1) if (fourDays[word] !== 0) blank(word * 4, word * 4 + 4);
  blank(fourDays.length * 4, flow.length);
  return flow;
}
