import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { basename } from 'node:path';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import type { GivenFile, ImportOutcome } from '../../../lib/jobs/import-types.ts';
import { cancelJob, followJob, viewJob } from '../../../lib/jobs/live-jobs.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { rejectedFolder, rejectedPath } from '../../../lib/jobs/rejected-rows.ts';
import { undo } from '../../../lib/jobs/undo.ts';
import { listLayers } from '../../../lib/store/layers.ts';
import { createRegion, getRegion, listRegions, type RegionRow } from '../../../lib/store/regions.ts';
import { listStations, stationRecords } from '../../../lib/store/stations.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { databaseContent } from './database-content.ts';
import { longRows, type SampleFiles, sampleFiles } from './sample-files.ts';

const place = temporaryDatabase();
afterAll(closePool);

let files: SampleFiles;
let region: RegionRow;
beforeEach(async () => {
  files = sampleFiles(`${place.folder}/given`);
  region = await createRegion({ name: 'Upper Wethe' });
});

const given = (...paths: string[]): GivenFile[] => paths.map((path) => ({ path, name: basename(path) }));

async function imported(paths: string[], choices = {}): Promise<ImportOutcome> {
  const { result } = await launchImport({ region: { id: region.id }, files: given(...paths), choices });
  return result;
}

/** The problems of an import that must fail. */
async function refused(paths: string[], choices = {}): Promise<ImportOutcome['problems']> {
  const error = await imported(paths, choices).then(
    () => expect.fail('the import must be refused'),
    (reason: { result?: ImportOutcome }) => reason,
  );
  return error.result?.problems ?? expect.fail(`refused without problems: ${String(error)}`);
}

test('an import takes a registry, a layer and flows in whatever order they are given', async () => {
  const outcome = await imported([files.flows, files.layer, files.registry]);
  expect(outcome.problems).toEqual([]);
  expect(outcome.taken.map(({ file, kind }) => [file, kind])).toEqual([
    ['stations.csv', 'registry'],
    ['rivers.geojson', 'layer'],
    ['flows.csv', 'flows'],
  ]);
  expect((await listStations(region.id)).map(({ code, areaKm2 }) => [code, areaKm2])).toEqual([
    ['A1', 120],
    ['B2', 340],
    ['C3', 80],
    ['D4', null],
  ]);
  expect((await listLayers(region.id)).map(({ kind }) => kind)).toHaveLength(1);
  expect((await stationRecords(region.id)).map(({ valueCount }) => valueCount)).toEqual([10958, 10958, 10958, 10958]);
  expect(outcome.taken[2].report).toMatchObject({ rows: 4 * 10958, accepted: 4 * 10958, rejectedTotal: 0 });
});

test('an import into a region that is not there makes it', async () => {
  const { id, result } = await launchImport({ region: { name: 'New Lauch' }, files: given(files.flows), choices: {} });
  const outcome = await result;
  const made = await getRegion('new-lauch');
  expect(made).toMatchObject({ name: 'New Lauch', id: outcome.regionId });
  expect(await viewJob(id)).toMatchObject({ state: 'done', error: null });
});

test('a job that is followed shows rising shares and ends with its outcome', async () => {
  const { id, result } = await launchImport({ region: { id: region.id }, files: given(files.flows), choices: {} });
  const states: string[] = [];
  const shares: number[] = [];
  for await (const view of followJob(id, new AbortController().signal)) {
    states.push(view.state);
    shares.push((view.progress as { share: number }).share);
  }
  await result;
  expect(states.at(-1)).toBe('done');
  expect(shares).toEqual([...shares].sort((a, b) => a - b));
  expect(shares.at(-1)).toBe(1);
  expect((await viewJob(id))!.result).toMatchObject({ taken: [{ file: 'flows.csv' }], problems: [] });
});

test('a job that is over and one that is unknown are followed to their end at once', async () => {
  const { id, result } = await launchImport({ region: { id: region.id }, files: given(files.layer), choices: {} });
  await result;
  const views = [];
  for await (const view of followJob(id, new AbortController().signal)) views.push(view.state);
  for await (const view of followJob('unknown', new AbortController().signal)) views.push(view.state);
  expect(views).toEqual(['done']);
});

test('one bad file refuses all, names every problem, and leaves the database as it was', async () => {
  const before = databaseContent(place.path);
  const bad = files.write('bad.csv', 'station,date,discharge_m3s\n');
  const unclear = files.write('unclear.csv', 'station,date,flow\nA1,2001-01-01,3\nA1,2001-01-02,4\n');
  const problems = await refused([files.registry, files.flows, bad, unclear]);
  expect(problems.map(({ file }) => file)).toEqual(['bad.csv', 'unclear.csv']);
  expect(problems[1].problem?.needs).toBe('unit');
  expect(problems[1].inspection?.preview.length).toBeGreaterThan(1);
  expect(databaseContent(place.path)).toBe(before);
  expect(readdirSync(place.folder).filter((name) => name.includes('staging'))).toEqual([]);
});

test('the answer to a problem lets the same file in', async () => {
  const unclear = files.write('unclear.csv', `station,date,flow\n${longRows(['A1']).join('\n')}\n`);
  const outcome = await imported([unclear], { files: { 'unclear.csv': { unit: 'L/s' } } });
  expect(outcome.taken[0].report).toMatchObject({ unit: 'L/s', accepted: 10958 });
});

