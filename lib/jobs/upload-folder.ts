import { mkdir, readdir, rm, stat } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { databasePath } from '../store/database-url.ts';

/** An upload that nobody has touched for this time, milliseconds, is given up, or belongs to a process that died. */
const ABANDONED_MS = 24 * 3_600_000;

/** Folder of an import's uploaded files, beside the database. */
export function uploadFolder(jobId: string, path = databasePath()): string {
  if (!/^[A-Za-z0-9_-]{1,100}$/.test(jobId)) {
    throw new RangeError(`uploadFolder: jobId must be a plain word, got "${jobId}"`);
  }
  return `${path}.upload-${jobId}`;
}

/** Removes an import's uploaded files: when it is over, however it ended. */
export async function discardUpload(jobId: string): Promise<void> {
  await rm(uploadFolder(jobId), { recursive: true, force: true });
}

/** Removes the uploads that were given up without a word, and what dead processes left. */
export async function discardAbandonedUploads(now = Date.now()): Promise<void> {
  const path = databasePath();
  const folder = dirname(path);
  await mkdir(folder, { recursive: true });
  for (const name of await readdir(folder)) {
    if (!name.startsWith(`${basename(path)}.upload-`)) continue;
    const { mtimeMs } = await stat(join(folder, name));
    if (now - mtimeMs > ABANDONED_MS) await rm(join(folder, name), { recursive: true, force: true });
  }
}
