import { createHash, randomUUID } from 'node:crypto';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { whenFree } from './busy.ts';
import { type Connection, immediately, openConnection, rows } from './connection.ts';
import { databasePath, migrationsFolder } from './database-url.ts';
import { StoreError } from './errors.ts';

/** As Prisma's own migrate keeps it, so that both agree on what has been applied. */
const TABLE = `CREATE TABLE IF NOT EXISTS "_prisma_migrations" (
    "id"                    TEXT PRIMARY KEY NOT NULL,
    "checksum"              TEXT NOT NULL,
    "finished_at"           DATETIME,
    "migration_name"        TEXT NOT NULL,
    "logs"                  TEXT,
    "rolled_back_at"        DATETIME,
    "started_at"            DATETIME NOT NULL DEFAULT current_timestamp,
    "applied_steps_count"   INTEGER UNSIGNED NOT NULL DEFAULT 0
)`;

export interface Migration {
  name: string;
  sql: string;
  /** SHA-256 of the file, hexadecimal */
  checksum: string;
}

/** The migrations of a folder, oldest first. */
export function readMigrations(folder = migrationsFolder()): Migration[] {
  return readdirSync(folder, { withFileTypes: true })
    .filter((entry) => entry.isDirectory() && existsSync(join(folder, entry.name, 'migration.sql')))
    .map((entry) => entry.name)
    .sort()
    .map((name) => {
      const bytes = readFileSync(join(folder, name, 'migration.sql'));
      return { name, sql: bytes.toString('utf8'), checksum: createHash('sha256').update(bytes).digest('hex') };
    });
}

/** Brings a database to the newest form, making it if there is none. Applies each migration once, each in a transaction
 *  of its own that holds the write lock, so that two processes may call it at once.
 *  @returns the names of the migrations that this call applied
 *  @throws StoreError when the file cannot be used, was made by a newer version, or knows a migration in other words;
 *          StoreBusyError when another process kept the lock for half a minute */
export async function migrate(url?: string, { folder = migrationsFolder() } = {}): Promise<string[]> {
  const path = databasePath(url);
  const wait = { waitMs: 30_000 };
  const connection = await whenFree(() => openConnection(path, { mayBeNew: true }), wait);
  try {
    await whenFree(() => connection.exec('PRAGMA journal_mode=WAL'), wait);
    refuseNewer(connection, folder);
    const applied: string[] = [];
    for (const migration of readMigrations(folder)) {
      const did = await whenFree(() => immediately(connection, () => applyOnce(connection, migration)), wait);
      if (did) applied.push(migration.name);
    }
    return applied;
  } finally {
    connection.close();
  }
}

function applyOnce(connection: Connection, { name, sql, checksum }: Migration): boolean {
  connection.exec(TABLE);
  const known = rows(
    connection,
    'SELECT checksum, finished_at FROM _prisma_migrations WHERE migration_name = ? AND rolled_back_at IS NULL',
  ).all([name]) as [string, unknown][];
  if (known.some(([stored, finished]) => stored === checksum && finished !== null)) return false;
  if (known.length > 0) {
    throw new StoreError(
      'newer',
      `Migration ${name} is not the one that made this database; use the version that did.`,
    );
  }
  const started = Date.now();
  connection.exec(sql);
  connection
    .prepare(
      `INSERT INTO _prisma_migrations (id, checksum, migration_name, started_at, finished_at, applied_steps_count)
       VALUES (?, ?, ?, ?, ?, 1)`,
    )
    .run([randomUUID(), checksum, name, started, Date.now()]);
  return true;
}

function refuseNewer(connection: Connection, folder: string): void {
  if (!rows(connection, "SELECT 1 FROM sqlite_master WHERE name = '_prisma_migrations'").get([])) return;
  const names = new Set(readMigrations(folder).map(({ name }) => name));
  const stored = rows(connection, 'SELECT migration_name FROM _prisma_migrations WHERE rolled_back_at IS NULL').all([]);
  const unknown = (stored as [string][]).map(([name]) => name).filter((name) => !names.has(name));
  if (unknown.length === 0) return;
  throw new StoreError(
    'newer',
    `The database was made by a newer version (${unknown.join(', ')}); update this program.`,
  );
}
