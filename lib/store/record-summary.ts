import { createHash } from 'node:crypto';
import { blobOf, blobOfValues } from './blobs.ts';
import type { LaidDays } from './lay-parts.ts';

/** What is told of a record without reading its days. */
export interface RecordSummary {
  /** SHA-256 of first day, unit, values and flag bits, hexadecimal */
  hash: string;
  /** days with a value, and the first and last of them as day numbers; null when there is none */
  valueCount: number;
  firstValueDay: number | null;
  lastValueDay: number | null;
  zeroCount: number;
}

/** Counts and hashes a record. */
export function summarise({ firstDay, unit, values, flags }: LaidDays): RecordSummary {
  let valueCount = 0;
  let zeroCount = 0;
  let first = -1;
  let last = -1;
  for (let day = 0; day < values.length; day++) {
    const value = values[day];
    if (Number.isNaN(value)) continue;
    valueCount++;
    if (value === 0) zeroCount++;
    if (first < 0) first = day;
    last = day;
  }
  const hash = createHash('sha256').update(`${firstDay}\n${unit}\n${values.length}\n`);
  hash.update(blobOfValues(values)).update(blobOf(flags));
  return {
    hash: hash.digest('hex'),
    valueCount,
    firstValueDay: first < 0 ? null : firstDay + first,
    lastValueDay: last < 0 ? null : firstDay + last,
    zeroCount,
  };
}
