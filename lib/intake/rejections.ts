import { decodeText } from './text-encoding.ts';
import type { RejectedRow } from './types.ts';

/** Rejected rows that a report holds. */
export const REPORTED_ROWS = 1000;
/** Characters of a rejected row that are kept. */
const KEPT_TEXT = 500;

/** The rows of one file that were not taken: all counted, all handed on, the first thousand kept. */
export class Rejections {
  total = 0;
  readonly first: RejectedRow[] = [];

  constructor(private readonly onRejected?: (row: RejectedRow) => void) {}

  /** Rejects the line of bytes from `start` to `end`. */
  add(bytes: Uint8Array, start: number, end: number, line: number, reason: string): void {
    this.total++;
    if (this.onRejected === undefined && this.first.length >= REPORTED_ROWS) return;
    const rejected = { row: line, text: decodeText(bytes, start, Math.min(end, start + KEPT_TEXT)), reason };
    if (this.first.length < REPORTED_ROWS) this.first.push(rejected);
    this.onRejected?.(rejected);
  }
}
