import { createHash } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { gzipSync } from 'node:zlib';
import { strToU8, zipSync } from 'fflate';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { waterml } from '../../../lib/export/waterml.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import type { ImportOutcome } from '../../../lib/jobs/import-types.ts';
import { CancelledError, cancelJob } from '../../../lib/jobs/live-jobs.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { listImports } from '../../../lib/store/imports.ts';
import { readParts } from '../../../lib/store/parts.ts';
import { createRegion, type RegionRow } from '../../../lib/store/regions.ts';
import { getStation, listStations, stationRecords } from '../../../lib/store/stations.ts';
import { collection, daily, point } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

const place = temporaryDatabase();
afterAll(closePool);

let region: RegionRow;
beforeEach(async () => {
  region = await createRegion({ name: 'Upper Wethe' });
  mkdirSync(join(place.folder, 'given'), { recursive: true });
});

function file(name: string, content: string | Uint8Array): string {
  const path = join(place.folder, 'given', name);
  writeFileSync(path, content);
  return path;
}

async function imported(paths: string[], choices = {}): Promise<ImportOutcome> {
  const files = paths.map((path) => ({ path, name: basename(path) }));
  const { result } = await launchImport({ region: { id: region.id }, files, choices });
  return result;
}
const refused = (paths: string[], choices = {}) =>
  imported(paths, choices).then(
    () => expect.fail('the import must be refused'),
    (reason: { result?: ImportOutcome }) => reason.result?.problems ?? expect.fail(String(reason)),
  );

/** What lies beside the database: nothing may be left of an import but the database itself. */
const besides = () => readdirSync(place.folder).filter((name) => /\.(?:upload|staging)-/.test(name));

const registry = 'code,name,latitude,longitude,area km2\nA1,Mill,53.1,-2.1,12\nB2,Weir,53.2,-2.2,34\n';
const flows = (code: string) =>
  `station,date,flow m3/s\n${['01', '02', '03'].map((day) => `${code},2001-01-${day},1.5`).join('\n')}\n`;
const cells = (rows: (string | number)[][]) => rows.map((row, at) => rowOf(at + 1, row)).join('');

test('one archive brings a registry, a document, a workbook and a gzipped table, each taken for what it is', async () => {
  const workbook = handMade({
    sheets: [
      { name: 'Notes', rows: cells([['Made by hand'], ['Ask us']]) },
      {
        name: 'B2',
        rows: cells([
          ['station', 'date', 'flow m3/s'],
          ['B2', '2001-02-01', 3],
          ['B2', '2001-02-02', 4],
          ['B2', '2001-02-03', 5],
        ]),
      },
    ],
  });
  const archive = zipSync({
    'flows/b.csv.gz': gzipSync(flows('B2')),
    'flows/a.xml': strToU8(collection({ station: 'A1', points: daily(['1', '2', '3']) })),
    'b.xlsx': workbook,
    'stations.csv': strToU8(registry),
    'README.txt': strToU8('Read me'),
  });
  const outcome = await imported([file('set.zip', archive)]);
  expect(outcome.taken.map(({ file: name, kind, report }) => [name, kind, report?.layout ?? null])).toEqual([
    ['stations.csv', 'registry', null],
    ['b.csv', 'flows', 'long'],
    ['a.xml', 'flows', 'waterml-2'],
    ['b.xlsx', 'flows', 'long'],
  ]);
  expect(outcome.notes).toEqual(['“README.txt” in set.zip was passed over: it explains others.']);
  expect((await stationRecords(region.id)).map(({ code, valueCount }) => [code, valueCount])).toEqual([
    ['A1', 3],
    ['B2', 6],
  ]);
  // The hash in the list of imports is that of the workbook, not of the text made from it.
  const sha256 = createHash('sha256').update(workbook).digest('hex');
  expect((await listImports(region.id)).map((one) => one.sha256)).toContain(sha256);
  expect(besides()).toEqual([]);
});

test('an archive that cannot be taken refuses the import, by its name, and leaves nothing behind', async () => {
  const climbing = Buffer.from(zipSync({ 'aa/flows.csv': strToU8(flows('A1')) })).toString('latin1');
  const bytes = Uint8Array.from(Buffer.from(climbing.replaceAll('aa/flows.csv', '../flows.csv'), 'latin1'));
  const problems = await refused([file('bad.zip', bytes), file('good.csv', flows('A1'))]);
  expect(problems.map(({ file: name, message }) => [name, message.includes('a file outside itself')])).toEqual([
    ['bad.zip', true],
  ]);
  expect(await listStations(region.id)).toEqual([]);
  expect(besides()).toEqual([]);
});

