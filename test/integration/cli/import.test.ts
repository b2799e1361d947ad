import { readFileSync } from 'node:fs';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { closePool } from '../../../lib/jobs/pool.ts';
import { listImports } from '../../../lib/store/imports.ts';
import { readSeries } from '../../../lib/store/records.ts';
import { getRegion, listRegions } from '../../../lib/store/regions.ts';
import { listStations, stationRecords } from '../../../lib/store/stations.ts';
import { FIXED_WIDTH } from '../../fixed-width.ts';
import { databaseContent } from '../jobs/database-content.ts';
import { longRows, type SampleFiles, sampleFiles } from '../jobs/sample-files.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { runCommand } from './run-command.ts';

const place = temporaryDatabase();
afterAll(closePool);
let files: SampleFiles;
beforeEach(() => {
  files = sampleFiles(`${place.folder}/given`);
});

const REGION = ['--region', 'Upper Wethe'];

test('import makes the region, takes registry, layer and flows, and prints the report', async () => {
  const { registry, layer, flows } = files;
  const { code, stdout } = await runCommand('import', ...REGION, '--stations', registry, '--layer', layer, flows);
  expect(code).toBe(0);
  expect(stdout).toContain('stations.csv: registry, 4 stations');
  expect(stdout).toContain('A1: 10958 values, 1980-01-01 to 2009-12-31, 0 missing');
  expect(stdout).toMatch(/The checks found \d+ things to look at, at [1-4] stations; the Records page shows them/);
  const region = (await getRegion('upper-wethe'))!;
  expect(await listStations(region.id)).toHaveLength(4);
});

test('import of the same registry again changes nothing, and of the same flows merges', async () => {
  await runCommand('import', ...REGION, '--stations', files.registry, files.flows);
  const region = (await getRegion('upper-wethe'))!;
  const before = await stationRecords(region.id);
  expect((await runCommand('import', ...REGION, '--stations', files.registry, files.flows)).code).toBe(0);
  expect((await stationRecords(region.id)).map(({ hash }) => hash)).toEqual(before.map(({ hash }) => hash));
});

test('import with rejected rows ends with exit code 3 and writes all of them', async () => {
  const bad = files.write('bad.csv', 'station,date,discharge_m3s\nA1,2001-01-01,3\nA1,2001-02-31,4\n');
  const { code, stdout } = await runCommand('import', ...REGION, '--json', bad);
  expect(code).toBe(3);
  const [file] = JSON.parse(stdout).files;
  expect(file).toMatchObject({ file: 'bad.csv', rows: 2, accepted: 1, rejectedTotal: 1, rejected: [{ row: 3 }] });
  expect(file.stations).toEqual([
    { code: 'A1', values: 1, missing: 0, first: '2001-01-01', last: '2001-01-01', zeros: 0, min: 3, max: 3 },
  ]);
  expect(readFileSync(file.rejectedFile, 'utf8')).toMatch(/^row,text,reason\r\n3,"A1,2001-02-31,4",/);
});

test('import --mapping, --unit and --station read a file that names neither', async () => {
  const rows = longRows(['A1'])
    .slice(0, 400)
    .map((row) => {
      const [, date, flow] = row.split(',');
      return `${date.replaceAll('-', '')} ${flow.padStart(10)}`;
    });
  const fixed = files.write('fixed.dly', `${rows.join('\n')}\n`);
  const mapping = files.write(
    'mapping.json',
    JSON.stringify({ ...FIXED_WIDTH, value: { slice: [9, 19] }, unit: 'L/s', missing: ['-99'] }),
  );
  const { code, stdout, stderr } = await runCommand('import', ...REGION, '--mapping', mapping, '--json', fixed);
  expect([code, stderr.includes('Nothing was changed')]).toEqual([0, false]);
  expect(JSON.parse(stdout).files[0]).toMatchObject({
    layout: 'fixed-width',
    unit: 'L/s',
    stations: [{ code: 'fixed', values: 400 }],
  });
});

