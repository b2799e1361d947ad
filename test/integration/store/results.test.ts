import { expect, test } from 'vitest';
import { openConnection, rows, timestamp } from '../../../lib/store/connection.ts';
import { getResult, putResult } from '../../../lib/store/results.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const bytes = (size: number, fill = 1) => new Uint8Array(size).fill(fill);

function setLastUsed(key: string, date: Date): void {
  const connection = openConnection(place.path);
  connection.exec(`UPDATE Result SET lastUsed = '${timestamp(date)}' WHERE key = '${key}'`);
  connection.close();
}

const keys = (): unknown[] => {
  const connection = openConnection(place.path);
  const found = rows(connection, 'SELECT key FROM Result ORDER BY key').all([]).flat();
  connection.close();
  return found;
};

test('getResult() gives what putResult() stored under kind and key, and null for anything else', async () => {
  await putResult('ranking', 'k', bytes(3, 7));
  expect([...getResult('ranking', 'k')!]).toEqual([7, 7, 7]);
  expect(getResult('curves', 'k')).toBeNull();
  await putResult('ranking', 'k', bytes(2, 8));
  expect([...getResult('ranking', 'k')!]).toEqual([8, 8]);
  const part = new Uint8Array([0, 1, 2, 3]).subarray(1, 3);
  await putResult('ranking', 'part', part);
  expect([...getResult('ranking', 'part')!]).toEqual([1, 2]);
});

test('putResult() makes room by dropping the least recently used; a reading counts as use', async () => {
  const limitBytes = 300;
  const minute = (n: number) => new Date(Date.UTC(2026, 0, 1, 0, n));
  for (const [index, key] of ['a', 'b', 'c'].entries()) {
    await putResult('x', key, bytes(100), { limitBytes });
    setLastUsed(key, minute(index));
  }
  expect(keys()).toEqual(['a', 'b', 'c']);
  getResult('x', 'a');
  await putResult('x', 'd', bytes(100), { limitBytes });
  expect(keys()).toEqual(['a', 'c', 'd']);
  await putResult('x', 'e', bytes(250), { limitBytes });
  expect(keys()).toEqual(['e']);
});

test('a result of exactly the limit is stored, one byte more is not and drops nothing', async () => {
  expect(await putResult('x', 'full', bytes(300), { limitBytes: 300 })).toBe(true);
  expect(await putResult('x', 'over', bytes(301), { limitBytes: 300 })).toBe(false);
  expect(keys()).toEqual(['full']);
});

test('a reading is noted at most once a minute, and never waits for a writer', async () => {
  await putResult('x', 'k', bytes(1));
  const connection = openConnection(place.path);
  const lastUsed = () => (rows(connection, 'SELECT lastUsed FROM Result').get([]) as [string])[0];
  const written = lastUsed();
  getResult('x', 'k');
  expect(lastUsed()).toBe(written);
  setLastUsed('k', new Date(Date.now() - 61_000));
  getResult('x', 'k');
  expect(Date.now() - Date.parse(lastUsed())).toBeLessThan(30_000);
  setLastUsed('k', new Date(0));
  connection.exec('BEGIN IMMEDIATE');
  const start = performance.now();
  expect(getResult('x', 'k')).not.toBeNull();
  expect(performance.now() - start).toBeLessThan(250);
  connection.exec('COMMIT');
  expect(Date.parse(lastUsed())).toBe(0);
  connection.close();
});
