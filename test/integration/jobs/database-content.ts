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
    const tables = TABLES.map((table) => [table, rows(connection, `SELECT * FROM "${table}"`).all([])]);
    return JSON.stringify(tables, (_, value) => (Buffer.isBuffer(value) ? value.toString('base64') : value));
  } finally {
    connection.close();
  }
}
