import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { backup, restore } from '../../../lib/store/backup.ts';
import { openConnection } from '../../../lib/store/connection.ts';
import { createRegion, listRegions } from '../../../lib/store/regions.ts';
import { liveServer, takeServerLock } from '../../../lib/store/server-lock.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const inFolder = (name: string) => join(place.folder, name);

test('restore() brings back what backup() wrote, and leaves nothing else beside the database', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, Number.NaN, 3], codes: ['e', 'Ice', ''] }]]);
  const before = dump(place.path);
  const records = await seenRecords(regionId);
  await backup(inFolder('b.db'));
  await importFiles([[{ code: 'A', values: [9, 9, 9] }]], { revise: true });
  await createRegion({ name: 'Later' });
  await restore(inFolder('b.db'));
  expect(dump(place.path)).toEqual(before);
  expect(await seenRecords(regionId)).toEqual(records);
  const beside = readdirSync(place.folder).filter((name) => !/^(hungerstone\.db(-wal|-shm)?|b\.db)$/.test(name));
  expect(beside).toEqual([]);
  // and it can be written to
  await createRegion({ name: 'After' });
});

test('backup() writes while another connection holds the write lock, and never over a file', async () => {
  await createRegion({ name: 'Wethe' });
  const writer = openConnection(place.path);
  writer.exec('BEGIN IMMEDIATE');
  await backup(inFolder('b.db'));
  writer.exec('COMMIT');
  writer.close();
  await expect(backup(inFolder('b.db'))).rejects.toMatchObject({ code: 'exists' });
  await expect(backup(inFolder('none/b.db'))).rejects.toMatchObject({ code: 'unwritable' });
  expect(readdirSync(place.folder).filter((name) => name.includes('partial'))).toEqual([]);
});

test('restore() refuses what is no backup, and leaves the database as it was', async () => {
  await createRegion({ name: 'Wethe' });
  const before = dump(place.path);
  writeFileSync(inFolder('text.db'), 'no database at all, only a text of some length');
  const other = openConnection(inFolder('other.db'), { mayBeNew: true });
  other.exec('CREATE TABLE Region (id INTEGER)');
  other.close();
  await backup(inFolder('cut.db'));
  writeFileSync(inFolder('cut.db'), readFileSync(inFolder('cut.db')).subarray(0, 20_000));
  await expect(restore(inFolder('text.db'))).rejects.toMatchObject({ code: 'not-a-database' });
  await expect(restore(inFolder('other.db'))).rejects.toMatchObject({ code: 'not-hungerstone' });
  await expect(restore(inFolder('cut.db'))).rejects.toMatchObject({ code: 'not-a-database' });
  await expect(restore(inFolder('absent.db'))).rejects.toMatchObject({ code: 'missing' });
  await expect(restore(place.path)).rejects.toMatchObject({ code: 'bad-input' });
  expect(dump(place.path)).toEqual(before);
});

test('restore() refuses a backup of a newer version', async () => {
  await backup(inFolder('b.db'));
  const newer = openConnection(inFolder('b.db'));
  newer.exec("INSERT INTO _prisma_migrations (id, checksum, migration_name) VALUES ('x', 'x', '20990101000000_later')");
  newer.close();
  await createRegion({ name: 'Wethe' });
  await expect(restore(inFolder('b.db'))).rejects.toMatchObject({ code: 'newer' });
  expect(await listRegions()).toHaveLength(1);
});

test('restore() puts a backup in the place of a damaged database, and of none', async () => {
  await createRegion({ name: 'Wethe' });
  await backup(inFolder('b.db'));
  const elsewhere = inFolder('elsewhere/hungerstone.db');
  await restore(inFolder('b.db'), elsewhere);
  expect(dump(elsewhere)).toEqual(dump(place.path));
  writeFileSync(inFolder('damaged.db'), 'this was a database once');
  await restore(inFolder('b.db'), inFolder('damaged.db'));
  expect(dump(inFolder('damaged.db'))).toEqual(dump(place.path));
});

test('restore() refuses while a live server holds the lock; a dead server’s lock is no hindrance', async () => {
  await backup(inFolder('b.db'));
  const release = takeServerLock();
  expect(liveServer()).toBe(process.pid);
  await expect(restore(inFolder('b.db'))).rejects.toMatchObject({ code: 'in-use' });
  release();
  expect(liveServer()).toBeNull();
  expect(existsSync(`${place.path}.server-lock`)).toBe(false);
  // a process number that no system gives out
  writeFileSync(`${place.path}.server-lock`, JSON.stringify({ pid: 2 ** 30, began: null }));
  expect(liveServer()).toBeNull();
  await restore(inFolder('b.db'));
  takeServerLock()();
});

test('takeServerLock() refuses a second live server, and takes over from a dead one whose number was given again', () => {
  const file = `${place.path}.server-lock`;
  writeFileSync(file, JSON.stringify({ pid: process.ppid, began: null }));
  expect(() => takeServerLock()).toThrow(`process ${process.ppid}`);
  if (existsSync('/proc/self/stat')) {
    writeFileSync(file, JSON.stringify({ pid: process.ppid, began: '1' }));
    expect(liveServer()).toBeNull();
  }
  writeFileSync(file, 'half a li');
  const release = takeServerLock();
  expect(liveServer()).toBe(process.pid);
  release();
});
