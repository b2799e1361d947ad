import { accessSync, constants, existsSync, mkdirSync, statSync } from 'node:fs';
import { dirname } from 'node:path';
import Database from 'libsql';
import { BLOCK_MS } from './busy.ts';
import { databasePath } from './database-url.ts';
import { StoreError } from './errors.ts';

/** A connection of the libsql package itself, below Prisma: for bulk blobs, for imports, and for threads that read
 *  records and want no Prisma. Its calls are synchronous. */
export type Connection = Database.Database;
export type Row = readonly unknown[];

const REMEDY = 'Give another place by DATABASE_URL=file:/path/to/hungerstone.db.';

/** Opens a connection of one's own; the caller closes it. Foreign keys are not enforced here: imports write parts before
 *  the stations they belong to, and show all of it at once at the end.
 *  @throws StoreError 'missing', 'unwritable' or 'not-a-database', each with the file and a remedy */
export function openConnection(path = databasePath(), { mayBeNew = false, blockMs = BLOCK_MS } = {}): Connection {
  checkPlace(path, mayBeNew);
  let connection: Connection | undefined;
  try {
    connection = new Database(path, { timeout: blockMs });
    connection.exec('PRAGMA synchronous=NORMAL');
    connection.exec('PRAGMA foreign_keys=OFF');
    // Only SQLite may look into the file: to close it through node:fs would drop the locks that this process holds on it.
    connection.prepare('SELECT 1 FROM sqlite_master LIMIT 1').get([]);
    return connection;
  } catch (cause) {
    connection?.close();
    const { code, message } = cause as { code?: string; message: string };
    if (code === 'SQLITE_NOTADB' || code === 'SQLITE_CORRUPT') {
      throw new StoreError('not-a-database', `${path} is not a database, or is damaged. ${REMEDY}`, { cause });
    }
    if (code === undefined || code.startsWith('SQLITE_CANTOPEN') || code.startsWith('SQLITE_READONLY')) {
      throw new StoreError('unwritable', `Cannot open the database ${path}: ${message}. ${REMEDY}`, { cause });
    }
    throw cause;
  }
}

function checkPlace(path: string, mayBeNew: boolean): void {
  const folder = dirname(path);
  try {
    if (mayBeNew) mkdirSync(folder, { recursive: true });
    if (existsSync(folder)) accessSync(folder, constants.W_OK);
  } catch (cause) {
    throw new StoreError('unwritable', `Cannot write in ${folder}, where the database belongs. ${REMEDY}`, { cause });
  }
  if (!existsSync(path)) {
    if (mayBeNew) return;
    throw new StoreError('missing', `There is no database at ${path} yet: "npm start" makes one.`);
  }
  if (!statSync(path).isFile()) throw new StoreError('not-a-database', `${path} is not a file. ${REMEDY}`);
  try {
    accessSync(path, constants.R_OK | constants.W_OK);
  } catch (cause) {
    throw new StoreError('unwritable', `Cannot write to the database ${path}. ${REMEDY}`, { cause });
  }
}

const KEY = Symbol.for('hungerstone.connections');
const holder = globalThis as { [KEY]?: Map<string, Connection> };

/** The thread's own connection to a database, opened on first use and kept. */
export function sharedConnection(path = databasePath()): Connection {
  holder[KEY] ??= new Map();
  let connection = holder[KEY].get(path);
  if (!connection) {
    connection = openConnection(path);
    holder[KEY].set(path, connection);
  }
  return connection;
}

/** Closes the thread's connection to a database, or to all. */
export function closeSharedConnections(path?: string): void {
  for (const [key, connection] of holder[KEY] ?? []) {
    if (path !== undefined && key !== path) continue;
    holder[KEY]?.delete(key);
    connection.close();
  }
}

const prepared = new WeakMap<Connection, Map<string, Database.Statement>>();

function prepareOnce(connection: Connection, key: string, prepare: () => Database.Statement): Database.Statement {
  const statements = prepared.get(connection) ?? new Map<string, Database.Statement>();
  prepared.set(connection, statements);
  const statement = statements.get(key) ?? prepare();
  statements.set(key, statement);
  return statement;
}

/** A statement that changes something, prepared once a connection. The SQL is one of few: values go in by `?`. */
export const change = (connection: Connection, sql: string): Database.Statement =>
  prepareOnce(connection, sql, () => connection.prepare(sql));

/** A query whose rows come as arrays, prepared once a connection. */
export const rows = (connection: Connection, sql: string): Database.Statement =>
  prepareOnce(connection, `rows ${sql}`, () => {
    // `raw` is in libsql's statements but not in its types.
    const statement = connection.prepare(sql) as Database.Statement & { raw(on?: boolean): Database.Statement };
    return statement.raw(true);
  });

/** Runs `change` in one transaction that holds the write lock from its start, so that what it read stays true.
 *  Synchronous; put it into whenFree to wait for others. Rolls back when `change` throws.
 *
 *  Every write goes through a transaction that `exec` begins. A prepared write that finds the database locked stays in
 *  progress until it is collected, and no later COMMIT of its connection succeeds till then. */
export function immediately<T>(connection: Connection, change: () => T): T {
  connection.exec('BEGIN IMMEDIATE');
  try {
    const result = change();
    connection.exec('COMMIT');
    return result;
  } catch (error) {
    if (connection.inTransaction) connection.exec('ROLLBACK');
    throw error;
  }
}

/** Now, as Prisma writes it, so that its text order is the order of time. */
export const timestamp = (date = new Date()): string => date.toISOString().replace('Z', '+00:00');
