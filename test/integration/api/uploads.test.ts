import { existsSync, readdirSync } from 'node:fs';
import { strToU8, zipSync } from 'fflate';
import { afterAll, beforeEach, expect, test } from 'vitest';
import { GET as job } from '../../../app/api/jobs/[job]/route.ts';
import { GET as listed, POST as open } from '../../../app/api/regions/[region]/uploads/route.ts';
import { POST as add } from '../../../app/api/uploads/[upload]/files/route.ts';
import { POST as start } from '../../../app/api/uploads/[upload]/import/route.ts';
import { POST as preview } from '../../../app/api/uploads/[upload]/preview/route.ts';
import { PATCH as change, DELETE as giveUp, GET as view } from '../../../app/api/uploads/[upload]/route.ts';
import { POST as openNew } from '../../../app/api/uploads/route.ts';
import type { FileChoices } from '../../../lib/jobs/import-types.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { uploadFolder } from '../../../lib/jobs/upload-folder.ts';
import type { FilePreview, UploadView } from '../../../lib/jobs/upload-types.ts';
import { createRegion, deleteRegion, getRegion, listRegions } from '../../../lib/store/regions.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

const place = temporaryDatabase();
afterAll(closePool);
beforeEach(async () => {
  await createRegion({ name: 'Upper Wethe' });
});

const REGISTRY = 'code,name,lat,lon,area_km2\n0001,Aldery at Ford,46.1,14.2,120\n';
const rows = (unit: string, count = 40) =>
  [
    `station,date,flow${unit}`,
    ...Array.from(
      { length: count },
      (_, day) => `0001,${new Date(Date.UTC(2001, 0, 1 + day)).toISOString().slice(0, 10)},1.5`,
    ),
  ].join('\n');

function form(files: Record<string, string> | [string, string][]): FormData {
  const data = new FormData();
  for (const [name, text] of Array.isArray(files) ? files : Object.entries(files)) {
    data.append('files', new Blob([text]), name);
  }
  return data;
}

const params = { region: 'upper-wethe' };
const send = (body: FormData) => call(open, '/api/regions/upper-wethe/uploads', params, { method: 'POST', body });
const json = (body: unknown) => ({ method: 'POST', body: JSON.stringify(body) });
const at = (id: string, rest = '') => [`/api/uploads/${id}${rest}`, { upload: id }] as const;
const opened = async (files: Parameters<typeof form>[0]): Promise<UploadView> => {
  const response = await send(form(files));
  expect(response.status).toBe(201);
  return response.json();
};
const looked = async (id: string, file: string, choices: FileChoices = {}): Promise<FilePreview> =>
  (await call(preview, ...at(id, '/preview'), json({ file, choices }))).json();

async function overOf(id: string) {
  for (;;) {
    const state = await (await call(job, `/api/jobs/${id}`, { job: id })).json();
    if (state.state !== 'waiting' && state.state !== 'running') return state;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}
const imported = async (id: string, order: unknown) =>
  overOf((await (await call(start, ...at(id, '/import'), json(order))).json()).id);

test('POST uploads looks at every file and keeps them: what is ready, and what asks for what', async () => {
  const { files, region, job: none } = await opened({ 'stations.csv': REGISTRY, 'flows.csv': rows('') });
  expect([region, none]).toEqual(['upper-wethe', null]);
  expect(files.map(({ file, kind, state, needs }) => ({ file, kind, state, needs }))).toEqual([
    { file: 'stations.csv', kind: 'registry', state: 'ready', needs: [] },
    { file: 'flows.csv', kind: 'flows', state: 'asks', needs: ['unit'] },
  ]);
  expect(files[0].count).toBe(1);
});

test('POST preview answers the file under the choices and keeps them for the import', async () => {
  const { id } = await opened({ 'flows.csv': rows('') });
  const before = await looked(id, 'flows.csv');
  expect(before.problems[0].problem.needs).toBe('unit');
  const after = await looked(id, 'flows.csv', { mapping: { unit: 'L/s' } });
  expect([after.state, after.unit, after.problems]).toEqual(['ready', 'L/s', []]);
  expect(after.lines[0]).toBe('station,date,flow');
  const kept: UploadView = await (await call(view, ...at(id))).json();
  expect(kept.files[0].choices).toEqual({ mapping: { unit: 'L/s' } });
  const end = await imported(id, {});
  expect([end.state, end.result.taken[0].report.unit]).toEqual(['done', 'L/s']);
});

test('a choice that cannot be read is a problem of the file, not of the request', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  const { problems, inspection } = await looked(id, 'flows.csv', { mapping: { decimal: 'x' as ',' } });
  expect(inspection).toBeNull();
  expect(problems[0].message).toContain('decimal');
});

test('files stay until an import has succeeded: not after a dry run, not after a refusal, not beyond success', async () => {
  const { id } = await opened({ 'flows.csv': rows('') });
  const refused = await imported(id, {});
  expect([refused.state, refused.result.problems[0].problem.needs]).toEqual(['failed', 'unit']);
  expect(existsSync(uploadFolder(id))).toBe(true);
  await call(change, ...at(id), {
    method: 'PATCH',
    body: JSON.stringify({ files: { 'flows.csv': { unit: 'm3/s' } } }),
  });
  expect((await imported(id, {})).state).toBe('done');
  await expect.poll(() => existsSync(uploadFolder(id))).toBe(false);
  await problemOf(await call(view, ...at(id)), 404);
});

