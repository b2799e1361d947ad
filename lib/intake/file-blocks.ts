import { type FileHandle, open } from 'node:fs/promises';
import { IntakeError } from './types.ts';

/** Bytes read at a time, and the longest line that is read: beyond it a file is not rows of daily flows. */
const BLOCK = 1 << 20;
export const LONGEST_LINE = 1 << 20;

/** Bytes behind every block that may be looked at, whatever they hold: a reader need not ask whether a word of a row
 *  reaches over the end. */
export const SPARE_BYTES = 64;

export interface FileHead {
  /** up to 1 MiB from the start */
  bytes: Uint8Array;
  /** size of the whole file */
  size: number;
}

export const LF = 10;
export const CR = 13;

/** The byte that ends lines: line feed, or carriage return in files of old that have no line feed. */
export function lineEndOf(head: Uint8Array): number {
  return !head.includes(LF) && head.includes(CR) ? CR : LF;
}

/** The first megabyte of a file, enough to tell what it is.
 *  @throws IntakeError when it cannot be opened, or has no line end within the longest line */
export async function readHead(path: string, file: string): Promise<FileHead> {
  const handle = await openToRead(path, file);
  try {
    const { size } = await handle.stat();
    const buffer = new Uint8Array(Math.min(size, BLOCK));
    let filled = 0;
    while (filled < buffer.length) {
      const { bytesRead } = await handle.read(buffer, filled, buffer.length - filled, filled);
      if (bytesRead === 0) break;
      filled += bytesRead;
    }
    return { bytes: buffer.subarray(0, filled), size };
  } finally {
    await handle.close();
  }
}

export interface BlockReading {
  file: string;
  lineEnd: number;
  signal?: AbortSignal;
  /** number of the line that comes next, for messages */
  nextLine(): number;
  /** every byte of the file once, in order */
  onBytes?(bytes: Uint8Array): void;
  /** whole lines from `start` to `end`; only the last line of the file may lack its end. False stops the reading. */
  visit(bytes: Uint8Array, start: number, end: number): boolean;
}

/** Reads a file in blocks of whole lines. The next block is fetched while one is visited; memory is bounded by two
 *  blocks and the longest line, whatever the file.
 *  @throws IntakeError for a line beyond the longest; the signal's reason when aborted */
export async function readBlocks(path: string, reading: BlockReading): Promise<void> {
  const handle = await openToRead(path, reading.file);
  try {
    const { size } = await handle.stat();
    const block = Math.max(1, Math.min(BLOCK, size));
    const longest = Math.min(LONGEST_LINE, size);
    let current = new Uint8Array(block + longest + SPARE_BYTES);
    let other = new Uint8Array(block + longest + SPARE_BYTES);
    let carried = 0;
    let next = handle.read(current, 0, block, null);
    for (;;) {
      const { bytesRead } = await next;
      reading.signal?.throwIfAborted();
      if (bytesRead === 0) break;
      const filled = carried + bytesRead;
      reading.onBytes?.(current.subarray(carried, filled));
      const end = Buffer.from(current.buffer, 0, filled).lastIndexOf(reading.lineEnd) + 1;
      carried = filled - end;
      if (carried <= longest) {
        other.set(current.subarray(end, filled), 0);
        next = handle.read(other, carried, block, null);
      }
      // The visit may throw: the fetch under way must have ended before the file is closed.
      const goOn = await visitWhileFetching(reading, current, end, next);
      if (!goOn) {
        await next;
        return;
      }
      if (carried > longest) throw longLineError(reading.file, reading.nextLine(), current.subarray(end, filled));
      [current, other] = [other, current];
    }
    if (carried > 0) reading.visit(current, 0, carried);
  } finally {
    await handle.close();
  }
}

async function openToRead(path: string, file: string): Promise<FileHandle> {
  const cannot = (why: string, remedy: string) => new IntakeError({ file, message: why, remedy });
  let handle: FileHandle;
  try {
    handle = await open(path, 'r');
  } catch (cause) {
    const code = (cause as NodeJS.ErrnoException).code;
    throw code === 'ENOENT'
      ? cannot('there is no such file', 'Check its name and place')
      : cannot(`the file cannot be opened (${code})`, 'Check that it may be read');
  }
  if ((await handle.stat()).isDirectory()) {
    await handle.close();
    throw cannot('this is a folder, not a file', 'Name the files in it one by one');
  }
  return handle;
}

async function visitWhileFetching(
  reading: BlockReading,
  bytes: Uint8Array,
  end: number,
  fetch: Promise<unknown>,
): Promise<boolean> {
  try {
    return end === 0 || reading.visit(bytes, 0, end);
  } catch (error) {
    await fetch.catch(() => undefined);
    throw error;
  }
}

/** What is said of a line that is too long to be a row. */
export function longLineError(file: string, row: number, start: Uint8Array): IntakeError {
  return new IntakeError({
    file,
    row,
    value: `${Buffer.from(start.subarray(0, 40)).toString('latin1')}…`,
    message: `the line is longer than ${LONGEST_LINE / 1024} kB, so it cannot be a row of daily flows`,
    remedy: 'Check that the file is a table of text with line ends, one row a line',
  });
}
