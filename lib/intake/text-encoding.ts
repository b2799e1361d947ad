import { isUtf8 } from 'node:buffer';
import { IntakeError } from './types.ts';

const utf8 = new TextDecoder('utf-8');
const western = new TextDecoder('windows-1252');

/** Text of a few bytes: UTF-8 where they are, else Latin-1 (in its Windows form), in which older agencies write. */
export function decodeText(bytes: Uint8Array, start = 0, end: number = bytes.length): string {
  const part = bytes.subarray(start, end);
  return isUtf8(part) ? utf8.decode(part) : western.decode(part);
}

/** True when the bytes begin with the UTF-8 mark. */
export function hasUtf8Mark(head: Uint8Array): boolean {
  return head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf;
}

const SIGNATURES: [string, number[], string][] = [
  ['a ZIP archive or a spreadsheet', [0x50, 0x4b, 0x03, 0x04], 'Unpack the archive, or save the sheet as CSV'],
  ['a compressed (gzip) file', [0x1f, 0x8b], 'Unpack it first'],
  ['a PDF document', [0x25, 0x50, 0x44, 0x46], 'Get the data as a text file such as CSV'],
];

/** Refuses what is not text, by the first bytes of a file.
 *  @throws IntakeError for an empty file, UTF-16, archives, and anything with NUL or other control bytes */
export function refuseUnlessText(head: Uint8Array, file: string): void {
  if (head.length === 0) {
    throw new IntakeError({ file, message: 'the file is empty', remedy: 'Export it again and check its size' });
  }
  const known = SIGNATURES.find(([, bytes]) => bytes.every((byte, at) => head[at] === byte));
  if (known) throw new IntakeError({ file, message: `this is ${known[0]}, not a text file`, remedy: known[2] });
  const { zeros, strange } = oddBytes(head);
  const marked = (head[0] === 0xff && head[1] === 0xfe) || (head[0] === 0xfe && head[1] === 0xff);
  if (marked || zeros > head.length / 4) {
    throw new IntakeError({
      file,
      row: 1,
      value: marked ? `${hex(head[0])} ${hex(head[1])} at the start` : `${zeros} NUL bytes`,
      message: 'the text is encoded as UTF-16',
      remedy: 'Save it again as UTF-8 (in a spreadsheet: “CSV UTF-8”)',
    });
  }
  if (strange >= 0) {
    throw new IntakeError({
      file,
      row: 1 + head.subarray(0, strange).reduce((count, byte) => count + (byte === 10 ? 1 : 0), 0),
      value: `byte ${hex(head[strange])} at position ${strange + 1}`,
      message: 'this is a binary file, not text',
      remedy: 'Export the data as a text file such as CSV',
    });
  }
}

/** How many bytes are NUL, and the first control byte that no text has; −1 where there is none. A loop: this is done over a
 *  megabyte at every look at a file. */
function oddBytes(head: Uint8Array): { zeros: number; strange: number } {
  let zeros = 0;
  let strange = -1;
  for (let at = 0; at < head.length; at++) {
    const byte = head[at];
    if (byte >= 32 || (byte >= 9 && byte <= 13) || byte === 26 || byte === 27) continue;
    if (byte === 0) zeros++;
    if (strange < 0) strange = at;
  }
  return { zeros, strange };
}

/** A file that is marked as UTF-8 must be it throughout: else its names would come out garbled.
 *  @param firstLine  line number of the first of these whole lines */
export function refuseUnlessUtf8(lines: Uint8Array, firstLine: number, file: string): void {
  if (isUtf8(lines)) return;
  let line = firstLine;
  let start = 0;
  while (start < lines.length) {
    const found = lines.indexOf(10, start);
    const end = found < 0 ? lines.length : found;
    if (!isUtf8(lines.subarray(start, end))) break;
    start = end + 1;
    line++;
  }
  const found = lines.indexOf(10, start);
  const text = western.decode(lines.subarray(start, found < 0 ? lines.length : found)).trim();
  throw new IntakeError({
    file,
    row: line,
    value: text.slice(0, 200),
    message: 'the file is marked as UTF-8 but this row is encoded otherwise (probably Latin-1)',
    remedy: 'Save it again as UTF-8, or without the mark at its start',
  });
}

function hex(byte: number): string {
  return byte.toString(16).toUpperCase().padStart(2, '0');
}