test('a bad file fails with exit code 1, names file and remedy, and changes nothing', async () => {
  await runCommand('import', ...REGION, files.flows);
  const before = databaseContent(place.path);
  const empty = files.write('empty.csv', '');
  const { code, stdout, stderr } = await runCommand('import', ...REGION, '--layer', files.layer, empty);
  expect([code, stdout]).toEqual([1, '']);
  expect(stderr).toContain('empty.csv');
  expect(stderr).toContain('Nothing was changed.');
  expect(databaseContent(place.path)).toBe(before);
});

test('a failed first import leaves no region behind', async () => {
  const empty = files.write('empty.csv', '');
  expect((await runCommand('import', '--region', 'Nowhere', empty)).code).toBe(1);
  expect(await listRegions()).toEqual([]);
});

test('unlike values are refused without a rule; --dry-run tells what a rule would do, and the rule does it', async () => {
  await runCommand('import', ...REGION, files.flows);
  const region = (await getRegion('upper-wethe'))!;
  const other = files.write('other.csv', 'station,date,discharge_m3s\nA1,1980-01-01,99\nA1,2010-01-01,2\n');
  const refused = await runCommand('import', ...REGION, other);
  expect(refused.code).toBe(1);
  expect(refused.stderr).toContain('--rule keep');
  expect(refused.stderr).toMatch(/A1: 1 unlike, most on 1980-01-01: [\d.]+ m3\/s, in the file 99/);

  const before = databaseContent(place.path);
  const tried = await runCommand('import', ...REGION, '--rule', 'take-new', '--dry-run', '--json', other);
  expect(tried.code).toBe(0);
  const counts = { extended: 1, filled: 0, equal: 0, unlike: 1, unlikeProvisional: 0, revised: 1 };
  expect(JSON.parse(tried.stdout)).toMatchObject({ dryRun: true, files: [{ revisions: counts }] });
  expect(databaseContent(place.path)).toBe(before);

  expect((await runCommand('import', ...REGION, '--rule', 'keep', other)).code).toBe(0);
  const [{ id }] = await listStations(region.id);
  const firstDay = () => {
    let value = Number.NaN;
    readSeries([id], (_id, { values }) => (value = values[0]));
    return value;
  };
  expect(firstDay()).not.toBe(99);
  const revised = await runCommand('import', ...REGION, '--revise', '--by', 'A. Hydrologist', other);
  expect(revised.stdout).toContain('1 unlike (1 take the new value)');
  expect(firstDay()).toBe(99);
  expect(await listImports(region.id)).toMatchObject([
    { by: 'A. Hydrologist', rule: 'take-new', revisions: { ...counts, extended: 0, equal: 1 } },
    { by: 'import command', rule: 'keep', revisions: { ...counts, revised: 0 } },
    { by: 'import command', revisions: { unlike: 0 } },
  ]);
});

test('--match-codes and --daily-mean take what is refused without them', async () => {
  const registry = files.write('codes.csv', 'code,name\n0042,Alder\nB2,Beck\n');
  const rows = ['00:00', '06:00', '12:00', '18:00'].flatMap((time, i) =>
    ['01', '02', '03'].map((day) => `42,2001-01-${day} ${time},${i}`),
  );
  const flows = files.write('hours.csv', `station,datetime,discharge_m3s\n${rows.sort().join('\n')}\n`);
  const argv = [...REGION, '--stations', registry, flows];
  expect((await runCommand('import', ...argv, '--daily-mean', '0.9')).stderr).toContain('--match-codes');
  expect((await runCommand('import', ...argv, '--match-codes')).stderr).toContain('several values a day');
  const taken = await runCommand('import', ...argv, '--match-codes', '--daily-mean', '0.9', '--json');
  expect(taken.code).toBe(0);
  // the mean of 0, 1, 2 and 3
  expect(JSON.parse(taken.stdout).files[0].stations).toMatchObject([{ code: '0042', values: 3, min: 1.5, max: 1.5 }]);
});

