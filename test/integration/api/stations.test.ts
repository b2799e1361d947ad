import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { GET as getLinks, POST as postLink } from '../../../app/api/regions/[region]/links/route.ts';
import {
  POST as answerSuggestion,
  GET as getSuggested,
} from '../../../app/api/regions/[region]/links/suggested/route.ts';
import { GET as getFacts } from '../../../app/api/regions/[region]/stations/[code]/facts/route.ts';
import { DELETE, PATCH } from '../../../app/api/regions/[region]/stations/[code]/route.ts';
import { POST } from '../../../app/api/regions/[region]/stations/route.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { putLayer } from '../../../lib/store/layers.ts';
import { stationRecords } from '../../../lib/store/records.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { upsertRegistry } from '../../../lib/store/registry.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call } from './call.ts';

temporaryDatabase();
afterAll(closePool);
afterEach(forgetResults);

const REGION = { region: 'weir-brook' };
let regionId: number;

beforeEach(async () => {
  regionId = (await createRegion({ name: 'Weir Brook' })).id;
  await upsertRegistry(regionId, [
    { code: '07', name: 'Upper', river: 'Weir', latitude: 0, longitude: 0.1, areaKm2: 100 },
    { code: '08', name: 'Lower', river: 'Weir', latitude: 0, longitude: 0.3, areaKm2: 180 },
  ]);
});

const json = (method: string, body: unknown, headers = {}): RequestInit => ({
  method,
  headers: { 'content-type': 'application/json', ...headers },
  body: JSON.stringify(body),
});
const facts = async (code: string) => {
  const answer = await call(getFacts, `/api/regions/weir-brook/stations/${code}/facts`, { ...REGION, code });
  return { tag: answer.headers.get('etag')!, body: await answer.json() };
};
const patch = (code: string, body: unknown, headers = {}) =>
  call(PATCH, `/api/regions/weir-brook/stations/${code}`, { ...REGION, code }, json('PATCH', body, headers));

test('PATCH changes what it names and nothing else, and answers under the tag of the new facts', async () => {
  const changes = [{ date: '1990-05-01', kind: 'dam', note: 'Filled.' }];
  const namedFlows = [{ name: 'Stop', kind: 'abstraction stop', value: 400, unit: 'L/s', months: [5, 6] }];
  const answer = await patch('07', { influence: 'regulated', changes, namedFlows, notes: 'Seen.' });
  expect(answer.status).toBe(200);
  const { tag, body } = await facts('07');
  expect(answer.headers.get('etag')).toBe(tag);
  expect(body).toEqual({
    ...{ code: '07', name: 'Upper', river: 'Weir', latitude: 0, longitude: 0.1, areaKm2: 100, derived: null },
    ...{ influence: 'regulated', changes, namedFlows, notes: 'Seen.' },
  });
});

test('PATCH with If-Match refuses to write over what somebody else changed meanwhile', async () => {
  const { tag } = await facts('07');
  expect((await patch('07', { name: 'First' }, { 'if-match': tag })).status).toBe(200);
  const second = await patch('07', { name: 'Second' }, { 'if-match': tag });
  expect(second.status).toBe(412);
  expect(await second.json()).toMatchObject({ type: 'urn:hungerstone:problem:changed' });
  expect((await facts('07')).body.name).toBe('First');
  expect((await patch('07', { name: 'Third' }, { 'if-match': '*' })).status).toBe(200);
  expect((await patch('07', {}, { 'if-match': 'bare' })).status).toBe(400);
});

