import { DelimitedLines } from '../rows/delimited.ts';
import { Fields, type LineSplitter } from '../rows/fields.ts';
import { WhitespaceLines } from '../rows/whitespace.ts';
import { decodeText, hasUtf8Mark } from '../text-encoding.ts';

/** Lines looked at to tell what a file is. */
const SAMPLE_LINES = 3000;
/** Of lines with hundreds of columns fewer will do: beyond so many bytes no more than these lines are looked at. */
const SAMPLE_BYTES = 256 * 1024;
const LEAST_LINES = 400;

/** One line of the sample, with its number in the file. */
export interface SampleLine {
  line: number;
  text: string;
  bytes: Uint8Array;
}

/** One line of the sample split into fields. */
export interface SampleRow {
  line: number;
  fields: string[];
}

/** The first lines of a file, blank ones left out. A last line without its end counts only when the file ends there. */
export function sampleLines(head: Uint8Array, lineEnd: number, wholeFile: boolean): SampleLine[] {
  const lines: SampleLine[] = [];
  let start = hasUtf8Mark(head) ? 3 : 0;
  const isEnough = () => lines.length >= SAMPLE_LINES || (lines.length >= LEAST_LINES && start > SAMPLE_BYTES);
  for (let line = 1; start < head.length && !isEnough(); line++) {
    const found = head.indexOf(lineEnd, start);
    if (found < 0 && !wholeFile) break;
    const end = found < 0 ? head.length : found;
    const bytes = head.subarray(start, end);
    const text = decodeText(bytes).trimEnd();
    if (text.trim() !== '') lines.push({ line, text, bytes });
    start = end + 1;
  }
  return lines;
}

/** Splits sampled lines by the same rules as the whole file will be. */
export function splitSample(lines: readonly SampleLine[], splitter: LineSplitter): SampleRow[] {
  const fields = new Fields(16);
  return lines.map(({ line, bytes }) => {
    splitter.split(bytes, 0, bytes.length, fields);
    const texts: string[] = [];
    for (let at = 0; at < fields.count; at++) texts.push(decodeText(bytes, fields.start[at], fields.end[at]));
    return { line, fields: texts };
  });
}

/** The number of fields that most rows have. */
export function usualCount(rows: readonly SampleRow[]): number {
  const counts = new Map<number, number>();
  for (const { fields } of rows) counts.set(fields.length, (counts.get(fields.length) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0]?.[0] ?? 0;
}

/** The delimiter that splits most lines into equally many fields, at least two; null when none does. Tab before
 *  semicolon before comma: a comma may be the decimal sign of the other two. */
export function detectDelimiter(lines: readonly SampleLine[], lineEnd: number): '\t' | ';' | ',' | null {
  // Title lines stand at the top, so the last lines of the sample say more; of a short file, its very last.
  for (const tail of [400, Math.ceil(lines.length / 2), Math.ceil(lines.length / 4)]) {
    const delimiter = delimiterOf(lines.slice(-tail), lineEnd);
    if (delimiter !== null) return delimiter;
  }
  return null;
}

function delimiterOf(lines: readonly SampleLine[], lineEnd: number): '\t' | ';' | ',' | null {
  for (const delimiter of ['\t', ';', ','] as const) {
    const rows = splitSample(lines, new DelimitedLines(delimiter.charCodeAt(0), lineEnd));
    const count = usualCount(rows.filter((row) => row.fields.length > 1));
    const alike = rows.filter((row) => row.fields.length === count).length;
    if (count >= 2 && alike * 2 >= lines.length) return delimiter;
  }
  return null;
}

/** The splitter for a delimiter; null stands for blanks. */
export function splitterFor(delimiter: string | null, lineEnd: number): LineSplitter {
  return delimiter === null ? new WhitespaceLines(lineEnd) : new DelimitedLines(delimiter.charCodeAt(0), lineEnd);
}
