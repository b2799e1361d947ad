import { parse } from 'csv-parse/sync';
import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { GET as job } from '../../../app/api/jobs/[job]/route.ts';
import { POST as check } from '../../../app/api/regions/[region]/checks/route.ts';
import { GET as findings } from '../../../app/api/regions/[region]/findings/route.ts';
import { GET as findingCounts } from '../../../app/api/regions/[region]/findings/stations/route.ts';
import { DELETE as removeMark } from '../../../app/api/regions/[region]/stations/[code]/marks/[mark]/route.ts';
import { POST as addMark, GET as marks } from '../../../app/api/regions/[region]/stations/[code]/marks/route.ts';
import { dayNumber } from '../../../lib/calendar/day.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { checkStations, checkUnchecked } from '../../../lib/jobs/checks.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importFiles, seenRecords } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

temporaryDatabase();
afterAll(closePool);
afterEach(forgetResults);

const FIRST = dayNumber(2001, 1, 1);
let regionId: number;
beforeEach(async () => {
  const flat = new Array<number>(12).fill(3);
  const imported = await importFiles([
    [
      { code: 'A1', firstDay: FIRST, values: [1, -1, 2, ...flat] },
      { code: 'B/2', firstDay: FIRST, values: [1, 2, 3, -4] },
    ],
  ]);
  regionId = imported.regionId;
  await checkUnchecked(regionId);
});

const region = { region: 'wethe' };
const A1 = { ...region, code: 'A1' };
const url = '/api/regions/wethe';
const marksUrl = `${url}/stations/A1/marks`;
const list = async (query = '') => (await (await call(findings, `${url}/findings${query}`, region)).json()).findings;
const post = (body: unknown) => call(addMark, marksUrl, A1, { method: 'POST', body: JSON.stringify(body) });
const remove = (mark: number | string, code = 'A1') =>
  call(
    removeMark,
    `${url}/stations/${code}/marks/${mark}`,
    { ...region, code, mark: String(mark) },
    { method: 'DELETE' },
  );

const REJECT = { first: '2001-01-02', last: '2001-01-02', kind: 'reject', reason: 'no tide here', by: 'K. Ohm' };

test('GET findings lists them by station and day, narrowed by station, kind and state', async () => {
  const all = await list();
  expect(all).toMatchObject([
    { code: 'A1', quantity: 'flow', kind: 'negative', first: '2001-01-02', last: '2001-01-02', days: 1, state: 'open' },
    { code: 'A1', kind: 'flat', first: '2001-01-04', last: '2001-01-15', days: 12, detail: { value: 3 } },
    { code: 'B/2', kind: 'negative', detail: { lowest: -4 } },
  ]);
  expect(await list('?station=B%2F2')).toEqual([all[2]]);
  expect(await list('?kind=flat')).toEqual([all[1]]);
  expect(await list('?state=rejected')).toEqual([]);
});

test('GET findings?format=csv is a file to be saved, with the figures as JSON', async () => {
  const response = await call(findings, `${url}/findings?format=csv&station=A1`, region);
  expect(response.headers.get('content-type')).toMatch(/^text\/csv/);
  expect(response.headers.get('content-disposition')).toContain('wethe-findings.csv');
  const rows = parse(await response.text(), { columns: true }) as Record<string, string>[];
  expect(rows[0]).toEqual({
    ...{ station_code: 'A1', quantity: 'flow', kind: 'negative', first: '2001-01-02', last: '2001-01-02' },
    ...{ days: '1', state: 'open', detail: '{"lowest":-1}' },
  });
  expect(rows).toHaveLength(2);
});

test('GET findings refuses an unknown station, kind, state and parameter', async () => {
  const ask = (query: string) => call(findings, `${url}/findings?${query}`, region);
  expect((await problemOf(await ask('station=Z'), 404)).detail).toContain('"Z"');
  for (const query of ['kind=odd', 'state=shut', 'of=A1', 'format=xml']) await problemOf(await ask(query), 400);
});

test('POST marks answers a finding, and DELETE opens it again', async () => {
  const response = await post(REJECT);
  expect(response.status).toBe(201);
  const mark = await response.json();
  expect(mark).toMatchObject({ ...REJECT, code: 'A1', quantity: 'flow' });
  expect(Date.parse(mark.createdAt)).toBeLessThanOrEqual(Date.now());
  expect(await (await call(marks, marksUrl, A1)).json()).toEqual({ marks: [mark] });
  expect(await list('?state=rejected')).toMatchObject([{ kind: 'negative', code: 'A1' }]);
  expect((await seenRecords(regionId)).A1.flags.slice(0, 4)).toEqual([0, 48, 0, 16]);
  expect((await remove(mark.id)).status).toBe(204);
  expect(await list('?state=rejected')).toEqual([]);
  expect((await seenRecords(regionId)).A1.flags.slice(0, 4)).toEqual([0, 16, 0, 16]);
  await problemOf(await remove(mark.id), 404);
});

