import { execFile } from 'node:child_process';
import { createHash } from 'node:crypto';
import { cpSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { expect, test } from 'vitest';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { migrationsFolder } from '../../../lib/store/database-url.ts';
import { migrate, readMigrations } from '../../../lib/store/migrate.ts';
import { openStore } from '../../../lib/store/open.ts';
import { bundleScript } from './bundle.ts';
import { temporaryDatabase } from './temporary-database.ts';

const run = promisify(execFile);
const place = temporaryDatabase({ migrated: false });

test('migrate() makes the database and its folder, in WAL, and a second call applies nothing', async () => {
  const path = join(place.folder, 'new', 'hungerstone.db');
  const names = readMigrations().map(({ name }) => name);
  expect(await migrate(`file:${path}`)).toEqual(names);
  expect(await migrate(`file:${path}`)).toEqual([]);
  const connection = openConnection(path);
  expect(rows(connection, 'PRAGMA journal_mode').get([])).toEqual(['wal']);
  connection.close();
});

test('migrate() keeps Prisma’s own table, with the SHA-256 of each file', async () => {
  await migrate();
  const connection = openConnection(place.path);
  const stored = rows(connection, 'SELECT migration_name, checksum, applied_steps_count FROM _prisma_migrations').all(
    [],
  );
  connection.close();
  const file = join(migrationsFolder(), '20261201000000_first', 'migration.sql');
  const checksum = createHash('sha256').update(readFileSync(file)).digest('hex');
  expect(stored).toContainEqual(['20261201000000_first', checksum, 1]);
});

test('the migrations make exactly the columns that the Prisma client knows', async () => {
  await migrate();
  const { prisma } = openStore();
  const models = (
    prisma as unknown as { _runtimeDataModel: { models: Record<string, { fields: { name: string; kind: string }[] }> } }
  )._runtimeDataModel.models;
  const connection = openConnection(place.path);
  expect(Object.keys(models).length).toBeGreaterThanOrEqual(11);
  for (const [model, { fields }] of Object.entries(models)) {
    const columns = rows(connection, `SELECT name FROM pragma_table_info('${model}')`).all([]).flat();
    const known = fields.filter(({ kind }) => kind === 'scalar').map(({ name }) => name);
    // A column that a later migration adds stands last in the table, wherever the schema has it.
    expect(columns.sort(), model).toEqual(known.sort());
  }
  connection.close();
});

test('four processes that migrate a new database at once apply each migration once', async () => {
  const lines = `import { migrate } from '@/lib/store/migrate.ts'; process.stdout.write(JSON.stringify(await migrate()));`;
  const bundle = await bundleScript(lines, join(place.folder, 'migrate.mjs'));
  const outputs = await Promise.all([1, 2, 3, 4].map(() => run(process.execPath, [bundle])));
  const applied = outputs.flatMap(({ stdout }) => JSON.parse(stdout) as string[]);
  expect(applied.sort()).toEqual(readMigrations().map(({ name }) => name));
});

test('migrate() leaves nothing of a migration that fails half way', async () => {
  const folder = join(place.folder, 'migrations');
  cpSync(migrationsFolder(), folder, { recursive: true });
  mkdirSync(join(folder, '20990101000000_broken'));
  writeFileSync(
    join(folder, '20990101000000_broken', 'migration.sql'),
    'CREATE TABLE "Half" ("id" INTEGER);\nCREATE TABLE "Region" ("id" INTEGER);',
  );
  await expect(migrate(undefined, { folder })).rejects.toThrow('already exists');
  const connection = openConnection(place.path);
  const names = rows(connection, "SELECT name FROM sqlite_master WHERE type = 'table'").all([]).flat();
  connection.close();
  expect(names).toContain('Region');
  expect(names).not.toContain('Half');
});

test('migrate() refuses a database of a newer version, and one whose migration reads differently', async () => {
  await migrate();
  const connection = openConnection(place.path);
  connection.exec("UPDATE _prisma_migrations SET migration_name = '20990101000000_later'");
  await expect(migrate()).rejects.toMatchObject({
    code: 'newer',
    message: expect.stringContaining('20990101000000_later'),
  });
  connection.exec("UPDATE _prisma_migrations SET migration_name = '20261201000000_first', checksum = 'other'");
  await expect(migrate()).rejects.toMatchObject({ code: 'newer' });
  connection.close();
});

test('migrate() says in one line what is wrong with the place it was given', async () => {
  const text = join(place.folder, 'notes.db');
  writeFileSync(text, 'These are notes, and no database.');
  await expect(migrate(`file:${text}`)).rejects.toMatchObject({ code: 'not-a-database' });
  await expect(migrate(`file:${text}/inside.db`)).rejects.toMatchObject({ code: 'unwritable' });
  await expect(migrate(`file:${place.folder}`)).rejects.toMatchObject({ code: 'not-a-database' });
  await expect(migrate('postgres://localhost/x')).rejects.toMatchObject({ code: 'bad-url' });
  for (const url of [`file:${text}`, `file:${text}/inside.db`, `file:${place.folder}`]) {
    const error = await migrate(url).catch((thrown: Error) => thrown);
    expect((error as Error).message).not.toContain('\n');
  }
});

test('openStore() refuses a database that is not there and makes none', () => {
  expect(() => openStore()).toThrow('There is no database at');
  expect(existsSync(place.path)).toBe(false);
});