test('--correct puts swapped coordinates right, which are refused without it', async () => {
  const rows = ['A,Alder,8.5,97.2', 'B,Beck,8.6,97.3'];
  const swapped = files.write('swapped.csv', `code,name,latitude,longitude\n${rows.join('\n')}\n`);
  const turned = files.write('turned.csv', 'code,name,latitude,longitude\nA,Alder,97.2,8.5\nB,Beck,97.3,8.6\n');
  expect((await runCommand('import', ...REGION, '--stations', turned)).stderr).toContain('--correct swap-coordinates');
  const { code } = await runCommand('import', ...REGION, '--stations', turned, '--correct', 'swap-coordinates');
  expect(code).toBe(0);
  const { id } = (await getRegion('upper-wethe'))!;
  const places = async () => (await listStations(id)).map(({ latitude, longitude }) => [latitude, longitude]);
  const right = await places();
  await runCommand('import', ...REGION, '--stations', swapped);
  expect(await places()).toEqual(right);
});

test('--choices says for single files how they are read', async () => {
  const rows = longRows(['A1'])
    .slice(0, 400)
    .map((row) => row.split(',').slice(1).join(','));
  const [one, two] = ['one.csv', 'two.csv'].map((name) => files.write(name, `date,flow\n${rows.join('\n')}\n`));
  const choices = files.write(
    'choices.json',
    JSON.stringify({ 'one.csv': { unit: 'L/s', station: 'X' }, 'two.csv': { mapping: { unit: 'ft3/s' } } }),
  );
  const { code, stdout, stderr } = await runCommand('import', ...REGION, '--choices', choices, '--json', one, two);
  expect([code, stderr.includes('Nothing was changed')]).toEqual([0, false]);
  expect(JSON.parse(stdout).files).toMatchObject([
    { file: 'one.csv', unit: 'L/s', stations: [{ code: 'X' }] },
    { file: 'two.csv', unit: 'ft3/s', stations: [{ code: 'two' }] },
  ]);
});

test.each([
  ['no region', ['flows.csv'], 'region'],
  ['no file', ['--region', 'A'], 'FLOWFILE'],
  ['an unknown unit', ['--region', 'A', '--unit', 'gallons', 'flows.csv'], 'gallons'],
  ['an unknown rule', ['--region', 'A', '--rule', 'newest', 'flows.csv'], 'take-where-provisional'],
  ['two rules', ['--region', 'A', '--rule', 'keep', '--revise', 'flows.csv'], '--revise'],
  ['a share above 1', ['--region', 'A', '--daily-mean', '80', 'flows.csv'], 'from 0 to 1'],
  ['an unknown correction', ['--region', 'A', '--correct', 'swap', 'flows.csv'], 'swap-coordinates'],
  ['an unknown option', ['--region', 'A', '--overwrite', 'flows.csv'], '--overwrite'],
])('import with %s ends with exit code 2', async (_what, argv, said) => {
  const given = argv.map((word) => (word === 'flows.csv' ? files.flows : word));
  const { code, stderr } = await runCommand('import', ...given);
  expect(code).toBe(2);
  expect(stderr).toContain(said);
  expect(await listRegions()).toEqual([]);
});

test('a mapping with an unknown key is refused by name with exit code 2', async () => {
  const mapping = files.write('mapping.json', JSON.stringify({ layoot: 'long' }));
  const { code, stderr } = await runCommand('import', ...REGION, '--mapping', mapping, files.flows);
  expect(code).toBe(2);
  expect(stderr).toContain('layoot');
});

test('a file that is not there is named, and nothing is changed', async () => {
  const { code, stderr } = await runCommand('import', ...REGION, '/nowhere/flows.csv');
  expect(code).toBe(1);
  expect(stderr).toContain('/nowhere/flows.csv');
  expect(await listRegions()).toEqual([]);
});
