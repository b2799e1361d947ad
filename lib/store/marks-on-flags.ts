import { createHash } from 'node:crypto';
import { FLAG } from '../series/daily-series.ts';

export const MARK_KINDS = ['reject', 'accept', 'note'] as const;
export type MarkKind = (typeof MARK_KINDS)[number];

/** A stretch of days that a person rejected, accepted again or noted something on; both days included. */
export interface MarkSpan {
  firstDay: number;
  lastDay: number;
  kind: MarkKind;
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

/** Hash of a record as it is read: its own, and with it the marks on it and, for a depth over the drainage area, that
 *  area. Equal to the record's own hash when neither is there. */
export function hashAsRead(hash: string, unit: string, areaKm2: number | null, marks: readonly MarkSpan[]): string {
  const spans = marks.filter(({ kind }) => kind !== 'note').map((mark) => [mark.firstDay, mark.lastDay, mark.kind]);
  if (spans.length === 0 && unit !== 'mm/d') return hash;
  const area = unit === 'mm/d' ? areaKm2 : null;
  return createHash('sha256')
    .update(JSON.stringify([hash, area, spans]))
    .digest('hex');
}
