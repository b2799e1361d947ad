import { readdirSync } from 'node:fs';
import { strToU8, zipSync } from 'fflate';
import { expect, test } from 'vitest';
import { GET as job } from '../../../app/api/jobs/[job]/route.ts';
import { POST as postImport } from '../../../app/api/regions/[region]/imports/route.ts';
import { POST as open } from '../../../app/api/regions/[region]/uploads/route.ts';
import { POST as start } from '../../../app/api/uploads/[upload]/import/route.ts';
import { PATCH as change, GET as view } from '../../../app/api/uploads/[upload]/route.ts';
import type { FileChoices, ImportOutcome } from '../../../lib/jobs/import-types.ts';
import type { UploadedFile, UploadView } from '../../../lib/jobs/upload-types.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { databaseContent } from '../jobs/database-content.ts';
import { type Content, registeredRegion, storedDays } from '../jobs/registered-region.ts';
import { call } from './call.ts';

/** Bad and open files as the screen brings them: looked at, answered, imported. */
const place = registeredRegion();
const params = { region: 'upper-wethe' };

const HEADER = 'station,date,discharge_m3s\n';
const GOOD = collection({ station: 'A1', points: daily(['1', '2']) });
const declared = (doctype: string) => GOOD.replace('?>\n', `?>\n${doctype}\n`).replace('>1<', '>&x;<');
const BOMB = declared('<!DOCTYPE c [<!ENTITY l "1111111111"><!ENTITY x "&l;&l;&l;&l;">]>');
const climbing = Uint8Array.from(
  Buffer.from(
    Buffer.from(zipSync({ aaaaaaaaaaa: strToU8(HEADER) }))
      .toString('latin1')
      .replaceAll('aaaaaaaaaaa', '../file.csv'),
    'latin1',
  ),
);
const sheet = (name: string, day: string) => ({
  name,
  rows:
    rowOf(1, ['station', 'date', 'flow m3/s']) + rowOf(2, ['A1', day, 1]) + rowOf(3, ['A1', `${day.slice(0, -1)}9`, 2]),
});
const HOURS = Array.from({ length: 24 }, (_, hour) => `A1,2003-05-01 ${String(hour).padStart(2, '0')}:00,${hour}\n`);
const MONTHS = ['01', '02', '03', '04', '05', '06'].map((month) => `A1,2010-${month}-15,2\n`);

/** What no answer would make readable, and words of what is said of it. */
const REFUSED: Record<string, [Content, string]> = {
  'bomb.xml': [BOMB, 'declares entities of its own'],
  'entity.xml': [declared('<!DOCTYPE c [<!ENTITY x SYSTEM "file:///etc/hostname">]>'), 'never expanded'],
  'bomb.zip': [zipSync({ 'a.csv': new Uint8Array(101e6) }), 'unpacks to more than 1000 times its size'],
  'climbing.zip': [climbing, 'names a file outside itself'],
  'cut.xlsx': [handMade({ sheets: [sheet('Flows', '2001-01-01')] }).slice(0, -40), 'cannot be read'],
  'month.csv': [HEADER + MONTHS.join(''), 'one value a month'],
  'empty.csv': ['', 'empty'],
  'twice.csv': [`${HEADER}A1,2001-01-01,1\nA1,2001-01-01,2\n`, 'two unlike values'],
};

