import { basename } from 'node:path';
import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { parseBasis } from '../../../lib/basis.ts';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { type CheckProgress, checkStations, checkUnchecked, launchCheck } from '../../../lib/jobs/checks.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import type { ImportOutcome } from '../../../lib/jobs/import-types.ts';
import { cancelJob, viewJob } from '../../../lib/jobs/live-jobs.ts';
import { minimaOf } from '../../../lib/jobs/minima.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { startPendingChecks } from '../../../lib/jobs/recover.ts';
import { latestDayOnEarth } from '../../../lib/jobs/today.ts';
import { undo } from '../../../lib/jobs/undo.ts';
import { replaceFindings, uncheckedRecords } from '../../../lib/store/checked-records.ts';
import { openConnection, rows } from '../../../lib/store/connection.ts';
import { listFindings } from '../../../lib/store/findings.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { inventedRecord } from '../../unit/checks/invented-record.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { type SampleFiles, sampleFiles } from './sample-files.ts';

const place = temporaryDatabase();
afterAll(closePool);
afterEach(forgetResults);

let files: SampleFiles;
let region: RegionRow;
beforeEach(async () => {
  files = sampleFiles(`${place.folder}/given`);
  region = await createRegion({ name: 'Upper Wethe' });
});

async function take(...paths: string[]): Promise<ImportOutcome> {
  const given = paths.map((path) => ({ path, name: basename(path) }));
  return (await launchImport({ region: { id: region.id }, files: given, choices: {} })).result;
}

/** Flows of two rivers; at C3 the low of 1995 is replaced by twelve equal days of next to nothing, and a day is below zero. */
function faulty(): string {
  const low = dayNumber(1995, 9, 20);
  const lines = ['C3', 'D4'].flatMap((code, seed) => {
    const { firstDay, values } = inventedRecord(seed + 20, { years: 30, firstYear: 1980, betweenYears: 0.1 });
    if (code === 'C3') {
      values.fill(0.001, low - firstDay, low - firstDay + 12);
      values[dayNumber(2001, 5, 5) - firstDay] = -0.2;
    }
    return Array.from(values, (flow, day) => `${code},${isoDate(firstDay + day)},${flow}`);
  });
  return files.write('faulty.csv', `station,date,discharge_m3s\n${lines.join('\n')}\n`);
}

test('an import is followed by the checks of what it touched, and tells what they found', async () => {
  const { findings } = await take(files.registry, faulty());
  expect(listFindings(region.id).filter(({ kind }) => kind !== 'flat')).toMatchObject([
    { code: 'C3', kind: 'jump', firstDay: dayNumber(1995, 9, 20), days: 12 },
    { code: 'C3', kind: 'negative', firstDay: dayNumber(2001, 5, 5), days: 1 },
  ]);
  expect(listFindings(region.id, { kind: 'flat' })).toMatchObject([
    { code: 'C3', firstDay: dayNumber(1995, 9, 20), lastDay: dayNumber(1995, 10, 1), detail: { value: 0.001 } },
  ]);
  expect(findings).toEqual({ stations: 1, findings: 3 });
  expect(uncheckedRecords(region.id)).toEqual([]);
});

test('a basis that leaves suspect days out no longer sees a false low, and sees it again once a person accepts it', async () => {
  await take(files.registry, faulty());
  const lowOf1995 = async (exclude: ('provisional' | 'suspect')[]) => {
    const { stations } = await minimaOf(region, parseBasis({ yearStart: 4, exclude, maxMissingDays: 30 }));
    const { minima } = stations.find(({ station }) => station.code === 'C3')!;
    return minima.minimum[minima.years.indexOf(1995)];
  };
  expect(await lowOf1995(['provisional'])).toBe(0.001);
  expect(await lowOf1995(['provisional', 'suspect'])).toBeGreaterThan(0.01);
  const before = await rankingOf(region, parseBasis({ exclude: ['suspect'] }));
  const { id: stationId } = (await listStations(region.id)).find(({ code }) => code === 'C3')!;
  const [firstDay, lastDay] = [dayNumber(1995, 9, 20), dayNumber(1995, 10, 1)];
  await addMark({ stationId, firstDay, lastDay, kind: 'accept', reason: 'the river did stand still' });
  expect(await lowOf1995(['provisional', 'suspect'])).toBe(0.001);
  expect((await rankingOf(region, parseBasis({ exclude: ['suspect'] }))).key).not.toBe(before.key);
});