test('an upload for a region to be made: giving up leaves nothing, its import makes the region', async () => {
  const sent = await call(openNew, '/api/uploads', {}, { method: 'POST', body: form({ 'flows.csv': rows('_m3s') }) });
  const { id, region }: UploadView = await sent.json();
  expect(region).toBeNull();
  await problemOf(await call(start, ...at(id, '/import'), json({})), 400);
  await problemOf(await call(start, ...at(id, '/import'), json({ region: { name: 'Upper  Wethe' } })), 409);
  expect((await listRegions()).length).toBe(1);
  expect((await imported(id, { region: { name: 'Lower Wethe' } })).state).toBe('done');
  expect(await getRegion('lower-wethe')).not.toBeNull();
});

test('DELETE gives an upload up and takes its files away', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  expect((await call(listed, '/api/regions/upper-wethe/uploads', params)).status).toBe(200);
  expect((await call(giveUp, ...at(id), { method: 'DELETE' })).status).toBe(204);
  expect(existsSync(uploadFolder(id))).toBe(false);
  expect(await (await call(listed, '/api/regions/upper-wethe/uploads', params)).json()).toEqual([]);
});

test('two files of one name keep apart, and files can be added and left out', async () => {
  const { id, files } = await opened([
    ['a/0001.csv', rows('_m3s')],
    ['b/0001.csv', rows('_m3s')],
  ]);
  expect(files.map(({ file }) => file)).toEqual(['0001.csv', '2/0001.csv']);
  const more: UploadView = await (
    await call(add, ...at(id, '/files'), { method: 'POST', body: form({ 'stations.csv': REGISTRY }) })
  ).json();
  expect(more.files.map(({ file, state }) => [file, state])).toContainEqual(['stations.csv', 'ready']);
  const end = await imported(id, { leaveOut: ['2/0001.csv'] });
  expect(end.result.taken.map(({ file }: { file: string }) => file).sort()).toEqual(['0001.csv', 'stations.csv']);
});

test('a station list that comes in sets the flows to be looked at anew', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  const more: UploadView = await (
    await call(add, ...at(id, '/files'), { method: 'POST', body: form({ 'stations.csv': REGISTRY }) })
  ).json();
  expect(more.files.find(({ file }) => file === 'flows.csv')?.state).toBe('unseen');
});

test.each(['../session', 'x', '00000000-0000-4000-8000-000000000000'])('an upload "%s" is not there', async (id) => {
  await problemOf(await call(view, ...at(id)), 404);
});

test('an upload that is cut off or holds no file leaves no folder', async () => {
  await problemOf(await send(new FormData()), 400);
  expect(readdirSync(place.folder).filter((name) => name.includes('.upload-'))).toEqual([]);
});

test('an archive is unpacked in place; one that is damaged says why and leaves the others be', async () => {
  const zip = zipSync({ 'deep/0001.csv': strToU8(rows('_m3s')), 'README.txt': strToU8('Read me') });
  const body = new FormData();
  body.append('files', new Blob([zip as Uint8Array<ArrayBuffer>]), 'good.zip');
  body.append('files', new Blob([zip.slice(0, zip.length - 30) as Uint8Array<ArrayBuffer>]), 'cut.zip');
  const { id, files, notes }: UploadView = await (await send(body)).json();
  expect(files.map(({ file, state }) => [file, state])).toEqual([
    ['0001.csv', 'ready'],
    ['cut.zip', 'unreadable'],
  ]);
  expect(notes).toEqual(['“README.txt” in good.zip was passed over: it explains others.']);
  expect(files[1].problem).toContain('cut.zip');
  const end = await imported(id, { leaveOut: ['cut.zip'] });
  expect(end.result.taken.map(({ file }: { file: string }) => file)).toEqual(['0001.csv']);
});

test('files for an upload that was given up meanwhile are refused, and nothing stays', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  await call(giveUp, ...at(id), { method: 'DELETE' });
  await problemOf(await call(add, ...at(id, '/files'), { method: 'POST', body: form({ 'a.csv': rows('_m3s') }) }), 404);
  expect(readdirSync(place.folder).filter((name) => name.includes('.upload-'))).toEqual([]);
});

test('a dry run changes nothing and keeps the files', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  const { state, result } = await imported(id, { dryRun: true });
  expect([state, result.dryRun, result.taken[0].revisions.extended]).toEqual(['done', true, 40]);
  expect(existsSync(uploadFolder(id))).toBe(true);
  const kept: UploadView = await (await call(view, ...at(id))).json();
  expect(kept.job).toMatchObject({ state: 'done', dryRun: true });
});

test('an upload of a region that has gone goes with the next one', async () => {
  const { id } = await opened({ 'flows.csv': rows('_m3s') });
  await deleteRegion('upper-wethe');
  await createRegion({ name: 'Upper Wethe' });
  await opened({ 'flows.csv': rows('_m3s') });
  expect(existsSync(uploadFolder(id))).toBe(false);
});
