import { readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { NO_ROW } from '../../../lib/series/day-codes.ts';
import { applyStaging } from '../../../lib/store/apply-staging.ts';
import { listImports } from '../../../lib/store/imports.ts';
import { OverlapError } from '../../../lib/store/overlap-error.ts';
import { readParts } from '../../../lib/store/parts.ts';
import { stationRecords } from '../../../lib/store/records.ts';
import { getRegion, listRegions } from '../../../lib/store/regions.ts';
import { createStaging, stagingPath } from '../../../lib/store/staging.ts';
import { listStations, upsertRegistry } from '../../../lib/store/stations.ts';
import { dump, importFiles, partOf, seenRecords } from './helpers.ts';
import { temporaryDatabase } from './temporary-database.ts';

const place = temporaryDatabase();
const NaN_ = Number.NaN;

test('applyStaging() makes region, stations and records, and readSeries() gives the days back', async () => {
  const applied = await importFiles([
    [
      { code: '0042', firstDay: 10, values: [1.5, NaN_, 0], codes: ['e', 'Ice', ''] },
      { code: '7', values: [3] },
    ],
  ]);
  expect(applied).toMatchObject({ slug: 'wethe', regionMade: true, stationsMade: 2, records: 2 });
  const seen = await seenRecords(applied.regionId);
  expect(seen['0042']).toMatchObject({ firstDay: 10, values: [1.5, NaN_, 0], flags: [1, 4, 0] });
  expect(seen['7']).toMatchObject({ firstDay: 0, values: [3], flags: [0] });
  expect(await stationRecords(applied.regionId)).toMatchObject([
    { code: '0042', valueCount: 2, firstValueDay: 10, lastValueDay: 12, zeroCount: 1, hash: seen['0042'].hash },
    { code: '7', valueCount: 1, firstValueDay: 0, lastValueDay: 0, zeroCount: 0 },
  ]);
  expect(await listRegions()).toMatchObject([
    {
      slug: 'wethe',
      stations: 2,
      records: 2,
      firstYear: 1970,
      lastYear: 1970,
      lastImport: expect.stringMatching(/^\d{4}-\d\d-\d\d$/),
    },
  ]);
});

test('readSeries() turns what was written into m³/s, and readParts() gives it as written, code for code', async () => {
  const part = { code: 'A', firstDay: -3, values: [100, NaN_, 250], codes: ['P', null, 'A:e'], unit: 'L/s' as const };
  const { regionId } = await importFiles([[part]]);
  expect((await seenRecords(regionId)).A).toMatchObject({ firstDay: -3, values: [0.1, NaN_, 0.25], flags: [2, 0, 0] });
  const [{ id }] = await listStations(regionId);
  const [written] = [...readParts(id)];
  expect([written.unit, written.firstDay, [...written.values]]).toEqual(['L/s', -3, [100, NaN_, 250]]);
  const texts = [...written.codes].map((code) => (code === NO_ROW ? null : written.codeList[code].text));
  expect(texts).toEqual(['P', null, 'A:e']);
});

test('two files of one import make one record of a station that is new', async () => {
  const { regionId } = await importFiles([
    [{ code: 'A', values: [1, NaN_, 3] }],
    [{ code: 'A', firstDay: 1, values: [2, 3, 4, 5] }],
  ]);
  expect((await seenRecords(regionId)).A).toMatchObject({ firstDay: 0, values: [1, 2, 3, 4, 5] });
});

test('equal values of two imports merge, and the second fills what the first lacks', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, NaN_, 3] }]]);
  await importFiles([[{ code: 'A', firstDay: 1, values: [2, 3, 4, 5] }]]);
  expect((await seenRecords(regionId)).A).toMatchObject({ firstDay: 0, values: [1, 2, 3, 4, 5] });
});

test('importing the same file again leaves every record’s hash', async () => {
  const files = [[{ code: 'A', values: [1, 2, 3], codes: ['e', '', 'P'] }]];
  const { regionId } = await importFiles(files);
  const before = await seenRecords(regionId);
  await importFiles(files);
  expect(await seenRecords(regionId)).toEqual(before);
  expect(await listImports(regionId)).toHaveLength(2);
});

test('unlike values refuse the file with their count and the first three; the database stays as it was', async () => {
  await importFiles([[{ code: 'A', values: [1, 2, 3, 4, 5] }]]);
  const before = dump(place.path);
  const error = await importFiles([
    [
      { code: 'A', values: [1, 20, 30, 40, 50] },
      { code: 'B', values: [1] },
    ],
  ]).catch((thrown: unknown) => thrown);
  expect(error).toBeInstanceOf(OverlapError);
  const { revisions, first, problem, message } = error as OverlapError;
  expect(revisions).toMatchObject({ extended: 1, equal: 1, unlike: 4, revised: 0 });
  expect(first).toEqual([
    { code: 'A', date: '1970-01-02', standing: 2, other: 20, unit: 'm3/s' },
    { code: 'A', date: '1970-01-03', standing: 3, other: 30, unit: 'm3/s' },
    { code: 'A', date: '1970-01-04', standing: 4, other: 40, unit: 'm3/s' },
  ]);
  expect(problem).toMatchObject({ file: 'flows-1.csv', needs: 'revise' });
  expect(message).toContain('4 days hold other values already: station A on 1970-01-02 has 2 m3/s, the file 20;');
  expect(dump(place.path)).toEqual(before);
});

test('an import refused in a new region leaves an empty database as it was', async () => {
  const before = dump(place.path);
  await expect(importFiles([[{ code: 'A', values: [1] }], [{ code: 'A', values: [2] }]])).rejects.toThrow(
    'flows-2.csv',
  );
  expect(dump(place.path)).toEqual(before);
  expect(await getRegion('wethe')).toBeNull();
});

