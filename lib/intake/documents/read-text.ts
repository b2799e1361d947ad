import { createReadStream } from 'node:fs';
import { IntakeError } from '../types.ts';
import type { TextEncoding } from './decode-text.ts';

/** Bytes fetched at a time. */
const CHUNK = 64 * 1024;

export interface TextReading {
  file: string;
  encoding: TextEncoding;
  signal?: AbortSignal;
  /** every byte of the file once, in order */
  onBytes?(bytes: Uint8Array): void;
}

/** The text of a file in pieces, see `decodedText`. */
export function documentText(path: string, reading: TextReading): AsyncGenerator<string> {
  return decodedText(createReadStream(path, { highWaterMark: CHUNK }), reading);
}

/** The text of a document in pieces, decoded strictly: bytes that its encoding does not have refuse it.
 *  @throws IntakeError naming the row of the first wrong byte; the signal's reason when aborted */
export async function* decodedText(source: AsyncIterable<Buffer>, reading: TextReading): AsyncGenerator<string> {
  const { label, mark } = reading.encoding;
  const decoder = new TextDecoder(label, { fatal: true, ignoreBOM: true });
  let skip = mark;
  let row = 1;
  const decoded = (bytes: Uint8Array | null): string => {
    try {
      return bytes === null ? decoder.decode() : decoder.decode(bytes, { stream: true });
    } catch (cause) {
      if (!(cause instanceof TypeError)) throw cause;
      throw wrongBytes(reading, row, bytes, cause);
    }
  };
  for await (const bytes of source) {
    reading.signal?.throwIfAborted();
    reading.onBytes?.(bytes);
    const text = decoded(bytes.subarray(skip));
    skip = 0;
    row += newlines(text);
    yield text;
  }
  const rest = decoded(null);
  if (rest !== '') yield rest;
}

function newlines(text: string): number {
  let count = 0;
  for (let at = text.indexOf('\n'); at >= 0; at = text.indexOf('\n', at + 1)) count++;
  return count;
}

function wrongBytes(reading: TextReading, row: number, bytes: Uint8Array | null, cause: Error): IntakeError {
  const { label } = reading.encoding;
  // Where exactly, a forgiving decoder tells: it leaves a mark in place of what it cannot read.
  const text = bytes === null ? '' : new TextDecoder(label).decode(bytes);
  const at = text.indexOf('\ufffd');
  const error = new IntakeError({
    file: reading.file,
    row: at < 0 ? row : row + newlines(text.slice(0, at)),
    ...(at < 0 ? {} : { value: text.slice(Math.max(0, at - 20), at + 20).replace(/\s+/g, ' ') }),
    message: `the text is not the ${label.toUpperCase()} that the document declares, or should be without a declaration`,
    remedy: 'Save the document again as UTF-8, or put the right encoding into its XML declaration',
  });
  error.cause = cause;
  return error;
}
