import { openConnection, rows } from '../../../lib/store/connection.ts';

const TABLES = [
  ...['Region', 'Station', 'Link', 'Layer', 'SavedMapping', 'Basis'],
  ...['Import', 'Part', 'Record', 'Laid', 'Mark', 'Finding'],
];

/** All that a person put into the database, as text: equal before and after something that must leave nothing behind.
 *  Jobs and results are not part of it. */
export function databaseContent(path: string): string {
  const connection = openConnection(path);
  try {
    const tables = TABLES.map((table) => {
      const found = rows(connection, `SELECT * FROM "${table}"`).all([]) as unknown[][];
      return [table, found.map((row) => row.map(plain))];
    });
    return JSON.stringify(tables);
  } finally {
    connection.close();
  }
}

/** Bytes as text, shorter than what JSON would make of them. */
const plain = (value: unknown): unknown => {
  if (value instanceof Uint8Array) return Buffer.from(value).toString('base64');
  if (value instanceof ArrayBuffer) return Buffer.from(value).toString('base64');
  return value;
};
