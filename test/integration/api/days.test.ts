import { expect, test } from 'vitest';
import { GET } from '../../../app/api/regions/[region]/stations/[code]/days/route.ts';
import { addMark } from '../../../lib/store/marks.ts';
import { stationDays } from '../../../lib/store/station-days.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { importFiles } from '../store/helpers.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';
import { call, problemOf } from './call.ts';

temporaryDatabase();

const days = (query: string, code = 'A') =>
  call(GET, `/api/regions/wethe/stations/${code}/days?${query}`, { region: 'wethe', code });

test('GET days answers values, flags and codes as written, with a person’s marks laid over', async () => {
  const { regionId } = await importFiles([
    [{ code: 'A', firstDay: 0, values: [1, Number.NaN, 3, 4], codes: ['e', '', 'Ice', 'P'] }],
  ]);
  const [{ id: stationId }] = await listStations(regionId);
  await addMark({ stationId, firstDay: 2, lastDay: 3, kind: 'reject', reason: 'gauge froze' });
  const answer = await days('first=1969-12-01&last=1970-01-03');
  expect(answer.status).toBe(200);
  expect(await answer.json()).toEqual({
    station_code: 'A',
    quantity: 'flow',
    unit: 'm3/s',
    dates: ['1970-01-01', '1970-01-02', '1970-01-03'],
    values: [1, null, 3],
    flags: [1, 0, 4 | 32],
    texts: ['e', '', 'Ice'],
  });
  const csv = await (await days('first=1970-01-03&last=1970-01-04&format=csv')).text();
  expect(csv.split('\r\n').slice(0, 3)).toEqual([
    'station_code,date,value,unit,flags,text',
    'A,1970-01-03,3,m3/s,ice;rejected,Ice',
    'A,1970-01-04,4,m3/s,provisional;rejected,P',
  ]);
});

test('GET days has an entity tag that a mark changes', async () => {
  const { regionId } = await importFiles([[{ code: 'A', values: [1, 2] }]]);
  const query = 'first=1970-01-01&last=1970-01-02';
  const tag = (await days(query)).headers.get('etag');
  expect((await days(query)).headers.get('etag')).toBe(tag);
  const [{ id: stationId }] = await listStations(regionId);
  await addMark({ stationId, firstDay: 0, lastDay: 0, kind: 'reject', reason: 'x' });
  expect((await days(query)).headers.get('etag')).not.toBe(tag);
});

test('GET days of a quantity beside flow is in the unit it is shown in: 1 ft is 0.3048 m, 1 in is 25.4 mm', async () => {
  await importFiles([
    [{ code: 'A', values: [1], quantity: 'stage', unit: 'ft' }],
    [{ code: 'A', values: [2], quantity: 'rainfall', unit: 'in' }],
  ]);
  const at = 'first=1970-01-01&last=1970-01-01';
  expect(await (await days(`${at}&quantity=stage`)).json()).toMatchObject({ unit: 'm', values: [0.3048] });
  expect(await (await days(`${at}&quantity=rainfall`)).json()).toMatchObject({ unit: 'mm', values: [50.8] });
  expect((await problemOf(await days(at), 404)).detail).toBe('A has no daily flow.');
});

test('stationDays() tells the code of the part whose value stands, also where parts come in unlike units', async () => {
  const { regionId } = await importFiles([
    [{ code: 'A', values: [1, 2, 3], codes: ['e', 'e', 'e'] }],
    // 1,000 L/s are 1 m³/s: the record goes on in the unit of its first part
    [{ code: 'A', firstDay: 3, values: [1000, 5000], codes: ['P', 'Ice'], unit: 'L/s' }],
  ]);
  const [{ id }] = await listStations(regionId);
  const found = stationDays({ stationId: id, quantity: 'flow', first: 0, last: 9 });
  expect([...found!.values]).toEqual([1, 2, 3, 1, 5]);
  expect(found!.texts).toEqual(['e', 'e', 'e', 'P', 'Ice']);
});

test.each([
  ['first=1970-01-02&last=1970-01-01', /must not come before/],
  ['first=1900-01-01&last=2010-01-01', /more than 100 years/],
  ['first=1970-02-30&last=1970-03-01', /must be a day that exists/],
  ['first=1970-01-01', /"last"/],
  ['first=1970-01-01&last=1970-01-02&until=3', /Unknown parameter "until"/],
])('GET days?%s is refused with the reason', async (query, reason) => {
  await importFiles([[{ code: 'A', values: [1] }]]);
  expect((await problemOf(await days(query), 400)).detail).toMatch(reason);
});
