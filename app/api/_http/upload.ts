import { createWriteStream } from 'node:fs';
import { mkdir, statfs } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { ReadableStream as NodeReadableStream } from 'node:stream/web';
import busboy from 'busboy';
import type { GivenFile } from '@/lib/jobs/import-types';
import { uploadLimit } from '@/lib/jobs/upload-limit';
import { Problem } from './problem';

const GIB = 2 ** 30;
/** An import needs room for the upload, its staging database and the stored parts: about as much again each. */
const ROOM_FACTOR = 3;
/** Files at once. */
export const MOST_FILES = 5_000;
const LONGEST_NAME = 200;

export interface Upload {
  files: GivenFile[];
  /** the form's other fields */
  fields: Map<string, string>;
}

/** Writes the files of a multipart request into `folder` as they arrive, holding none of them in memory.
 *
 *  On disk they are called 0, 1, 2 …: a name from outside never becomes a path.
 *  @throws Problem when it is no multipart form, too large, cut off, holds no file, or the disk has no room */
export async function receiveUpload(request: Request, folder: string): Promise<Upload> {
  const announced = Number(request.headers.get('content-length') ?? Number.NaN);
  const limit = uploadLimit();
  if (announced > limit) throw tooLarge(limit);
  if (!request.body) throw new Problem('bad-body', 'Send the files as a multipart form.');
  await mkdir(folder, { recursive: true });
  await checkRoom(folder, announced);

  const parser = openParser(request);
  const files: GivenFile[] = [];
  const fields = new Map<string, string>();
  const writes: Promise<void>[] = [];
  let received = 0;
  parser.on('file', (_field, stream, { filename }) => {
    const file = { path: join(folder, String(files.length)), name: safeName(filename) };
    files.push(file);
    const write = pipeline(stream, createWriteStream(file.path));
    // Waited for below; a failure of the parser comes first and must not leave this one unheard.
    write.catch(() => undefined);
    writes.push(write);
  });
  parser.on('field', (name, value) => fields.set(name, value));

  async function* counted(source: Readable): AsyncGenerator<Buffer> {
    for await (const chunk of source) {
      received += (chunk as Buffer).byteLength;
      if (received > limit) throw tooLarge(limit);
      yield chunk as Buffer;
    }
  }
  try {
    await pipeline(Readable.fromWeb(request.body as NodeReadableStream<Uint8Array>), counted, parser);
    await Promise.all(writes);
  } catch (error) {
    if (error instanceof Problem) throw error;
    throw new Problem('cut-off', 'The connection broke off, or the form is not well formed. Send it again.');
  }
  if (Number.isFinite(announced) && received !== announced) {
    throw new Problem('cut-off', `${received} of ${announced} bytes arrived. Send it again.`);
  }
  if (files.length === 0) throw new Problem('bad-body', 'The form holds no file.');
  return { files, fields };
}

function openParser(request: Request): busboy.Busboy {
  try {
    return busboy({
      headers: { 'content-type': request.headers.get('content-type') ?? '' },
      defParamCharset: 'utf8',
      limits: { files: MOST_FILES, fields: 20, fieldSize: 2 ** 20 },
    });
  } catch {
    throw new Problem('bad-body', 'Send the files as a multipart form (multipart/form-data).');
  }
}

async function checkRoom(folder: string, announced: number): Promise<void> {
  if (!Number.isFinite(announced)) return;
  const { bavail, bsize } = await statfs(folder);
  if (bavail * bsize < announced * ROOM_FACTOR) {
    const gib = (bytes: number) => (bytes / GIB).toFixed(1);
    throw new Problem(
      'no-space',
      `This import needs about ${gib(announced * ROOM_FACTOR)} GiB beside the database, and ${gib(bavail * bsize)} GiB are free.`,
    );
  }
}

function tooLarge(limit: number): Problem {
  return new Problem(
    'too-large',
    `At most ${(limit / GIB).toFixed(1)} GiB at once. Send fewer files, use the import command, or raise HUNGERSTONE_MAX_UPLOAD.`,
  );
}

/** A file's name as it may be shown and stored: no folders, no control characters, no endless length. */
function safeName(name: string | undefined): string {
  const last = (name ?? '').split(/[/\\]/).at(-1)!;
  const clean = last.replace(/\p{Cc}|\p{Cf}/gu, '').trim();
  return clean.length > LONGEST_NAME ? clean.slice(-LONGEST_NAME) : clean || 'unnamed';
}
