import { expect, test } from 'vitest';
import { DELETE, PATCH, GET as region } from '../../../app/api/regions/[region]/route.ts';
import { POST, GET as regions } from '../../../app/api/regions/route.ts';
import { GET as healthz } from '../../../app/healthz/route.ts';
import { closeStore } from '../../../lib/store/open.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

temporaryDatabase();

const send = (body: unknown): RequestInit => ({
  method: 'POST',
  body: typeof body === 'string' ? body : JSON.stringify(body),
});
const make = (name: string) => call(POST, '/api/regions', {}, send({ name }));
const patch = (slug: string, body: unknown) =>
  call(PATCH, `/api/regions/${slug}`, { region: slug }, { ...send(body), method: 'PATCH' });

test('POST regions makes a region that GET lists and answers', async () => {
  const made = await make('Upper Wethe');
  expect(made.status).toBe(201);
  expect(made.headers.get('location')).toBe('/api/regions/upper-wethe');
  expect(await made.json()).toMatchObject({ slug: 'upper-wethe', name: 'Upper Wethe', invented: false });
  const list = await (await call(regions, '/api/regions', {})).json();
  expect(list).toEqual([expect.objectContaining({ slug: 'upper-wethe', stations: 0, firstYear: null })]);
  const one = await call(region, '/api/regions/upper-wethe', { region: 'upper-wethe' });
  expect((await one.json()).basis.days).toBe(7);
});

test('POST regions refuses a name that is taken, an empty one, unknown fields and what is no JSON', async () => {
  await make('Upper Wethe');
  expect((await problemOf(await make('UPPER wethe'), 409)).detail).toContain('UPPER wethe');
  await problemOf(await make('  '), 400);
  await problemOf(await call(POST, '/api/regions', {}, send({ name: 'A', colour: 'blue' })), 400);
  expect((await problemOf(await call(POST, '/api/regions', {}, send('name=A')), 400)).detail).toContain('JSON');
  expect(await (await call(regions, '/api/regions', {})).json()).toHaveLength(1);
});

test('PATCH changes name, tiles and the keys of the basis that it names', async () => {
  await make('Upper Wethe');
  const tiles = { url: 'https://tiles.example/{z}/{x}/{y}.png', attribution: 'Example' };
  await patch('upper-wethe', { basis: { days: 30, alpha: 0.05 } });
  const changed = await (await patch('upper-wethe', { name: 'Wethe', tiles, basis: { days: 10 } })).json();
  expect(changed).toMatchObject({ slug: 'wethe', name: 'Wethe', tileUrl: tiles.url, basis: { days: 10, alpha: 0.05 } });
  expect(await (await patch('wethe', { tiles: null })).json()).toMatchObject({ tileUrl: null });
});

test('PATCH refuses a bad basis and tiles that are no web address, and changes nothing', async () => {
  await make('Upper Wethe');
  expect((await problemOf(await patch('upper-wethe', { basis: { day: 3 } }), 400)).detail).toContain('"day"');
  await problemOf(await patch('upper-wethe', { tiles: { url: 'javascript:alert(1)', attribution: '' } }), 400);
  const one = await (await call(region, '/api/regions/upper-wethe', { region: 'upper-wethe' })).json();
  expect(one).toMatchObject({ tileUrl: null, basis: { days: 7 } });
});

test('DELETE takes a region away', async () => {
  await make('Upper Wethe');
  const gone = await call(DELETE, '/api/regions/upper-wethe', { region: 'upper-wethe' }, { method: 'DELETE' });
  expect(gone.status).toBe(204);
  await problemOf(await call(region, '/api/regions/upper-wethe', { region: 'upper-wethe' }), 404);
});

test('a failure that nobody foresaw is answered with a neutral sentence, without paths', async () => {
  await closeStore();
  const before = process.env.DATABASE_URL;
  process.env.DATABASE_URL = 'file:/nowhere/at/all.db';
  try {
    const problem = await problemOf(await call(regions, '/api/regions', {}), 503);
    expect(JSON.stringify(problem)).not.toContain('/nowhere');
    expect((await healthz()).status).toBe(503);
  } finally {
    process.env.DATABASE_URL = before;
  }
});
