import { execFile, spawn } from 'node:child_process';
import { existsSync, utimesSync } from 'node:fs';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { expect, test } from 'vitest';
import { StoreBusyError } from '../../../lib/store/busy.ts';
import { openConnection, rows, timestamp } from '../../../lib/store/connection.ts';
import { undoImport } from '../../../lib/store/imports.ts';
import { createJob, getJob } from '../../../lib/store/jobs.ts';
import { openStore } from '../../../lib/store/open.ts';
import { recoverStore } from '../../../lib/store/recover.ts';
import { deleteRegion } from '../../../lib/store/regions.ts';
import { createStaging, discardStaging, stagingPath } from '../../../lib/store/staging.ts';
import { addStation } from '../../../lib/store/station-edit.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { bundleScript } from './bundle.ts';
import { dump, importFiles, partOf, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const run = promisify(execFile);
const place = temporaryDatabase();
const old = new Date(Date.now() - 60_000);

/** A script that takes 400 stations into region "Wethe" in slices of one station each. */
const IMPORTER = `
  import { applyStaging } from '@/lib/store/apply-staging.ts';
  import { createStaging } from '@/lib/store/staging.ts';
  const [name, stations, firstDay] = process.argv.slice(2);
  const staging = createStaging(name);
  const file = staging.addFile({ kind: 'flows', fileName: name + '.csv' });
  for (let i = 0; i < Number(stations); i++) {
    staging.stagePart(file, { code: 'S' + i, unit: 'm3/s', firstDay: Number(firstDay), values: new Float64Array(50).fill(i),
      codes: new Uint8Array(50), codeList: [{ text: '', bits: 0 }] });
  }
  staging.seal();
  await applyStaging(name, { region: { name: 'Wethe' }, sliceMs: 0,
    onProgress: (share) => process.stdout.write(share + '\\n') });
  staging.discard();`;

function query(sql: string): unknown[] {
  const connection = openConnection(place.path);
  const found = rows(connection, sql).all([]);
  connection.close();
  return found;
}

function execute(sql: string): void {
  const connection = openConnection(place.path);
  connection.exec(sql);
  connection.close();
}

test('what a process leaves that is killed while it stores is never seen, and is gone after recoverStore()', async () => {
  const { regionId } = await importFiles([[{ code: 'S1', values: [1], firstDay: 200 }]]);
  const records = await seenRecords(regionId);
  const before = dump(place.path).filter((row) => !row.startsWith('sqlite_sequence'));
  const script = await bundleScript(IMPORTER, join(place.folder, 'importer.mjs'));
  const child = spawn(process.execPath, [script, 'killed', '400', '0'], { stdio: ['ignore', 'pipe', 'inherit'] });
  await new Promise<void>((resolve) => {
    child.stdout.on('data', (data) => {
      if (Number(String(data).split('\n')[0]) > 0.02) child.kill('SIGKILL');
    });
    child.on('exit', () => resolve());
  });
  expect(query("SELECT state FROM Import WHERE fileName = 'killed.csv'")).toEqual([['applying']]);
  expect((query('SELECT COUNT(*) FROM Part') as [number][])[0][0]).toBeGreaterThan(3);
  expect(await seenRecords(regionId)).toEqual(records);
  expect(await listStations(regionId)).toHaveLength(1);

  // Just now it might still live: it keeps others out, and stays.
  await recoverStore();
  expect(existsSync(stagingPath('killed'))).toBe(true);
  await expect(deleteRegion('wethe')).rejects.toBeInstanceOf(StoreBusyError);

  execute(`UPDATE Import SET heartbeat = '${timestamp(old)}' WHERE state = 'applying'`);
  utimesSync(stagingPath('killed'), old, old);
  const recovered = await recoverStore();
  expect(recovered.withdrawnImports).toHaveLength(1);
  expect(recovered.stagingFiles).toEqual(['hungerstone.db.staging-killed']);
  expect(dump(place.path).filter((row) => !row.startsWith('sqlite_sequence'))).toEqual(before);
}, 120_000);

/** The same of a file that also states facts and revises, over stations from which another is derived. */
const REVISER = `
  import { applyStaging } from '@/lib/store/apply-staging.ts';
  import { createStaging } from '@/lib/store/staging.ts';
  const staging = createStaging('reviser');
  const file = staging.addFile({ kind: 'flows', fileName: 'reviser.csv' });
  const codes = Array.from({ length: 60 }, (_, i) => 'S' + i);
  for (const code of codes) {
    staging.stagePart(file, { code, unit: 'm3/s', firstDay: 10, values: new Float64Array(30).fill(2),
      codes: new Uint8Array(30), codeList: [{ text: '', bits: 0 }] });
  }
  staging.stageFacts(file, codes.map((code) => ({ code, name: 'Gauge ' + code, areaKm2: 12 })));
  staging.seal();
  process.stdout.write('begun\\n');
  await applyStaging('reviser', { region: { name: 'Wethe' }, rule: 'take-new', sliceMs: 0 });
  process.stdout.write('done\\n');`;

test('a kill at any moment leaves records, facts and what is derived as before the import, or as after it', async () => {
  const codes = Array.from({ length: 60 }, (_, i) => `S${i}`);
  const { regionId } = await importFiles([codes.map((code) => ({ code, values: new Array<number>(20).fill(1) }))]);
  const terms = codes.map((code) => ({ code, factor: 1, lagDays: 0 }));
  await addStation(regionId, { code: 'Sum', derived: { quantity: 'flow', terms, note: '' } });
  const look = async () => ({ records: await seenRecords(regionId), stations: await listStations(regionId) });
  const before = await look();
  const script = await bundleScript(REVISER, join(place.folder, 'reviser.mjs'));
  const lasted = await reviseFor(script, null);
  const after = await look();
  expect(after.records.Sum.values).toEqual([...new Array(10).fill(60), ...new Array(30).fill(120)]);
  expect(after.stations[0]).toMatchObject({ code: 'S0', name: 'Gauge S0', areaKm2: 12 });
  const undoOne = async () => {
    const [[importId]] = query("SELECT MAX(id) FROM Import WHERE state = 'applied'") as [[number]];
    await undoImport(importId);
  };
  await undoOne();
  expect(await look()).toEqual(before);

  const ends = new Set<string>();
  for (const share of [0.1, 0.35, 0.6, 0.8, 0.9, 0.95, 0.98, 1]) {
    await reviseFor(script, share * lasted);
    execute(`UPDATE Import SET heartbeat = '${timestamp(old)}' WHERE state = 'applying'`);
    if (existsSync(stagingPath('reviser'))) utimesSync(stagingPath('reviser'), old, old);
    const seen = await look();
    const end = JSON.stringify(seen) === JSON.stringify(before) ? 'before' : 'after';
    expect(seen).toEqual({ before, after }[end]);
    ends.add(end);
    await recoverStore();
    expect(await look()).toEqual(seen);
    if (end === 'after') await undoOne();
    expect(
      query('SELECT COUNT(*) FROM Laid WHERE id NOT IN (SELECT laidId FROM Record WHERE laidId IS NOT NULL)'),
    ).toEqual([[0]]);
    expect(query('SELECT COUNT(*) FROM Part')).toEqual([[60]]);
  }
  expect(ends).toContain('before');
}, 120_000);

/** Runs the reviser and kills it so long after it began to store. @returns how long it stored, ms */
async function reviseFor(script: string, killAfterMs: number | null): Promise<number> {
  const child = spawn(process.execPath, [script], { stdio: ['ignore', 'pipe', 'inherit'] });
  let begun = 0;
  let done = 0;
  await new Promise<void>((resolve) => {
    child.stdout.on('data', (data) => {
      if (String(data).includes('begun')) {
        begun = performance.now();
        if (killAfterMs !== null) setTimeout(() => child.kill('SIGKILL'), killAfterMs);
      }
      if (String(data).includes('done')) done = performance.now();
    });
    child.on('exit', () => resolve());
  });
  return done - begun;
}

test('an undo that died leaves the import as it was, and it can be undone again', async () => {
  const { regionId, imports } = await importFiles([[{ code: 'A', values: [1] }]]);
  const records = await seenRecords(regionId);
  execute(`UPDATE Import SET state = 'undoing', heartbeat = '${timestamp(old)}'`);
  execute("INSERT INTO Laid (importId, \"values\", flags) SELECT id, x'00', x'00' FROM Import");
  await recoverStore();
  expect(query('SELECT state FROM Import')).toEqual([['applied']]);
  expect(query('SELECT COUNT(*) FROM Laid')).toEqual([[0]]);
  expect(await seenRecords(regionId)).toEqual(records);
  await undoImport(imports[0].id);
  expect(query('SELECT COUNT(*) FROM Part')).toEqual([[0]]);
});

test('recoverStore() fails dead jobs, and leaves staging that is being filled or is fresh', async () => {
  await createJob({ id: 'dead', kind: 'import' });
  await openStore().prisma.job.update({ where: { id: 'dead' }, data: { heartbeat: old } });
  const filling = createStaging('filling');
  filling.stagePart(filling.addFile({ kind: 'flows', fileName: 'a.csv' }), partOf({ code: 'A', values: [1] }));
  createStaging('fresh').seal();
  createStaging('stale').seal();
  for (const id of ['filling', 'stale']) utimesSync(stagingPath(id), old, old);
  expect(await recoverStore()).toEqual({
    failedJobs: ['dead'],
    withdrawnImports: [],
    stagingFiles: ['hungerstone.db.staging-stale'],
  });
  expect(await getJob('dead')).toMatchObject({ state: 'failed' });
  filling.discard();
  discardStaging('fresh');
});

test('two processes that import at once both succeed, one after the other', async () => {
  const script = await bundleScript(IMPORTER, join(place.folder, 'importer.mjs'));
  await Promise.all([
    run(process.execPath, [script, 'one', '20', '0']),
    run(process.execPath, [script, 'two', '25', '50']),
  ]);
  const [[regionId]] = query("SELECT id FROM Region WHERE slug = 'wethe'") as [[number]];
  const seen = await seenRecords(regionId);
  expect(Object.keys(seen)).toHaveLength(25);
  expect(seen.S19.values).toEqual(new Array(100).fill(19));
  expect(seen.S24.values).toEqual(new Array(50).fill(24));
  expect(query("SELECT COUNT(*) FROM Import WHERE state = 'applied'")).toEqual([[2]]);
}, 120_000);

test('two imports in one thread take turns', async () => {
  const [one, two] = await Promise.all([
    importFiles([[{ code: 'A', values: [1] }]]),
    importFiles([[{ code: 'A', firstDay: 1, values: [2] }]]),
  ]);
  expect(one.regionId).toBe(two.regionId);
  expect((await seenRecords(one.regionId)).A.values).toEqual([1, 2]);
});
