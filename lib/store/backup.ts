import { copyFileSync, existsSync, mkdirSync, renameSync, rmSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { whenFree } from './busy.ts';
import { type Connection, immediately, openConnection, rows } from './connection.ts';
import { databasePath, databaseUrl } from './database-url.ts';
import { StoreError } from './errors.ts';
import { migrate } from './migrate.ts';
import { closeStore } from './open.ts';
import { liveServer } from './server-lock.ts';

/** Writes the whole database, as it stands at one moment, to a new file; also while others use it.
 *  @throws StoreError 'exists' when there is such a file, 'unwritable' when it cannot be made */
export async function backup(out: string, path = databasePath()): Promise<void> {
  const target = resolve(out);
  if (existsSync(target)) throw new StoreError('exists', `${target} is there already; give the backup another name.`);
  if (!existsSync(dirname(target))) {
    throw new StoreError('unwritable', `There is no folder ${dirname(target)} to write the backup to.`);
  }
  const partial = `${target}.partial`;
  rmSync(partial, { force: true });
  const connection = openConnection(path);
  try {
    await whenFree(() => connection.prepare('VACUUM INTO ?').run([partial]), { waitMs: 60_000 });
    renameSync(partial, target);
  } catch (cause) {
    rmSync(partial, { force: true });
    throw new StoreError('unwritable', `The backup ${target} could not be written: ${messageOf(cause)}.`, { cause });
  } finally {
    connection.close();
  }
}

/** Puts a backup in the database's place. The database that stood there is kept beside it until the backup has been
 *  copied, checked and brought to this version's form; when anything of that fails, it stays.
 *  @throws StoreError 'in-use' while a server runs on the database, 'missing', 'not-a-database' or 'not-hungerstone' for a
 *          file that is no backup, 'newer' for one of a newer version */
export async function restore(file: string, path = databasePath()): Promise<void> {
  const server = liveServer(path);
  if (server !== null) {
    throw new StoreError('in-use', `A server (process ${server}) uses the database; stop it, then restore.`);
  }
  const source = resolve(file);
  if (!existsSync(source)) throw new StoreError('missing', `There is no file ${source}.`);
  if (source === path) throw new StoreError('bad-input', `${source} is the database itself, and no backup of it.`);
  const incoming = `${path}.restoring`;
  removeDatabase(incoming);
  try {
    checkBackup(source);
    mkdirSync(dirname(path), { recursive: true });
    copyFileSync(source, incoming);
    await migrate(databaseUrl(incoming));
    settle(incoming);
    await swapIn(incoming, path);
  } finally {
    removeDatabase(incoming);
  }
}

/** Tables that tell a database of this program from another. */
const OURS = ['Region', 'Station', 'Import', 'Part', 'Record', '_prisma_migrations'];

function checkBackup(source: string): void {
  let connection: Connection | undefined;
  try {
    connection = openConnection(source);
    const names = rows(connection, "SELECT name FROM sqlite_master WHERE type = 'table'").all([]).flat();
    if (!OURS.every((name) => names.includes(name))) {
      throw new StoreError('not-hungerstone', `${source} is not a backup of this program: nothing was changed.`);
    }
    const [verdict] = rows(connection, 'PRAGMA quick_check(1)').get([]) as [string];
    if (verdict !== 'ok') throw new StoreError('not-a-database', `${source} is damaged: nothing was changed.`);
  } catch (cause) {
    if (cause instanceof StoreError && cause.code !== 'not-a-database') throw cause;
    throw new StoreError('not-a-database', `${source} is not a database, or is damaged: nothing was changed.`, {
      cause,
    });
  } finally {
    connection?.close();
  }
}

/** Brings all of a database into its one file, so that it can be moved. */
function settle(path: string): void {
  const connection = openConnection(path);
  connection.exec('PRAGMA wal_checkpoint(TRUNCATE)');
  connection.close();
}

async function swapIn(incoming: string, path: string): Promise<void> {
  await closeStore();
  const aside = `${path}.before-restore`;
  removeDatabase(aside);
  if (existsSync(path)) await endWriting(path);
  for (const end of ENDINGS) if (existsSync(path + end)) renameSync(path + end, aside + end);
  try {
    renameSync(incoming, path);
    openConnection(path).close();
  } catch (error) {
    for (const end of ENDINGS) if (existsSync(aside + end)) renameSync(aside + end, path + end);
    throw error;
  }
  removeDatabase(aside);
}

/** Waits for writers of other processes, and brings what they wrote into the file. A damaged database is left as it is. */
async function endWriting(path: string): Promise<void> {
  try {
    const connection = openConnection(path);
    try {
      await whenFree(() => immediately(connection, () => undefined), { waitMs: 10_000 });
      connection.exec('PRAGMA wal_checkpoint(TRUNCATE)');
    } finally {
      connection.close();
    }
  } catch (error) {
    if ((error as Error).name === 'StoreBusyError') throw error;
  }
}

const ENDINGS = ['', '-wal', '-shm'];

function removeDatabase(path: string): void {
  for (const end of ENDINGS) rmSync(path + end, { force: true });
}

const messageOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
