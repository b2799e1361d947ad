import { createHash } from 'node:crypto';
import type { MarkSpan } from './marks-on-flags.ts';

/** What lies over a record when it is read. */
export interface LaidOver {
  unit: string;
  areaKm2: number | null;
  marks: readonly MarkSpan[];
  /** the stretches that the checks found suspect, as stored; null for none */
  suspect: string | null;
}

/** Hash of a record as it is read: its own, and with it the marks on it, its suspect stretches and, for a depth over the
 *  drainage area, that area. Equal to the record's own hash when none of them is there. */
export function hashAsRead(hash: string, { unit, areaKm2, marks, suspect }: LaidOver): string {
  const spans = marks.filter(({ kind }) => kind !== 'note').map((mark) => [mark.firstDay, mark.lastDay, mark.kind]);
  if (spans.length === 0 && unit !== 'mm/d' && suspect === null) return hash;
  const area = unit === 'mm/d' ? areaKm2 : null;
  return createHash('sha256')
    .update(JSON.stringify([hash, area, spans, ...(suspect === null ? [] : [suspect])]))
    .digest('hex');
}