test('launchCheck checks anew as a job, all stations or those named, and tells where it stands', async () => {
  await take(files.registry, faulty());
  const { id, result } = await launchCheck(region);
  expect(await result).toEqual({ stations: 2, withFindings: 1, findings: 3 });
  expect(await viewJob(id)).toMatchObject({
    kind: 'check',
    state: 'done',
    progress: { done: 4, stations: 4, share: 1 },
  });
  expect(await (await launchCheck(region, ['D4'])).result).toEqual({ stations: 1, withFindings: 0, findings: 0 });
  expect(listFindings(region.id)).toHaveLength(3);
});

test('a check that is cancelled before its turn checks nothing', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [-1] }]], { region: { id: region.id } });
  const first = await launchCheck({ id: regionId });
  const second = await launchCheck({ id: regionId });
  const ended = expect(second.result).rejects.toMatchObject({ name: 'CancelledError' });
  await cancelJob(second.id);
  await ended;
  expect(await viewJob(second.id)).toMatchObject({ state: 'cancelled' });
  expect(await first.result).toMatchObject({ findings: 1 });
});

test('checkStations stops at a cancel, and tells its progress by chunks', async () => {
  const many = Array.from({ length: 120 }, (_, i) => ({ code: `S${i}`, values: [1, -1, 2] }));
  const { regionId } = await importFiles([many], { region: { id: region.id } });
  const ids = uncheckedRecords(regionId);
  const stopped = new AbortController();
  stopped.abort();
  await expect(checkStations(ids, { signal: stopped.signal })).rejects.toMatchObject({ name: 'AbortError' });
  expect(uncheckedRecords(regionId)).toHaveLength(120);
  const told: CheckProgress[] = [];
  expect(await checkUnchecked(regionId, { onProgress: (one) => told.push(one) })).toMatchObject({ findings: 120 });
  expect(told.map(({ done }) => done)).toHaveLength(3);
  expect(told[2]).toEqual({ stage: 'checking', done: 120, stations: 120, share: 1 });
  expect(uncheckedRecords(regionId)).toEqual([]);
});

test('a starting server checks what was left unchecked, and nothing else', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, -1, 2] }]], { region: { id: region.id } });
  expect(listFindings(regionId)).toEqual([]);
  await startPendingChecks();
  const jobs = () => {
    const connection = openConnection(place.path);
    const found = rows(connection, "SELECT id FROM Job WHERE kind = 'check'").all([]) as [string][];
    connection.close();
    return found.flat();
  };
  const [job, ...more] = jobs();
  expect(more).toEqual([]);
  await expect.poll(async () => (await viewJob(job))?.state, { timeout: 20_000 }).toBe('done');
  expect(listFindings(regionId)).toMatchObject([{ kind: 'negative', firstDay: 1 }]);
  await startPendingChecks();
  expect(jobs()).toEqual([job]);
});

test('undoing an import checks the records it leaves', async () => {
  await take(files.registry, files.flows);
  const added = files.write('more.csv', 'station,date,discharge_m3s\nC3,2010-01-01,-1\n');
  const { taken, findings } = await take(added);
  expect(findings).toEqual({ stations: 1, findings: 1 });
  await undo(region, taken[0].importId);
  expect(uncheckedRecords(region.id)).toEqual([]);
  expect(listFindings(region.id, { kind: 'negative' })).toEqual([]);
});

test('replaceFindings of nothing is nothing', async () => {
  expect(await replaceFindings([])).toBe(0);
});

test('latestDayOnEarth is the day that has begun on Line Islands time, UTC+14', () => {
  expect(isoDate(latestDayOnEarth(Date.UTC(2026, 0, 1, 9, 59)))).toBe('2026-01-01');
  expect(isoDate(latestDayOnEarth(Date.UTC(2026, 0, 1, 10, 0)))).toBe('2026-01-02');
});