test.each([
  [{ latitude: 91 }, /latitude/],
  [{ longitude: null }, /latitude and a longitude/],
  [{ areaKm2: 0 }, /area/],
  [{ influence: 'wild' }, /influence/],
  [{ changes: [{ date: '1990-02-30', kind: 'dam', note: '' }] }, /1990-02-30/],
  [{ changes: [{ date: '1990-02-01', kind: 'flood', note: '' }] }, /kind/],
  [{ namedFlows: [{ name: 'A', kind: 'other', value: -1, unit: 'm3/s', months: null }] }, /"A"/],
  [{ surprise: 1 }, /surprise/],
])('PATCH refuses %j and says what is wrong', async (body, words) => {
  const answer = await patch('07', body);
  expect(answer.status).toBe(400);
  expect((await answer.json()).detail).toMatch(words);
  expect((await facts('07')).body).toMatchObject({ latitude: 0, areaKm2: 100, changes: [], namedFlows: [] });
});

test('POST makes a derived station, PATCH its recipe, DELETE takes it away; a circle is refused', async () => {
  const add = (body: unknown) => call(POST, '/api/regions/weir-brook/stations', REGION, json('POST', body));
  const terms = [{ code: '08' }, { code: '07', factor: -1, lagDays: 1 }];
  const made = await add({ code: 'GAIN', name: 'Gain', derived: { terms } });
  expect(made.status).toBe(201);
  expect((await made.json()).derived).toEqual({
    ...{ quantity: 'flow', note: '' },
    terms: [
      { code: '08', factor: 1, lagDays: 0 },
      { code: '07', factor: -1, lagDays: 1 },
    ],
  });
  expect((await add({ code: 'GAIN', derived: { terms } })).status).toBe(409);
  expect((await add({ code: 'NOWHERE', derived: { terms: [{ code: '99' }] } })).status).toBe(400);
  const itself = await patch('GAIN', { derived: { terms: [{ code: 'GAIN' }] } });
  expect([itself.status, (await itself.json()).detail]).toEqual([400, expect.stringContaining('itself')]);
  const remove = (code: string) =>
    call(DELETE, `/api/regions/weir-brook/stations/${code}`, { ...REGION, code }, { method: 'DELETE' });
  expect((await remove('GAIN')).status).toBe(204);
  expect((await remove('GAIN')).status).toBe(404);
  expect(await stationRecords(regionId)).toEqual([]);
});

test('links are suggested from the river layer with a reason, and not again once made or rejected', async () => {
  const suggested = async () =>
    (await call(getSuggested, '/api/regions/weir-brook/links/suggested', REGION)).json() as Promise<{
      suggested: { upstream: string; downstream: string; source: string; reason: string }[];
      rejected: unknown[];
      hasRivers: boolean;
    }>;
  expect((await suggested()).suggested).toMatchObject([{ upstream: '07', source: 'area-and-position' }]);
  const line = {
    type: 'LineString',
    coordinates: [
      [0, 0],
      [0.2, 0],
      [0.4, 0],
    ],
  };
  await putLayer(regionId, {
    name: 'Rivers',
    kind: 'river',
    geojson: JSON.stringify({ type: 'Feature', properties: {}, geometry: line }),
  });
  const [one] = (await suggested()).suggested;
  expect(one).toMatchObject({ upstream: '07', downstream: '08', source: 'river-layer' });
  expect(one.reason).toMatch(/22 km along the line; the drainage area goes from 100 to 180 km²/);

  const say = (rejected: boolean) =>
    call(
      ...([answerSuggestion, '/api/regions/weir-brook/links/suggested', REGION] as const),
      json('POST', { upstream: '07', downstream: '08', rejected }),
    );
  await say(true);
  expect(await suggested()).toMatchObject({ suggested: [], rejected: [{ upstream: '07', downstream: '08' }] });
  expect(await (await call(getLinks, '/api/regions/weir-brook/links', REGION)).json()).toEqual([]);
  await say(false);
  expect((await suggested()).suggested).toHaveLength(1);
  await say(true);
  const body = { upstream: '07', downstream: '08', source: 'river-layer' };
  expect((await call(postLink, '/api/regions/weir-brook/links', REGION, json('POST', body))).status).toBe(201);
  expect(await suggested()).toMatchObject({ suggested: [], rejected: [] });
  expect(await (await call(getLinks, '/api/regions/weir-brook/links', REGION)).json()).toMatchObject([body]);
});
