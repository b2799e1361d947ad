import { Readable } from 'node:stream';
import { ZipFile } from 'yazl';

/** One file of an archive. Its text is made only when its turn has come. */
export interface ArchiveFile {
  /** with folders, slashes between */
  name: string;
  text(): Iterable<string> | AsyncIterable<string>;
}

/** Of compression: half the time of the usual 6, and tables of numbers grow by a few per cent. */
const LEVEL = 3;

/** Characters handed on at a time: small pieces would each cost a turn of the event loop. */
const PIECE = 1 << 18;

/** A ZIP archive of the files given, as a stream of bytes; no more of it is held than a few pieces, however long it gets
 *  (ZIP64 where it must be).
 *  @param modified  the time written on every file, so that equal content gives equal archives
 *  @param onFile    told of each file as it begins */
export function zipOf(
  files: readonly ArchiveFile[],
  { modified, onFile, signal }: { modified: Date; onFile?: (done: number) => void; signal?: AbortSignal },
): Readable {
  const zip = new ZipFile();
  const out = zip.outputStream as Readable;
  const fail = (error: unknown) => out.destroy(error instanceof Error ? error : new Error(String(error)));
  zip.on('error', fail);
  signal?.addEventListener('abort', () => fail(signal.reason), { once: true });
  for (const [done, file] of files.entries()) {
    zip.addReadStreamLazy(file.name, { mtime: modified, mode: 0o100644, compressionLevel: LEVEL }, (give) => {
      onFile?.(done);
      const stream = Readable.from(inPieces(file.text()), { objectMode: false });
      stream.on('error', fail);
      give(null, stream);
    });
  }
  zip.end();
  return out;
}

async function* inPieces(text: Iterable<string> | AsyncIterable<string>): AsyncGenerator<Buffer> {
  let piece = '';
  for await (const some of text) {
    piece += some;
    if (piece.length < PIECE) continue;
    yield Buffer.from(piece);
    piece = '';
  }
  if (piece !== '') yield Buffer.from(piece);
}