test('flows of a station that is not in the registry are refused by name', async () => {
  await imported([files.registry]);
  const before = databaseContent(place.path);
  const unknown = files.write(
    'unknown.csv',
    `station,date,discharge_m3s\n${longRows(['Z9']).slice(0, 400).join('\n')}\n`,
  );
  const [{ message }] = await refused([unknown]);
  expect(message).toContain('unknown.csv');
  expect(message).toContain('Z9');
  expect(databaseContent(place.path)).toBe(before);
});

test('unlike values for days that stand are refused unless revised', async () => {
  await imported([files.flows]);
  const before = databaseContent(place.path);
  const other = files.write('other.csv', 'station,date,discharge_m3s\nA1,1980-01-01,99\nA1,1980-01-02,98\n');
  const [{ problem, revisions }] = await refused([other]);
  expect(problem?.needs).toBe('revise');
  expect(revisions).toMatchObject({ unlike: 2, revised: 0, stations: [{ code: 'A1', unlike: 2 }] });
  expect(databaseContent(place.path)).toBe(before);
  const kept = await imported([other], { rule: 'keep' });
  expect(kept.taken[0].revisions).toMatchObject({ unlike: 2, revised: 0 });
  expect((await imported([other], { revise: true })).taken[0].revisions).toMatchObject({ unlike: 2, revised: 2 });
});

test('a dry run tells what an import would take, and leaves no region, no rejected rows and no staging', async () => {
  const bad = files.write('bad.csv', 'station,date,discharge_m3s\nA1,2001-01-01,3\nA1,2001-02-31,4\n');
  const { result } = await launchImport({
    region: { name: 'Not yet' },
    files: given(files.registry, bad),
    choices: { dryRun: true },
  });
  const outcome = await result;
  expect(outcome).toMatchObject({ dryRun: true, regionId: null, problems: [] });
  expect(outcome.taken).toMatchObject([
    { importId: 0, file: 'stations.csv', summary: '4 stations, 4 of them new', revisions: null },
    { importId: 0, file: 'bad.csv', report: { rejectedTotal: 1, rejectedFile: null }, revisions: { extended: 1 } },
  ]);
  expect((await listRegions()).map(({ name }) => name)).toEqual(['Upper Wethe']);
  expect(await listStations(region.id)).toEqual([]);
  expect(readdirSync(place.folder).filter((name) => /staging|upload/.test(name))).toEqual([]);
  expect(existsSync(rejectedFolder()) ? readdirSync(rejectedFolder()) : []).toEqual([]);
});

test('a cancelled import leaves nothing behind', async () => {
  const before = databaseContent(place.path);
  const rows = longRows().map((row, i) => (i % 5 === 0 ? `${row}x` : row));
  const long = files.write('long.csv', `station,date,discharge_m3s\n${rows.join('\n')}\n`);
  const { id, result } = await launchImport({
    region: { id: region.id },
    files: given(...Array.from({ length: 20 }, () => long)),
    choices: {},
  });
  const ended = result.catch((error: Error) => error.name);
  for await (const { progress } of followJob(id, new AbortController().signal)) {
    if ((progress as { rows: number }).rows > 0) break;
  }
  expect(await cancelJob(id)).toBe(true);
  expect(await ended).toBe('CancelledError');
  expect(await viewJob(id)).toMatchObject({ state: 'cancelled' });
  expect(databaseContent(place.path)).toBe(before);
  expect(readdirSync(place.folder).filter((name) => name.includes('staging'))).toEqual([]);
  expect(existsSync(rejectedFolder()) ? readdirSync(rejectedFolder()) : []).toEqual([]);
});

test('an import that waits for its turn can be cancelled before it begins', async () => {
  const first = await launchImport({ region: { id: region.id }, files: given(files.flows), choices: {} });
  const second = await launchImport({ region: { id: region.id }, files: given(files.registry), choices: {} });
  const ended = second.result.catch((error: Error) => error.name);
  expect((await viewJob(second.id))!.state).toBe('waiting');
  await cancelJob(second.id);
  expect(await ended).toBe('CancelledError');
  expect((await first.result).taken).toHaveLength(1);
  expect((await listStations(region.id)).map(({ name }) => name)).not.toContain('Alder Mill');
});

test('every rejected row stands in a file beside the database, which goes with the undo', async () => {
  const rows = longRows(['A1']).map((row, i) => (i % 4 === 0 ? row.replace(/,[^,]*$/, ',"low, very"') : row));
  const bad = files.write('some-bad.csv', `station,date,discharge_m3s\n${rows.join('\n')}\n`);
  const { taken } = await imported([bad]);
  const report = taken[0].report!;
  expect(report.rejectedTotal).toBe(2740);
  expect(report.rejected).toHaveLength(1000);
  const lines = readFileSync(rejectedPath(report.rejectedFile!), 'utf8').split('\r\n');
  expect(lines[0]).toBe('row,text,reason');
  expect(lines).toHaveLength(2740 + 2);
  expect(lines[1]).toMatch(/^2,"?A1,1980-01-01/);
  await undo(region, taken[0].importId);
  expect(existsSync(rejectedPath(report.rejectedFile!))).toBe(false);
  expect(await stationRecords(region.id)).toEqual([]);
});

test('a failed import into a new region makes no region', async () => {
  const bad = files.write('bad.csv', '');
  const { result } = await launchImport({ region: { name: 'Nowhere' }, files: given(bad), choices: {} });
  await expect(result).rejects.toThrow('bad.csv');
  expect((await listRegions()).map(({ name }) => name)).toEqual(['Upper Wethe']);
});