test('a workbook asks for its sheet, and is read by the answer', async () => {
  const rows = (code: string) =>
    cells([
      ['station', 'date', 'flow m3/s'],
      [code, '2001-02-01', 3],
      [code, '2001-02-02', 4],
    ]);
  const path = file(
    'two.xlsx',
    handMade({
      sheets: [
        { name: 'Old', rows: rows('A1') },
        { name: 'New', rows: rows('B2') },
      ],
    }),
  );
  const [problem] = await refused([path]);
  expect([problem.problem?.needs, problem.inspection?.sheets]).toEqual(['sheet', ['Old', 'New']]);
  await imported([path], { all: { mapping: { sheet: 'New' } } });
  expect((await listStations(region.id)).map(({ code }) => code)).toEqual(['B2']);
});

test('a workbook that lists stations is a registry', async () => {
  const rows = cells([
    ['code', 'name', 'latitude', 'longitude'],
    ['A1', 'Mill', 53.1, -2.1],
    ['B2', 'Weir', 53.2, -2.2],
  ]);
  const outcome = await imported([file('stations.xlsx', handMade({ sheets: [{ name: 'Sheet1', rows }] }))]);
  expect(outcome.taken.map(({ kind }) => kind)).toEqual(['registry']);
  expect((await listStations(region.id)).map(({ code, latitude }) => [code, latitude])).toEqual([
    ['A1', 53.1],
    ['B2', 53.2],
  ]);
});

test('facts of a document fill in what nobody has said, and never replace a registry’s', async () => {
  await imported([file('stations.csv', 'code,name,latitude,longitude\nA1,Mill,53.1,-2.1\n')]);
  const position = { srs: 'urn:ogc:def:crs:EPSG::4326', pos: '10 20' };
  await imported([
    file('a.xml', collection({ station: 'A1', name: 'Other', river: 'Ribble', position, points: daily(['1']) })),
  ]);
  expect(await getStation(region.id, 'A1')).toMatchObject({
    name: 'Mill',
    river: 'Ribble',
    latitude: 53.1,
    longitude: -2.1,
  });
});

test('a record written as WaterML and imported elsewhere is the same record', async () => {
  const points = [
    point('2001-01-01', '1.5', '<wml2:qualifier xlink:title="Estimated"/>'),
    point('2001-01-02', 'nil', '<wml2:nilReason xlink:title="Ice"/>'),
    point('2001-01-03', '0.1'),
  ];
  await imported(
    [
      file(
        'a.xml',
        collection(
          { station: 'A1', name: 'Mill', uom: 'code="[cft_i]/s"', points },
          { station: 'A1', property: 'Rainfall', uom: 'code="mm"', points: daily(['7', '8']) },
        ),
      ),
    ],
    { all: { mapping: { also: [{ quantity: 'rainfall', unit: 'mm', value: null }] } } },
  );
  const station = (await getStation(region.id, 'A1')) ?? expect.fail('no station');
  const before = [...readParts(station.id)];
  const text = [...waterml(station, { generated: new Date(0) })].join('');
  const other = await createRegion({ name: 'Lower Wethe' });
  const path = file('written.xml', text);
  const mapping = { also: [{ quantity: 'rainfall' as const, unit: 'mm' as const, value: null }] };
  const { result } = await launchImport({
    region: { id: other.id },
    files: [{ path, name: 'written.xml' }],
    choices: { all: { mapping } },
  });
  await result;
  const again = (await getStation(other.id, 'A1')) ?? expect.fail('no station');
  const days = (part: (typeof before)[number]) => ({
    ...{ quantity: part.quantity, unit: part.unit, firstDay: part.firstDay, values: [...part.values] },
    codes: [...part.codes].map((code) => part.codeList[code] ?? null),
  });
  expect([...readParts(again.id)].map(days)).toEqual(before.map(days));
  expect(before.map(({ quantity }) => quantity)).toEqual(['flow', 'rainfall']);
  expect(again.name).toBe('Mill');
  expect(readFileSync(path, 'utf8').startsWith('<?xml')).toBe(true);
});

test('an import that is cancelled while it unpacks leaves nothing behind', async () => {
  const path = file(
    'long.csv.gz',
    gzipSync(`station,date,flow m3/s\n${'A1,2001-01-01,1.5\n'.repeat(3_000_000)}`, { level: 1 }),
  );
  const { id, result } = await launchImport({
    region: { id: region.id },
    files: [{ path, name: 'long.csv.gz' }],
    choices: {},
  });
  const outcome = expect(result).rejects.toBeInstanceOf(CancelledError);
  while (!besides().some((name) => name.includes('-unpacked'))) await sleep(2);
  await cancelJob(id);
  await outcome;
  expect(besides()).toEqual([]);
  expect(await listStations(region.id)).toEqual([]);
});
