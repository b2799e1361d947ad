import { FLAG } from '../series/daily-series.ts';

/** Bits that a check or a person lays over what a file said. */
export const LAID_OVER = FLAG.suspect | FLAG.rejected;

export const MARK_KINDS = ['reject', 'accept', 'note'] as const;
export type MarkKind = (typeof MARK_KINDS)[number];

/** A stretch of days that a person rejected, accepted again or noted something on; both days included. */
export interface MarkSpan {
  firstDay: number;
  lastDay: number;
  kind: MarkKind;
}

/** Sets the suspect bit on the stretches that the checks found, changing `flags`; before any mark of a person.
 *  @param stretches  first and last day of each, one after the other: day numbers, both included */
export function laySuspect(flags: Uint8Array, firstDay: number, stretches: readonly number[]): void {
  for (let i = 0; i + 1 < stretches.length; i += 2) {
    const from = Math.max(0, stretches[i] - firstDay);
    const to = Math.min(flags.length - 1, stretches[i + 1] - firstDay);
    for (let day = from; day <= to; day++) flags[day] |= FLAG.suspect;
  }
}

/** Lays a person's marks over flag bits, in the order given, changing `flags`: reject sets the rejected bit, accept
 *  takes it and the suspect bit away, a note changes nothing. */
export function layMarks(flags: Uint8Array, firstDay: number, marks: readonly MarkSpan[]): void {
  for (const mark of marks) {
    if (mark.kind === 'note') continue;
    const from = Math.max(0, mark.firstDay - firstDay);
    const to = Math.min(flags.length - 1, mark.lastDay - firstDay);
    for (let day = from; day <= to; day++) {
      if (mark.kind === 'reject') flags[day] |= FLAG.rejected;
      else flags[day] &= ~(FLAG.rejected | FLAG.suspect);
    }
  }
}