/** What is asked, the answer, and the days that come in. */
const ASKED: Record<string, [Content, needs: string, FileChoices, Record<string, number>]> = {
  'codes.csv': [
    `${HEADER}a1,2003-01-01,1\na1,2003-01-02,2\n`,
    'codes',
    { matchCodes: true },
    { '2003-01-01': 1, '2003-01-02': 2 },
  ],
  'order.csv': [
    `${HEADER}A1,01/02/2003,1\nA1,02/02/2003,2\n`,
    'date-order',
    { mapping: { date: { columns: [1], order: 'dmy' } } },
    { '2003-02-01': 1, '2003-02-02': 2 },
  ],
  'century.csv': [
    `${HEADER}A1,01-Feb-29,1\nA1,13-Feb-29,2\n`,
    'century',
    { mapping: { firstYear: 1920 } },
    { '1929-02-01': 1, '1929-02-13': 2 },
  ],
  'thousands.csv': [
    'station;date;discharge_m3s\nA1;2003-04-01;1,234\nA1;2003-04-02;2,345\n',
    'thousands',
    { mapping: { thousands: ',' } },
    { '2003-04-01': 1234, '2003-04-02': 2345 },
  ],
  'hours.csv': [
    `station,time,discharge_m3s\n${HOURS.join('')}`,
    'daily-mean',
    { mapping: { dailyMean: 0.8 } },
    { '2003-05-01': 11.5 },
  ],
  'units.csv': [
    'station,date,flow,unit\nA1,2003-06-01,1,m3/s\nA1,2003-06-02,35,ft3/s\n',
    'mapping',
    { mapping: { where: { column: 'unit', equals: 'm3/s' } } },
    { '2003-06-01': 1 },
  ],
  'bare.csv': [
    'station,date,flow\nA1,2003-07-01,1\nA1,2003-07-02,2\n',
    'unit',
    { unit: 'L/s' },
    { '2003-07-01': 1, '2003-07-02': 2 },
  ],
  'Gauge.csv': [
    'date,discharge_m3s\n2003-08-01,1\n2003-08-02,2\n',
    'station',
    { station: 'A1' },
    { '2003-08-01': 1, '2003-08-02': 2 },
  ],
  'sheets.xlsx': [
    handMade({ sheets: [sheet('Old', '2003-09-01'), sheet('New', '2003-10-01')] }),
    'sheet',
    { mapping: { sheet: 'New' } },
    { '2003-10-01': 1, '2003-10-09': 2 },
  ],
  'series.xml': [
    collection(
      { station: 'A1', property: 'Stage', uom: 'code="m"', points: daily(['1.5']) },
      { station: 'A1', property: 'Rainfall', uom: 'code="mm"', points: daily(['7', '8']) },
    ),
    'quantity',
    { mapping: { quantity: 'rainfall' } },
    { '2001-01-01': 7, '2001-01-02': 8 },
  ],
};

/** Station lists; a station that comes in is known to the flows beside it. */
const LISTS: Record<string, [string, needs: string, FileChoices, code: string, facts: object]> = {
  'swapped.csv': [
    'station_id,latitude,longitude\nS1,-107.5,50.4\nS2,-107.6,50.5\n',
    'correction',
    { corrections: ['swap-coordinates'] },
    'S1',
    { latitude: 50.4, longitude: -107.5 },
  ],
  'east.csv': [
    'station_id,latitude,longitude\nE1,50.4,252.75\n',
    'correction',
    { corrections: ['longitude-360'] },
    'E1',
    { latitude: 50.4, longitude: -107.25 },
  ],
  // 1 ha = 0.01 km².
  'areas.csv': ['station_id,drainage_area\nH1,100\n', 'area', { areaUnit: 'ha' }, 'H1', { areaKm2: 1 }],
};

function form(files: Record<string, Content>): FormData {
  const data = new FormData();
  for (const [name, content] of Object.entries(files))
    data.append('files', new Blob([content as Uint8Array<ArrayBuffer>]), name);
  return data;
}
const contents = (table: Record<string, readonly [Content, ...unknown[]]>) =>
  Object.fromEntries(Object.entries(table).map(([name, [content]]) => [name, content]));
const uploadOf = async (files: Record<string, Content>): Promise<UploadView> =>
  (await call(open, '/api/regions/upper-wethe/uploads', params, { method: 'POST', body: form(files) })).json();
const byName = (files: readonly UploadedFile[]) => new Map(files.map((one) => [one.file, one]));
const body = (value: unknown, method = 'POST') => ({ method, body: JSON.stringify(value) });

