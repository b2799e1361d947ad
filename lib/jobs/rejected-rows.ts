import { closeSync, existsSync, mkdirSync, openSync, readdirSync, rmSync, writeSync } from 'node:fs';
import { basename, join } from 'node:path';
import { csvLine } from '../intake/csv-line.ts';
import type { RejectedRow } from '../intake/types.ts';
import { databasePath } from '../store/database-url.ts';

/** Rows are gathered to blocks of about this many characters before they are written. */
const BLOCK = 64 * 1024;

/** Folder, beside the database, in which every rejected row of every import stands as CSV. */
export function rejectedFolder(path = databasePath()): string {
  return `${path}.rejected`;
}

/** Path of the file that a report names as its `rejectedFile`. */
export function rejectedPath(name: string): string {
  return join(rejectedFolder(), basename(name));
}

/** Writes rejected rows as they come. Nothing is made on disk before the first one. */
export interface RejectedRowsFile {
  write(row: RejectedRow): void;
  /** @returns the file's name, or null when no row was rejected */
  close(): string | null;
  /** Takes away what was written, when the file was refused after all. */
  discard(): void;
}

/** A file for the rejected rows of one file of one import. Synchronous: it is written in a worker. */
export function rejectedRowsFile(jobId: string, fileNumber: number): RejectedRowsFile {
  const name = `${jobId}-${fileNumber}.csv`;
  let file: number | null = null;
  let waiting = '';
  const flush = () => {
    if (file !== null) writeSync(file, waiting);
    waiting = '';
  };
  const close = () => {
    if (file === null) return null;
    flush();
    closeSync(file);
    file = null;
    return name;
  };
  return {
    write({ row, text, reason }) {
      if (file === null) {
        mkdirSync(rejectedFolder(), { recursive: true });
        file = openSync(rejectedPath(name), 'w');
        waiting = csvLine(['row', 'text', 'reason']);
      }
      waiting += csvLine([String(row), text, reason]);
      if (waiting.length > BLOCK) flush();
    },
    close,
    discard: () => discardRejectedRows([close()]),
  };
}

/** Removes the rejected rows of an import that was not taken or was undone. */
export function discardRejectedRows(names: readonly (string | null)[]): void {
  for (const name of names) {
    if (name !== null && existsSync(rejectedPath(name))) rmSync(rejectedPath(name));
  }
}

/** Removes all rejected rows of a job that died. */
export function discardRejectedRowsOfJob(jobId: string): void {
  if (!existsSync(rejectedFolder())) return;
  discardRejectedRows(readdirSync(rejectedFolder()).filter((name) => name.startsWith(`${jobId}-`)));
}

/** The file of rejected rows that a stored report names; null when it names none. */
export function rejectedFileOf(report: unknown): string | null {
  const name = (report as { rejectedFile?: unknown } | null)?.rejectedFile;
  return typeof name === 'string' ? name : null;
}
