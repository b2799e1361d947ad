import { readdirSync, readFileSync } from 'node:fs';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { GET as events } from '../../../app/api/jobs/[job]/events/route.ts';
import { DELETE as cancel, GET as job } from '../../../app/api/jobs/[job]/route.ts';
import { GET as rejected } from '../../../app/api/regions/[region]/imports/[import]/rejected/route.ts';
import { GET as report, DELETE as undo } from '../../../app/api/regions/[region]/imports/[import]/route.ts';
import { GET as imports, POST } from '../../../app/api/regions/[region]/imports/route.ts';
import { run as importCommand } from '../../../lib/cli/commands/import.ts';
import type { ImportOutcome } from '../../../lib/jobs/import-types.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { regionDataHash } from '../../../lib/store/records.ts';
import { createRegion, getRegion } from '../../../lib/store/regions.ts';
import { databaseContent } from '../jobs/database-content.ts';
import { longRows, type SampleFiles, sampleFiles } from '../jobs/sample-files.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

const place = temporaryDatabase();
afterAll(closePool);

let files: SampleFiles;
beforeEach(async () => {
  files = sampleFiles(`${place.folder}/given`);
  await createRegion({ name: 'Upper Wethe' });
});

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe/imports';

function form(paths: string[], choices: unknown = {}): FormData {
  const data = new FormData();
  data.append('choices', JSON.stringify(choices));
  for (const path of paths) {
    const name = path.slice(path.lastIndexOf('/') + 1);
    data.append('files', new Blob([readFileSync(path)]), name);
  }
  return data;
}

const post = (body: FormData) => call(POST, url, params, { method: 'POST', body });

/** Follows a job's events to their end. */
async function lastState(id: string) {
  const stream = await call(events, `/api/jobs/${id}/events`, { job: id });
  expect(stream.headers.get('content-type')).toBe('text/event-stream');
  const lines = (await stream.text()).split('\n');
  return {
    ids: lines.filter((line) => line.startsWith('id: ')).map((line) => Number(line.slice(4))),
    view: JSON.parse(lines.findLast((line) => line.startsWith('data: '))!.slice(6)),
  };
}

async function taken(paths: string[], choices: unknown = {}): Promise<ImportOutcome> {
  const response = await post(form(paths, choices));
  expect(response.status).toBe(202);
  const { id } = await response.json();
  const { view } = await lastState(id);
  expect([view.state, view.error]).toEqual(['done', null]);
  return view.result;
}

const leftovers = () => readdirSync(place.folder).filter((name) => /upload|staging/.test(name));

test('POST imports answers a job whose events end with what was taken, and leaves no upload behind', async () => {
  const response = await post(form([files.flows, files.layer, files.registry]));
  expect(response.status).toBe(202);
  const { id, state } = await response.json();
  expect(response.headers.get('location')).toBe(`/api/jobs/${id}`);
  expect(['waiting', 'running']).toContain(state);
  const { ids, view } = await lastState(id);
  expect(ids).toEqual(ids.map((_, i) => i + 1));
  expect(view).toMatchObject({ state: 'done', progress: { share: 1 } });
  expect(view.result.taken.map(({ kind }: { kind: string }) => kind)).toEqual(['registry', 'layer', 'flows']);
  expect(leftovers()).toEqual([]);
  expect(await (await call(job, `/api/jobs/${id}`, { job: id })).json()).toEqual(view);
  const list = await (await call(imports, url, params)).json();
  expect(list.map(({ kind }: { kind: string }) => kind)).toEqual(['flows', 'layer', 'registry']);
});

test('events after Last-Event-ID go on with the next number', async () => {
  const { id } = await (await post(form([files.layer]))).json();
  await lastState(id);
  const again = await call(events, `/api/jobs/${id}/events`, { job: id }, { headers: { 'last-event-id': '7' } });
  expect(await again.text()).toContain('id: 8\nevent: job\n');
});

test('the same files by the screen and by the command come to equal data and equal reports', async () => {
  const odd = files.write(
    'odd.csv',
    `station,date,discharge_m3s\n${longRows(['A1'])
      .map((row, i) => (i % 500 === 3 ? `${row}?` : row))
      .join('\n')}\n`,
  );
  const byScreen = await taken([odd, files.registry]);
  const written: string[] = [];
  const write = process.stdout.write;
  process.stdout.write = ((text: string) => written.push(text) > 0) as typeof process.stdout.write;
  let code: number;
  try {
    code = await importCommand(['--region', 'By Command', '--stations', files.registry, '--json', odd]);
  } finally {
    process.stdout.write = write;
  }
  expect(code).toBe(3);
  const { files: byCommand } = JSON.parse(written.join(''));
  const onScreen = byScreen.taken.find(({ kind }) => kind === 'flows')!.report!;
  expect(Object.keys(byCommand[0])).toEqual([
    'file',
    'layout',
    'unit',
    'rows',
    'accepted',
    'rejectedTotal',
    'rejectedFile',
    'rejected',
    'stations',
    'revisions',
  ]);
  for (const name of ['file', 'layout', 'unit', 'rows', 'accepted', 'rejectedTotal', 'rejected'] as const) {
    expect([name, byCommand[0][name]]).toEqual([name, onScreen[name]]);
  }
  expect(byCommand[0].rejectedTotal).toBe(22);
  const { gaps: _gaps, longestGapDays: _longest, duplicates: _duplicates, ...counts } = onScreen.stations[0];
  expect(byCommand[0].stations).toEqual([counts]);
  expect(readFileSync(byCommand[0].rejectedFile, 'utf8').split('\r\n')).toHaveLength(22 + 2);
  const [screen, command] = await Promise.all([getRegion('upper-wethe'), getRegion('by-command')]);
  expect(regionDataHash(command!.id)).toBe(regionDataHash(screen!.id));
});