async function overOf(id: string): Promise<{ state: string; result: ImportOutcome }> {
  for (;;) {
    const state = await (await call(job, `/api/jobs/${id}`, { job: id })).json();
    if (state.state !== 'waiting' && state.state !== 'running') return state;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}
const importedBy = async (upload: string, order: object) =>
  overOf((await (await call(start, `/api/uploads/${upload}/import`, { upload }, body(order))).json()).id);

test('files that cannot be read say why when they are looked at, and refuse an import each by its name', async () => {
  const before = databaseContent(databasePath());
  const { id, files } = await uploadOf(contents(REFUSED));
  const seen = byName(files);
  for (const [name, [, words]] of Object.entries(REFUSED)) {
    const { state, problem, needs } = seen.get(name) ?? expect.fail(`${name} is not among the files`);
    expect([name, needs]).toEqual([name, []]);
    // What lies far down in a file comes out when all of it is read.
    if (name === 'twice.csv') continue;
    expect([name, state]).toEqual([name, 'unreadable']);
    expect(problem).toContain(words);
  }
  for (const name of Object.keys(REFUSED)) {
    const leaveOut = Object.keys(REFUSED).filter((other) => other !== name);
    const { state, result } = await importedBy(id, { leaveOut });
    expect([name, state, result.taken, result.problems.map(({ file }) => file)]).toEqual([name, 'failed', [], [name]]);
    expect(result.problems[0].message).toMatch(new RegExp(`^${name}.*${REFUSED[name][1]}`));
    expect(result.problems[0].problem?.remedy).toBeTruthy();
  }
  expect(databaseContent(databasePath()) === before).toBe(true);
}, 60_000);

test('what is asked of each file is answered, and all of them are taken by one import', async () => {
  const before = databaseContent(databasePath());
  const { id, files } = await uploadOf({ ...contents(ASKED), ...contents(LISTS) });
  const asked = [...Object.entries(ASKED), ...Object.entries(LISTS)];
  const seen = byName(files);
  expect(asked.map(([name]) => [name, seen.get(name)?.state, seen.get(name)?.needs])).toEqual(
    asked.map(([name, [, needs]]) => [name, 'asks', [needs]]),
  );
  const refused = await importedBy(id, {});
  expect(refused.state).toBe('failed');
  expect(refused.result.problems.map(({ file }) => file).sort()).toEqual(asked.map(([name]) => name).sort());
  expect(databaseContent(databasePath()) === before).toBe(true);

  const answers = Object.fromEntries(asked.map(([name, [, , answer]]) => [name, answer]));
  const answered: UploadedFile[] = await (
    await call(change, `/api/uploads/${id}`, { upload: id }, body({ files: answers }, 'PATCH'))
  ).json();
  expect(answered.map(({ file, problem }) => [file, problem])).toEqual(asked.map(([name]) => [name, null]));
  const { state, result } = await importedBy(id, {});
  expect([state, result.problems]).toEqual(['done', []]);
  expect(await storedDays(place, 'A1')).toEqual(Object.assign({}, ...Object.values(ASKED).map(([, , , days]) => days)));
  for (const [, , , code, facts] of Object.values(LISTS))
    expect(await getStation(place.region.id, code)).toMatchObject(facts);
});

test('a bad file in an archive is told by its own name, and the good ones beside it can be imported', async () => {
  const archive = zipSync({
    'bomb.xml': strToU8(BOMB),
    'good.csv': strToU8(`${HEADER}0102,2001-01-01,1\n0102,2001-01-02,2\n`),
    LICENSE: strToU8('Free'),
  });
  const { id, files, notes } = await uploadOf({ 'set.zip': archive });
  expect(files.map(({ file, state }) => [file, state])).toEqual([
    ['bomb.xml', 'unreadable'],
    ['good.csv', 'ready'],
  ]);
  expect(notes).toEqual(['“LICENSE” in set.zip was passed over: it explains others.']);
  const kept: UploadView = await (await call(view, `/api/uploads/${id}`, { upload: id })).json();
  expect(kept.notes).toEqual(notes);
  expect((await importedBy(id, { leaveOut: ['bomb.xml'] })).state).toBe('done');
  expect(await storedDays(place, '0102')).toEqual({ '2001-01-01': 1, '2001-01-02': 2 });
});

test.each(['constructor', '__proto__', 'toString'])('a file that is called %s is a file like others', async (name) => {
  const body = new FormData();
  body.append('files', new Blob([`${HEADER}AB7,2001-01-01,1\nAB7,2001-01-02,2\n`]), name);
  const sent = await call(open, '/api/regions/upper-wethe/uploads', params, { method: 'POST', body });
  const { id, files }: UploadView = await sent.json();
  expect(files.map(({ file, state }) => [file, state])).toEqual([[name, 'ready']]);
  const { state, result } = await importedBy(id, {});
  expect([state, result.taken.map(({ file }) => file)]).toEqual(['done', [name]]);
});

test('POST imports refuses an archive that climbs out, and leaves neither rows nor files', async () => {
  const before = databaseContent(databasePath());
  const request = { method: 'POST', body: form({ 'climbing.zip': climbing }) };
  const { id } = await (await call(postImport, '/api/regions/upper-wethe/imports', params, request)).json();
  const { state, result } = await overOf(id);
  expect([state, result.problems.map(({ file }) => file)]).toEqual(['failed', ['climbing.zip']]);
  expect(databaseContent(databasePath()) === before).toBe(true);
  await expect
    .poll(() => readdirSync(place.folder).filter((name) => name.includes('-unpacked') || name.includes('staging')))
    .toEqual([]);
});