test('--revise takes the new values; a missing value takes nothing away', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2, 3], codes: ['', 'P', ''] }]]);
  await importFiles([[{ code: 'A', values: [1, 20, NaN_] }]], { revise: true });
  expect((await seenRecords(regionId)).A).toMatchObject({ values: [1, 20, 3], flags: [0, 0, 0] });
});

test('a record keeps the unit of its first part; values equal but for the unit’s rounding merge', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [100, 250.3], unit: 'L/s' }]]);
  await importFiles([[{ code: 'A', values: [0.1, 0.2503, 0.007] }]]);
  expect((await stationRecords(regionId))[0].unit).toBe('L/s');
  const { values } = (await seenRecords(regionId)).A;
  expect(values[1]).toBe(250.3 * 0.001);
  expect(values[2]).toBeCloseTo(0.007, 12);
});

test('depths over the drainage area follow the area that a registry corrects, and refuse to mix without one', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2], unit: 'mm/d' }]]);
  expect((await seenRecords(regionId)).A.values).toEqual([NaN_, NaN_]);
  const before = dump(place.path);
  await expect(importFiles([[{ code: 'A', firstDay: 2, values: [3] }]])).rejects.toMatchObject({
    problem: { needs: 'area', value: 'A' },
  });
  expect(dump(place.path)).toEqual(before);
  await upsertRegistry(regionId, [{ code: 'A', areaKm2: 86.4 }]);
  await importFiles([[{ code: 'A', firstDay: 2, values: [3] }]]);
  expect((await seenRecords(regionId)).A.values).toEqual([1, 2, 3]);
  const { hash } = (await seenRecords(regionId)).A;
  await upsertRegistry(regionId, [{ code: 'A', areaKm2: 172.8 }]);
  expect((await seenRecords(regionId)).A.values).toEqual([2, 4, 3]);
  expect((await seenRecords(regionId)).A.hash).not.toBe(hash);
});

test('flows of an unknown station make it without a registry, and are refused by name with one', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1] }]]);
  await importFiles([[{ code: 'B', values: [1] }]]);
  await upsertRegistry(regionId, [{ code: 'A', name: 'Alder Bridge' }]);
  const before = dump(place.path);
  await expect(importFiles([[{ code: 'C', values: [1] }]])).rejects.toThrow(/flows-1\.csv.*“C”/);
  expect(dump(place.path)).toEqual(before);
  await importFiles([[{ code: 'C', values: [1] }]], { unknownStations: 'make' });
  expect((await listStations(regionId)).map(({ code, name }) => [code, name])).toEqual([
    ['A', 'Alder Bridge'],
    ['B', 'B'],
    ['C', 'C'],
  ]);
});

test('a cancel while parsing leaves no file; a cancel while storing leaves the database as it was', async () => {
  const staging = createStaging('cancelled');
  staging.stagePart(staging.addFile({ kind: 'flows', fileName: 'a.csv' }), partOf({ code: 'A', values: [1] }));
  staging.discard();
  expect(readdirSync(place.folder).filter((name) => name.includes('staging'))).toEqual([]);

  // more than SQLite holds in memory: some of it is in the file already
  const large = createStaging('cancelled-late');
  const file = large.addFile({ kind: 'flows', fileName: 'a.csv' });
  for (let i = 0; i < 40; i++) {
    large.stagePart(file, partOf({ code: `S${i}`, values: new Array<number>(20_000).fill(i) }));
  }
  large.discard();
  expect(readdirSync(place.folder).filter((name) => name.includes('staging'))).toEqual([]);

  await importFiles([[{ code: 'A', values: [1] }]]);
  const before = dump(place.path);
  const abort = new AbortController();
  const many = Array.from({ length: 20 }, (_, i) => ({ code: `S${i}`, values: [1, 2, 3] }));
  const cancelled = importFiles([many], {
    sliceMs: 0,
    signal: abort.signal,
    onProgress: (share) => share > 0.3 && abort.abort(new Error('cancelled by the user')),
  });
  await expect(cancelled).rejects.toThrow('cancelled by the user');
  expect(dump(place.path)).toEqual(before);
  expect(readdirSync(place.folder).filter((name) => name.includes('staging'))).toEqual([]);
});

test('readers see nothing of an import until all of it is there', async () => {
  const { regionId } = await importFiles([[{ code: 'S0', values: [1, 2] }]]);
  const before = await seenRecords(regionId);
  const seen: number[] = [];
  const many = Array.from({ length: 10 }, (_, i) => ({ code: `S${i}`, values: [1, 2, 3] }));
  let looking = Promise.resolve();
  await importFiles([many], {
    sliceMs: 0,
    onProgress: (share) => {
      if (share < 1)
        looking = looking.then(async () => void seen.push(Object.keys(await seenRecords(regionId)).length));
      if (share === 0.5) looking = looking.then(async () => expect(await seenRecords(regionId)).toEqual(before));
    },
  });
  await looking;
  expect(seen.length).toBeGreaterThan(5);
  expect(seen.slice(0, 5)).toEqual([1, 1, 1, 1, 1]);
  expect(Object.keys(await seenRecords(regionId))).toHaveLength(10);
});

test('applyStaging() refuses a staging database that is not there, and a job id that is no plain word', async () => {
  await expect(applyStaging('nothing', { region: { name: 'Wethe' } })).rejects.toThrow();
  expect(() => stagingPath('../x')).toThrow('stagingPath: jobId');
  expect(await getRegion('wethe')).toBeNull();
});
