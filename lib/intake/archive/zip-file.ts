import type { Readable } from 'node:stream';
import { type Entry, openPromise, type ZipFile } from 'yauzl';
import { IntakeError } from '../types.ts';

/** Entries that are listed; more stations than any region has come in fewer. */
const MOST_ENTRIES = 50_000;
/** Beyond this inflated size an entry may be at most so many times larger than it is packed: tables of numbers pack to a
 *  tenth or a twentieth, and only what was made to fill a disk to a thousandth. */
const HARMLESS_BYTES = 100e6;
const MOST_INFLATION = 1000;

export interface OpenZip {
  entries: Entry[];
  /** the inflated bytes of an entry, checked against its size as stated
   *  @throws IntakeError when it cannot be unpacked */
  stream(entry: Entry): AsyncIterable<Buffer>;
  close(): void;
}

/** Opens a ZIP archive and lists it, without unpacking anything.
 *  @throws IntakeError when it is damaged, names files outside itself, or has more entries than make sense */
export async function openZip(path: string, file: string): Promise<OpenZip> {
  let zip: ZipFile;
  try {
    zip = await openPromise(path, { autoClose: false });
  } catch (cause) {
    throw zipError(file, cause);
  }
  const entries: Entry[] = [];
  try {
    for await (const entry of zip.eachEntry()) {
      entries.push(entry);
      if (entries.length > MOST_ENTRIES) {
        throw new IntakeError({
          file,
          message: `the archive holds more than ${MOST_ENTRIES} files`,
          remedy: 'Split it',
        });
      }
    }
  } catch (cause) {
    zip.close();
    throw cause instanceof IntakeError ? cause : zipError(file, cause);
  }
  return { entries, stream: (entry) => entryBytes(zip, entry, file), close: () => zip.close() };
}

async function* entryBytes(zip: ZipFile, entry: Entry, file: string): AsyncGenerator<Buffer> {
  refuseBomb(entry.uncompressedSize, entry.compressedSize, `${file}, ${entry.fileName}`);
  let stream: Readable;
  try {
    stream = await zip.openReadStreamPromise(entry);
  } catch (cause) {
    throw zipError(file, cause);
  }
  try {
    for await (const chunk of stream) yield chunk as Buffer;
  } catch (cause) {
    throw zipError(file, cause);
  } finally {
    stream.destroy();
  }
}

/** Refuses what is packed so tightly that it can only have been made to fill the disk.
 *  @param inflated,packed  bytes
 *  @throws IntakeError */
export function refuseBomb(inflated: number, packed: number, file: string): void {
  if (inflated <= HARMLESS_BYTES || inflated <= packed * MOST_INFLATION) return;
  throw new IntakeError({
    file,
    value: `${Math.round(inflated / 1e6)} MB from ${Math.max(1, Math.round(packed / 1e3))} kB`,
    message: `it unpacks to more than ${MOST_INFLATION} times its size`,
    remedy: 'Check where it comes from; unpack it yourself if it is what you mean',
  });
}

function zipError(file: string, cause: unknown): IntakeError {
  if (cause instanceof IntakeError) return cause;
  if (!(cause instanceof Error)) throw cause;
  const outside = /^(?:absolute path|invalid relative path|invalid characters in fileName): (.*)$/s.exec(cause.message);
  const error = new IntakeError(
    outside
      ? {
          ...{ file, value: outside[1].slice(0, 200) },
          message: 'the archive names a file outside itself',
          remedy: 'Pack the files anew, without folders above them',
        }
      : {
          file,
          message: `the archive cannot be read (${cause.message})`,
          remedy: 'Get it again; it is cut short, damaged, or packed in a way that is not common',
        },
  );
  error.cause = cause;
  return error;
}
