import { readdirSync, rmSync, statSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import Database from 'libsql';
import { sharedConnection } from './connection.ts';
import { databasePath } from './database-url.ts';
import { DEAD_AFTER_MS } from './dead-after.ts';
import { failDeadJobs } from './jobs.ts';
import { recoverImports } from './withdraw.ts';

export interface Recovered {
  /** jobs that were running and are failed now */
  failedJobs: string[];
  /** imports that had been stored in part and were taken back */
  withdrawnImports: number[];
  /** staging databases that were removed */
  stagingFiles: string[];
}

/** Clears up what dead processes left: their jobs fail, their half-stored imports vanish, their staging files go. For the
 *  start of a server, and again half a minute later: what died just before may still look alive. Harmless to processes
 *  that live. */
export async function recoverStore({ deadAfterMs = DEAD_AFTER_MS } = {}): Promise<Recovered> {
  const path = databasePath();
  const failedJobs = await failDeadJobs({ deadAfterMs });
  const withdrawnImports = await recoverImports(sharedConnection(path), deadAfterMs);
  return { failedJobs, withdrawnImports, stagingFiles: removeDeadStaging(path, deadAfterMs) };
}

function removeDeadStaging(path: string, deadAfterMs: number): string[] {
  const prefix = `${basename(path)}.staging-`;
  const files = readdirSync(dirname(path)).filter((name) => name.startsWith(prefix));
  return files.filter((name) => {
    const file = join(dirname(path), name);
    if (Date.now() - statSync(file).mtimeMs < deadAfterMs || isHeld(file)) return false;
    rmSync(file, { force: true });
    return true;
  });
}

/** True while the process that fills a staging database lives: it holds the file's lock. */
function isHeld(file: string): boolean {
  const connection = new Database(':memory:');
  try {
    // Attached, for a connection's own file stays open until its statements are collected.
    connection.prepare('ATTACH DATABASE ? AS staging').run([file]);
    connection.exec('BEGIN EXCLUSIVE');
    connection.exec('ROLLBACK');
    connection.exec('DETACH DATABASE staging');
    return false;
  } catch (error) {
    return String((error as { code?: unknown }).code).startsWith('SQLITE_BUSY');
  } finally {
    connection.close();
  }
}