test('GET marks?format=csv lists who, when and why', async () => {
  await post({ ...REJECT, kind: 'note', by: '' });
  const rows = parse(await (await call(marks, `${marksUrl}?format=csv`, A1)).text(), { columns: true });
  expect(rows).toEqual([
    expect.objectContaining({ station_code: 'A1', kind: 'note', first: '2001-01-02', reason: 'no tide here', by: '' }),
  ]);
  expect(await (await call(marks, `${marksUrl}?quantity=stage`, A1)).json()).toEqual({ marks: [] });
});

test('a finding keeps its id when the record is checked anew, and is the only one of it on its record', async () => {
  const before = await list();
  expect(before.map(({ id }: { id: string }) => id)).toEqual([
    'negative:2001-01-02',
    'flat:2001-01-04',
    'negative:2001-01-04',
  ]);
  await checkStations((await listStations(regionId)).map(({ id }) => id));
  expect(await list()).toEqual(before);
});

test('GET findings/stations counts by station, kind and state', async () => {
  await post(REJECT);
  const counts = await (await call(findingCounts, `${url}/findings/stations`, region)).json();
  const flat = { kind: 'flat', state: 'open', count: 1 };
  expect(counts).toEqual({
    stations: [
      { code: 'A1', counts: [{ kind: 'negative', state: 'rejected', count: 1 }, flat] },
      { code: 'B/2', counts: [{ kind: 'negative', state: 'open', count: 1 }] },
    ],
  });
  await problemOf(await call(findingCounts, `${url}/findings/stations?kind=flat`, region), 400);
});

test('POST marks with several stretches marks all of them, or none when one is wrong', async () => {
  const { first, last, ...rest } = REJECT;
  const stretches = [
    { first, last },
    { first: '2001-01-04', last: '2001-01-15' },
  ];
  const response = await post({ ...rest, stretches });
  expect(response.status).toBe(201);
  const { marks: added } = await response.json();
  expect(added).toMatchObject(stretches.map((stretch) => ({ ...stretch, kind: 'reject', code: 'A1' })));
  expect(await list('?state=rejected')).toHaveLength(2);

  const wrong = [...stretches, { first: '2001-01-09', last: '2001-01-08' }];
  expect((await problemOf(await post({ ...rest, stretches: wrong }), 400)).detail).toContain('"stretches.2.last"');
  await problemOf(await post({ ...rest, stretches: [] }), 400);
  await problemOf(await post({ ...REJECT, stretches }), 400);
  await problemOf(await post(rest), 400);
  expect((await (await call(marks, marksUrl, A1)).json()).marks).toHaveLength(2);
});

test('POST marks refuses days that do not exist or run backwards, no reason, an unknown kind or field, another station', async () => {
  const refused = async (change: Record<string, unknown>, word: string) =>
    expect((await problemOf(await post({ ...REJECT, ...change }), 400)).detail).toContain(word);
  await refused({ first: '2001-02-30' }, '"first"');
  await refused({ first: '02.01.2001' }, 'YYYY-MM-DD');
  await refused({ first: '2001-01-03' }, '"last"');
  await refused({ first: undefined }, '"first"');
  await refused({ last: undefined }, '"last"');
  await refused({ reason: '  ' }, '"reason"');
  await refused({ kind: 'drop' }, '"kind"');
  await refused({ colour: 'red' }, 'colour');
  await problemOf(await call(addMark, marksUrl, A1, { method: 'POST', body: 'x' }), 400);
  await problemOf(await call(marks, `${url}/stations/Z/marks`, { ...region, code: 'Z' }), 404);
  const { id } = await (await post(REJECT)).json();
  await problemOf(await remove(id, 'B/2'), 404);
  await problemOf(await remove('one'), 404);
  expect((await (await call(marks, marksUrl, A1)).json()).marks).toHaveLength(1);
});

test('POST checks answers a job at once, of all stations or of those named', async () => {
  const ask = (body?: unknown) =>
    call(check, `${url}/checks`, region, {
      method: 'POST',
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    });
  const ended = async (response: Response) => {
    expect(response.status).toBe(202);
    const { id, kind } = await response.json();
    expect([kind, response.headers.get('location')]).toEqual(['check', `/api/jobs/${id}`]);
    const view = async () => (await call(job, `/api/jobs/${id}`, { job: id })).json();
    await expect.poll(async () => (await view()).state, { timeout: 20_000 }).toBe('done');
    return (await view()).result;
  };
  expect(await ended(await ask())).toEqual({ stations: 2, withFindings: 2, findings: 3 });
  expect(await ended(await ask({ stations: ['B/2'] }))).toEqual({ stations: 1, withFindings: 1, findings: 1 });
  expect((await problemOf(await ask({ stations: ['B/2', 'Z'] }), 404)).detail).toContain('"Z"');
  await problemOf(await ask({ stations: [] }), 400);
});
