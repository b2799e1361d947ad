import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';

/** Who serves a database. */
interface ServerMark {
  pid: number;
  /** when that process began, in the kernel's ticks: tells it from another that was given its number later */
  began: string | null;
}

const lockPath = (path: string): string => `${path}.server-lock`;

/** Notes beside the database that this process serves it.
 *  @returns takes the note away; call it when the server ends
 *  @throws StoreError 'in-use' when another live server serves it */
export function takeServerLock(path = databasePath()): () => void {
  const file = lockPath(path);
  const mine: ServerMark = { pid: process.pid, began: beginOf(process.pid) };
  for (;;) {
    try {
      writeFileSync(file, JSON.stringify(mine), { flag: 'wx' });
      break;
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
      const other = liveServer(path);
      if (other !== null && other !== process.pid) {
        throw new StoreError('in-use', `A server (process ${other}) already serves this database; stop it first.`);
      }
      rmSync(file, { force: true });
    }
  }
  return () => {
    if (readMark(file)?.pid === process.pid) rmSync(file, { force: true });
  };
}

/** Process id of the live server of a database, or null. */
export function liveServer(path = databasePath()): number | null {
  const mark = readMark(lockPath(path));
  if (!mark || !isAlive(mark.pid)) return null;
  const began = beginOf(mark.pid);
  return mark.began !== null && began !== null && began !== mark.began ? null : mark.pid;
}

function readMark(file: string): ServerMark | null {
  try {
    const mark = JSON.parse(readFileSync(file, 'utf8')) as Partial<ServerMark>;
    return typeof mark.pid === 'number' ? { pid: mark.pid, began: mark.began ?? null } : null;
  } catch {
    return null;
  }
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    // Someone else's process may not be signalled, but is there.
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}

/** Field 22 of /proc/PID/stat, where there is such a thing. The name before it may hold blanks and brackets. */
function beginOf(pid: number): string | null {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? null;
  } catch {
    return null;
  }
}