test('a refused import tells each problem, what is needed and what the file looks like, and takes nothing', async () => {
  const before = databaseContent(place.path);
  const unclear = files.write('unclear.csv', 'station,date,flow\nA1,2001-01-01,3\nA1,2001-01-02,4\n');
  const { id } = await (await post(form([files.registry, unclear]))).json();
  const { view } = await lastState(id);
  expect(view).toMatchObject({ state: 'failed', result: { taken: [] } });
  expect(view.error).toContain('unclear.csv');
  expect(view.result.problems[0]).toMatchObject({ file: 'unclear.csv', problem: { needs: 'unit' } });
  expect(view.result.problems[0].inspection.mapping.layout).toBe('long');
  expect(databaseContent(place.path)).toBe(before);
  expect(leftovers()).toEqual([]);
});

test('DELETE a job cancels its import and leaves nothing behind', async () => {
  const before = databaseContent(place.path);
  const { id } = await (await post(form(Array.from({ length: 8 }, () => files.flows)))).json();
  const ended = await (await call(cancel, `/api/jobs/${id}`, { job: id }, { method: 'DELETE' })).json();
  expect(ended.state).toBe('cancelled');
  expect(databaseContent(place.path)).toBe(before);
  expect(leftovers()).toEqual([]);
});

test('GET and DELETE an import answer its report and undo it; its rejected rows can be fetched', async () => {
  const before = databaseContent(place.path);
  const bad = files.write('bad.csv', 'station,date,discharge_m3s\nA1,2001-01-01,3\nA1,2001-02-31,4\nA1,2001-01-03,5\n');
  const [{ importId, report: given }] = (await taken([bad])).taken;
  const context = { ...params, import: String(importId) };
  const stored = await (await call(report, `${url}/${importId}`, context)).json();
  expect(stored.report).toEqual(given);
  const rows = await call(rejected, `${url}/${importId}/rejected`, context);
  expect(rows.headers.get('content-disposition')).toContain('rejected.csv');
  expect((await rows.text()).split('\r\n')[1]).toMatch(/^3,"A1,2001-02-31,4",/);
  expect((await call(undo, `${url}/${importId}`, context, { method: 'DELETE' })).status).toBe(204);
  await problemOf(await call(undo, `${url}/${importId}`, context, { method: 'DELETE' }), 404);
  expect(databaseContent(place.path).length).toBe(before.length);
});

test('a request that is no form, holds no file, or whose choices are wrong is refused, and leaves nothing', async () => {
  const plain = await call(POST, url, params, {
    method: 'POST',
    body: 'flows',
    headers: { 'content-type': 'text/plain' },
  });
  await problemOf(plain, 400);
  await problemOf(await post(form([])), 400);
  const colour = await problemOf(await post(form([files.layer], { colour: 'blue' })), 400);
  expect(colour.detail).toContain('colour');
  const unit = await problemOf(await post(form([files.flows], { all: { unit: 'gallons' } })), 400);
  expect(unit.detail).toContain('unit');
  expect(leftovers()).toEqual([]);
});

test('an upload beyond the limit is refused, whether it says so or not', async () => {
  process.env.HUNGERSTONE_MAX_UPLOAD = '1000';
  try {
    await problemOf(await post(form([files.flows])), 413);
    const announced = await call(POST, url, params, {
      method: 'POST',
      body: 'x',
      headers: { 'content-type': 'multipart/form-data; boundary=b', 'content-length': '5000' },
    });
    await problemOf(announced, 413);
  } finally {
    delete process.env.HUNGERSTONE_MAX_UPLOAD;
  }
  expect(leftovers()).toEqual([]);
});

test('an upload that was cut off is refused', async () => {
  const body = '--b\r\nContent-Disposition: form-data; name="files"; filename="a.csv"\r\n\r\nstation,da';
  const headers = { 'content-type': 'multipart/form-data; boundary=b' };
  const cut = await problemOf(await call(POST, url, params, { method: 'POST', body, headers }), 400);
  expect(cut.type).toBe('urn:hungerstone:problem:cut-off');
  const whole = `${body}te\r\n--b--\r\n`;
  const short = { ...headers, 'content-length': String(whole.length + 100) };
  expect(
    (await problemOf(await call(POST, url, params, { method: 'POST', body: whole, headers: short }), 400)).type,
  ).toBe('urn:hungerstone:problem:cut-off');
  expect(leftovers()).toEqual([]);
});

test('a file name with folders in it never becomes a path', async () => {
  const data = new FormData();
  data.append('files', new Blob([readFileSync(files.layer)]), '../../../evil/rivers.geojson');
  const { id } = await (await post(data)).json();
  const { view } = await lastState(id);
  expect(view.result.taken[0].file).toBe('rivers.geojson');
  expect(readdirSync(place.folder).sort()).toEqual(expect.not.arrayContaining(['evil']));
});

test('an unknown job and an unknown import are answered as problems', async () => {
  await problemOf(await call(job, '/api/jobs/x', { job: 'x' }), 404);
  await problemOf(await call(events, '/api/jobs/x/events', { job: 'x' }), 404);
  await problemOf(await call(report, `${url}/99`, { ...params, import: '99' }), 404);
});
