import type { PrismaLibSql } from '@prisma/adapter-libsql';
import { type Connection, immediately } from './connection.ts';

type Client = ReturnType<PrismaLibSql['createClient']>;
type Transaction = Awaited<ReturnType<Client['transaction']>>;
type ResultSet = Awaited<ReturnType<Transaction['execute']>>;
type Statement = Parameters<Transaction['execute']>[0];
type Arguments = Exclude<Statement, string>['args'];

/** What runs as it is; everything else is taken for a write. */
const READS = /^\s*(?:SELECT|PRAGMA|EXPLAIN)\b/i;

/** The client that Prisma's libSQL adapter works through, on one connection of a local file.
 *
 *  The stock client gives each transaction the connection for its own and opens a new one for what follows: two file
 *  descriptors and the PRAGMAs are lost each time, and it begins deferred, so that two processes that read, merge and
 *  write run into each other. Here transactions begin immediate on the one connection; the adapter already lets nothing
 *  else run on it meanwhile.
 *
 *  Nothing but BEGIN IMMEDIATE ever waits for the lock, and that goes by `exec`: a prepared write that finds the
 *  database locked stays in progress until it is collected, and no later COMMIT of its connection succeeds till then. */
export function localClient(connection: Connection): Client {
  const run = (statement: Statement, args?: Arguments): ResultSet => {
    const [sql, values] = typeof statement === 'string' ? [statement, args] : [statement.sql, statement.args];
    return execute(connection, sql, values);
  };
  const unsupported = (): never => {
    throw new Error('localClient: not for a local file');
  };
  return {
    protocol: 'file',
    get closed() {
      return !connection.open;
    },
    execute: async (statement: Statement, args?: Arguments) => {
      const sql = typeof statement === 'string' ? statement : statement.sql;
      return READS.test(sql) ? run(statement, args) : immediately(connection, () => run(statement, args));
    },
    batch: async (statements) =>
      immediately(connection, () =>
        statements.map((statement) => (Array.isArray(statement) ? run(statement[0], statement[1]) : run(statement))),
      ),
    executeMultiple: async (sql) => void connection.exec(sql),
    transaction: async () => beginTransaction(connection, run),
    close: () => void connection.close(),
    migrate: unsupported,
    sync: unsupported,
    reconnect: unsupported,
  };
}

function beginTransaction(connection: Connection, run: (statement: Statement) => ResultSet): Transaction {
  connection.exec('BEGIN IMMEDIATE');
  let open = true;
  const rollback = () => {
    open = false;
    if (connection.inTransaction) connection.exec('ROLLBACK');
  };
  return {
    get closed() {
      return !open;
    },
    execute: async (statement) => run(statement),
    batch: async (statements) => statements.map((statement) => run(statement)),
    executeMultiple: async (sql) => void connection.exec(sql),
    commit: async () => {
      try {
        connection.exec('COMMIT');
        open = false;
      } catch (error) {
        rollback();
        throw error;
      }
    },
    rollback: async () => rollback(),
    close: rollback,
  };
}

/** What libsql's statements have beyond what their types say. */
interface RawStatement {
  reader: boolean;
  raw(): RawStatement;
  columns(): { name: string; type: string | null }[];
  all(values: unknown): unknown[][];
  run(values: unknown): { changes: number; lastInsertRowid: number | bigint };
}

function execute(connection: Connection, sql: string, args: Arguments = []): ResultSet {
  const statement = connection.prepare(sql) as unknown as RawStatement;
  const values = Array.isArray(args) ? args.map(toSql) : args;
  if (!statement.reader) {
    const { changes, lastInsertRowid } = statement.run(values);
    return resultOf([], [], [], changes, BigInt(lastInsertRowid));
  }
  const columns = statement.columns();
  const found = statement.raw().all(values);
  return resultOf(
    columns.map(({ name }) => name),
    columns.map(({ type }) => type ?? ''),
    found.map((row) => row.map(fromSql)) as unknown as ResultSet['rows'],
    0,
    undefined,
  );
}

const resultOf = (
  columns: string[],
  columnTypes: string[],
  rows: ResultSet['rows'],
  rowsAffected: number,
  lastInsertRowid: bigint | undefined,
): ResultSet => {
  const result = { columns, columnTypes, rows, rowsAffected, lastInsertRowid };
  return { ...result, toJSON: () => ({ ...result, lastInsertRowid: lastInsertRowid?.toString() }) };
};

function toSql(value: unknown): unknown {
  if (typeof value === 'boolean') return value ? 1 : 0;
  if (value instanceof ArrayBuffer) return Buffer.from(value);
  if (value instanceof Date) return value.valueOf();
  return value;
}

/** Blobs as the adapter takes them. */
function fromSql(value: unknown): unknown {
  if (!Buffer.isBuffer(value)) return value;
  const { buffer, byteOffset, byteLength } = value;
  return byteLength === buffer.byteLength ? buffer : buffer.slice(byteOffset, byteOffset + byteLength);
}
