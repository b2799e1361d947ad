import { expect, test } from 'vitest';
import { DELETE as unlink } from '../../../app/api/regions/[region]/links/[link]/route.ts';
import { GET as links, POST as setLink } from '../../../app/api/regions/[region]/links/route.ts';
import { DELETE as forget } from '../../../app/api/regions/[region]/mappings/[mapping]/route.ts';
import { POST as keep, GET as mappings } from '../../../app/api/regions/[region]/mappings/route.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

temporaryDatabase();

const AT = '/api/regions/wethe';
const send = (body: unknown): RequestInit => ({ method: 'POST', body: JSON.stringify(body) });
const region = { region: 'wethe' };

test('POST mappings keeps one by its name, GET lists them, DELETE takes one away', async () => {
  await importFiles([[{ code: 'A', values: [1] }]]);
  const mapping = { layout: 'month-rows', unit: 'L/s', missing: ['-99'] };
  const made = await call(keep, `${AT}/mappings`, region, send({ name: 'Monthly sheets', mapping }));
  expect(made.status).toBe(201);
  const { id } = await made.json();
  await call(keep, `${AT}/mappings`, region, send({ name: 'Monthly sheets', mapping: { ...mapping, unit: 'm3/s' } }));
  const list = await (await call(mappings, `${AT}/mappings`, region)).json();
  expect(list).toEqual([
    { id, name: 'Monthly sheets', mapping: { ...mapping, unit: 'm3/s' }, createdAt: expect.stringMatching(/^\d{4}-/) },
  ]);
  const params = { ...region, mapping: String(id) };
  expect((await call(forget, `${AT}/mappings/${id}`, params, { method: 'DELETE' })).status).toBe(204);
  await problemOf(await call(forget, `${AT}/mappings/${id}`, params, { method: 'DELETE' }), 404);
});

test('POST mappings refuses a key or a unit that no mapping has, by name, and keeps nothing', async () => {
  await importFiles([[{ code: 'A', values: [1] }]]);
  const bad = await call(keep, `${AT}/mappings`, region, send({ name: 'Odd', mapping: { unit: 'buckets' } }));
  expect((await problemOf(bad, 422)).detail).toContain('buckets');
  const key = await call(keep, `${AT}/mappings`, region, send({ name: 'Odd', mapping: { layoot: 'long' } }));
  expect((await problemOf(key, 422)).detail).toContain('layoot');
  await problemOf(await call(keep, `${AT}/mappings`, region, send({ name: ' ', mapping: {} })), 400);
  expect(await (await call(mappings, `${AT}/mappings`, region)).json()).toEqual([]);
});

test('POST links says which station lies below which; a circle is refused in words', async () => {
  await importFiles([['A', 'B'].map((code) => ({ code, values: [1] }))]);
  const link = (upstream: string, downstream: string) =>
    call(setLink, `${AT}/links`, region, send({ upstream, downstream }));
  const made = await link('A', 'B');
  expect(made.status).toBe(201);
  const { id } = await made.json();
  expect((await problemOf(await link('B', 'A'), 400)).detail).toContain('B → A → B');
  await problemOf(await link('A', 'Z'), 404);
  expect(await (await call(links, `${AT}/links`, region)).json()).toEqual([
    { id, upstream: 'A', downstream: 'B', source: 'person' },
  ]);
  const both = [
    { upstream: 'A', downstream: 'B', source: 'river-layer' },
    { upstream: 'B', downstream: 'A' },
  ];
  await problemOf(await call(setLink, `${AT}/links`, region, send({ links: both })), 400);
  const [one] = both;
  const several = await call(setLink, `${AT}/links`, region, send({ links: [one] }));
  expect([several.status, await several.json()]).toEqual([201, { links: [{ id, ...one }] }]);
  for (const wrong of [{ links: [] }, { ...one, links: [one] }, { upstream: 'A' }, {}]) {
    await problemOf(await call(setLink, `${AT}/links`, region, send(wrong)), 400);
  }
  const params = { ...region, link: String(id) };
  expect((await call(unlink, `${AT}/links/${id}`, params, { method: 'DELETE' })).status).toBe(204);
  await problemOf(await call(unlink, `${AT}/links/${id}`, params, { method: 'DELETE' }), 404);
});
