import { readdirSync } from 'node:fs';
import { strToU8, zipSync } from 'fflate';
import { expect, test } from 'vitest';
import { GET as job } from '../../../app/api/jobs/[job]/route.ts';
import { POST as postImport } from '../../../app/api/regions/[region]/imports/route.ts';
import { POST as open } from '../../../app/api/regions/[region]/uploads/route.ts';
import { POST as start } from '../../../app/api/uploads/[upload]/import/route.ts';
import { PATCH as change, GET as view } from '../../../app/api/uploads/[upload]/route.ts';
import type { ImportOutcome } from '../../../lib/jobs/import-types.ts';
import type { UploadedFile, UploadView } from '../../../lib/jobs/upload-types.ts';
import { databasePath } from '../../../lib/store/database-url.ts';
import { getStation } from '../../../lib/store/stations.ts';
import { collection, daily } from '../../unit/intake/documents/waterml-2-text.ts';
import { handMade, rowOf } from '../../unit/intake/workbook/workbook-parts.ts';
import { databaseContent } from '../jobs/database-content.ts';
import { OPEN_FILES, OPEN_LISTS } from '../jobs/open-files.ts';
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
  const open = [...OPEN_FILES, ...OPEN_LISTS];
  const { id, files } = await uploadOf(Object.fromEntries(open.map(({ file, content }) => [file, content])));
  const seen = byName(files);
  expect(open.map(({ file }) => [file, seen.get(file)?.state, seen.get(file)?.needs])).toEqual(
    open.map(({ file, asks }) => [file, 'asks', [asks[0]]]),
  );
  const refused = await importedBy(id, {});
  expect(refused.state).toBe('failed');
  expect(refused.result.problems.map(({ file }) => file).sort()).toEqual(open.map(({ file }) => file).sort());
  expect(databaseContent(databasePath()) === before).toBe(true);

  const answers = { files: Object.fromEntries(open.map(({ file, answer }) => [file, answer])) };
  const answered: UploadedFile[] = await (
    await call(change, `/api/uploads/${id}`, { upload: id }, body(answers, 'PATCH'))
  ).json();
  expect(answered.map(({ file, problem }) => [file, problem])).toEqual(open.map(({ file }) => [file, null]));
  const { state, result } = await importedBy(id, {});
  expect([state, result.problems]).toEqual(['done', []]);
  for (const code of ['A1', '0102', 'AB7'])
    expect(await storedDays(place, code)).toEqual(Object.assign({}, ...OPEN_FILES.map(({ stored }) => stored[code])));
  for (const { code, facts } of OPEN_LISTS) expect(await getStation(place.region.id, code)).toMatchObject(facts);
});

test('a bad file in an archive is told by its own name, and the good ones beside it can be imported', async () => {
  const archive = zipSync({
    'bomb.xml': strToU8(BOMB),
    'good.csv': strToU8(`${HEADER}0102,2009-01-01,1\n0102,2009-01-02,2\n`),
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
  expect(await storedDays(place, '0102')).toMatchObject({ '2009-01-01': 1, '2009-01-02': 2 });
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
