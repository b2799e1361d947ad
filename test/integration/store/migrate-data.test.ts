import { cpSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { blobOf, blobOfValues } from '../../../lib/store/blobs.ts';
import { openConnection, timestamp } from '../../../lib/store/connection.ts';
import { migrationsFolder } from '../../../lib/store/database-url.ts';
import { listImports, undoImport } from '../../../lib/store/imports.ts';
import { migrate, readMigrations } from '../../../lib/store/migrate.ts';
import { summarise } from '../../../lib/store/record-summary.ts';
import { addStation, editStation } from '../../../lib/store/station-edit.ts';
import { getStation, listStations } from '../../../lib/store/stations.ts';
import { dump, importFiles, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase({ migrated: false });
const FIRST = '20261201000000_first';

/** A database as the first version left it: a station of a flow import, corrected by a registry. */
async function oldDatabase(): Promise<void> {
  const folder = join(place.folder, 'migrations');
  mkdirSync(folder);
  cpSync(join(migrationsFolder(), FIRST), join(folder, FIRST), { recursive: true });
  expect(await migrate(undefined, { folder })).toEqual([FIRST]);
  const values = Float64Array.from([1, 2, 3]);
  const codes = new Uint8Array(3);
  const head = summarise({ firstDay: 10, unit: 'm3/s', values, flags: codes });
  const before = { stations: [{ code: 'A', made: false, fields: { name: ['A', 'Alder'], areaKm2: [null, 12] } }] };
  const connection = openConnection(place.path);
  const write = (sql: string, ...row: unknown[]) => connection.prepare(sql).run(row);
  write("INSERT INTO Region (id, slug, name, createdAt) VALUES (1, 'wethe', 'Wethe', ?)", timestamp());
  const file =
    'INSERT INTO Import (id, regionId, createdAt, kind, fileName, sha256, "before", heartbeat) VALUES (?, 1, ?, ?, ?, ?, ?, ?)';
  write(file, 1, timestamp(), 'flows', 'old.csv', 'aa', '{}', timestamp());
  write(file, 2, timestamp(), 'registry', 'stations.csv', 'bb', JSON.stringify(before), timestamp());
  write("INSERT INTO Station (id, regionId, code, name, areaKm2, createdBy) VALUES (1, 1, 'A', 'Alder', 12, 1)");
  write(
    `INSERT INTO Part (id, importId, stationId, firstDay, days, unit, codeList, "values", codes) VALUES (1, 1, 1, 10, 3, 'm3/s', ?, ?, ?)`,
    ...['[{"text":"","bits":0}]', blobOfValues(values), blobOf(codes)],
  );
  write(
    `INSERT INTO Record (id, stationId, partId, unit, firstDay, days, hash, valueCount, firstValueDay, lastValueDay)
     VALUES (1, 1, 1, 'm3/s', 10, 3, ?, 3, 10, 12)`,
    head.hash,
  );
  connection.close();
}

test('migrate() brings a database of the first version on with its data, and everything works on it', async () => {
  await oldDatabase();
  expect(await migrate()).toEqual(
    readMigrations()
      .map(({ name }) => name)
      .slice(1),
  );
  expect((await seenRecords(1)).A).toMatchObject({ firstDay: 10, values: [1, 2, 3] });
  expect(await getStation(1, 'A')).toMatchObject({
    name: 'Alder',
    changes: [],
    namedFlows: [],
    notes: '',
    derived: null,
  });
  expect(await listImports(1)).toMatchObject([
    { fileName: 'stations.csv', revisions: null },
    { fileName: 'old.csv', revisions: null },
  ]);

  await importFiles([[{ code: 'A', firstDay: 12, values: [33, 4] }]], { rule: 'take-new' });
  await addStation(1, {
    code: 'D',
    derived: { quantity: 'flow', terms: [{ code: 'A', factor: 2, lagDays: 0 }], note: '' },
  });
  await editStation(1, 'A', { notes: 'By the mill' });
  expect(await seenRecords(1)).toMatchObject({ A: { values: [1, 2, 33, 4] }, D: { values: [2, 4, 66, 8] } });
  await undoImport(2);
  expect(await getStation(1, 'A')).toMatchObject({ name: 'A', areaKm2: null, notes: 'By the mill' });
  await undoImport(1);
  expect(await seenRecords(1)).toMatchObject({ A: { firstDay: 12, values: [33, 4] }, D: { values: [66, 8] } });
  expect((await listStations(1)).map(({ code }) => code)).toEqual(['A', 'D']);
});

test('an undo of what the first version left goes all the way back', async () => {
  await oldDatabase();
  await migrate();
  await undoImport(1);
  // The registry came later and named the station, which is its own now.
  expect((await listStations(1)).map(({ code, name }) => [code, name])).toEqual([['A', 'Alder']]);
  await undoImport(2);
  expect(await listStations(1)).toEqual([]);
  const left = dump(place.path).filter((row) => !/^(sqlite_sequence|_prisma_migrations|Region) /.test(row));
  expect(left).toEqual([]);
});
