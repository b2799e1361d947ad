import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { GET as periods } from '../../../app/api/regions/[region]/common-periods/route.ts';
import { GET as ranking } from '../../../app/api/regions/[region]/ranking/route.ts';
import { GET as records } from '../../../app/api/regions/[region]/records/route.ts';
import { GET as coverage } from '../../../app/api/regions/[region]/stations/[code]/coverage/route.ts';
import type { CommonPeriods, RegionRecords } from '../../../lib/jobs/records-types.ts';
import { addMark, removeMark } from '../../../lib/store/marks.ts';
import { listStations } from '../../../lib/store/stations.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

const place = importedRegion();

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe';
const get = (query: string) => call(records, `${url}/records${query}`, params);
const rowsOf = async (response: Response) =>
  parse(await response.text(), { columns: true }) as Record<string, string>[];

test('GET records answers all stations by all years in columns, with what stands at the head of each', async () => {
  const found: RegionRecords = await (await get('?yearStart=1')).json();
  expect(found).toMatchObject({ firstYear: 1980, lastYear: 2009, basis: { yearStart: 1, period: [1980, 2009] } });
  expect(found.yearDays.slice(0, 3)).toEqual([366, 365, 365]);
  expect(found.stations.map(({ code }) => code)).toEqual(['A1', 'B2', 'C3', 'D4']);
  const [first] = found.stations;
  expect(first).toMatchObject({ name: 'Alder Mill', river: 'Wethe', areaKm2: 120, firstYear: 1980 });
  expect(first).toMatchObject({ quantities: ['flow'], first: '1980-01-01', last: '2009-12-31', valueCount: 10958 });
  expect(first.values).toEqual(found.yearDays);
  expect(first.missing).toEqual(new Array(30).fill(0));
  expect(first.usable).toEqual(new Array(30).fill(1));
  expect(first.reason).toEqual(new Array(30).fill(-1));
});

test('GET records agrees with the coverage of each station, days rejected by a person included', async () => {
  const { id } = (await listStations(place.region.id)).find(({ code }) => code === 'C3')!;
  const mark = await addMark({ stationId: id, firstDay: 8000, lastDay: 8039, kind: 'reject', reason: 'weir drowned' });
  try {
    const found: RegionRecords = await (await get('')).json();
    const station = found.stations.find(({ code }) => code === 'C3')!;
    const { years } = await (await call(coverage, `${url}/stations/C3/coverage`, { ...params, code: 'C3' })).json();
    expect(station.missing).toEqual(years.map((year: { missingDays: number }) => year.missingDays));
    expect(station.reason.map((at) => found.reasons[at] ?? '')).toEqual(
      years.map((year: { reason: string }) => year.reason),
    );
    const rejected = years.map((year: { flagged: { rejected: number } }) => year.flagged.rejected);
    expect(station.flagged.rejected).toEqual(rejected);
    expect(rejected.reduce((sum: number, days: number) => sum + days, 0)).toBe(40);
    expect(station.usable.filter((usable) => usable === 0).length).toBeGreaterThan(0);
  } finally {
    await removeMark(mark.id);
  }
});

test('GET records?format=csv is a row for every year of every station', async () => {
  const response = await get('?yearStart=1&format=csv');
  expect(response.headers.get('content-disposition')).toContain('upper-wethe-records.csv');
  const rows = await rowsOf(response);
  expect(rows).toHaveLength(4 * 30);
  expect(rows[0]).toEqual({
    ...{
      station_code: 'A1',
      year: '1980',
      days: '366',
      value_days: '366',
      missing_days: '0',
      usable: 'true',
      reason: '',
    },
    ...{ provisional_days: '0', estimated_days: '0', ice_days: '0', below_detection_days: '0' },
    ...{ suspect_days: expect.any(String), rejected_days: '0' },
  });
});

test('records and common periods have entity tags that change with the basis, and answer 304 to who has them', async () => {
  for (const [handler, path] of [
    [records, 'records'],
    [periods, 'common-periods'],
  ] as const) {
    const first = await call(handler, `${url}/${path}`, params);
    const headers = { 'if-none-match': first.headers.get('etag')! };
    expect((await call(handler, `${url}/${path}`, params, { headers })).status).toBe(304);
    for (const query of ['days=30', 'minYears=10', 'format=csv']) {
      const other = await call(handler, `${url}/${path}?${query}`, params, { headers });
      expect([path, query, other.status]).toEqual([path, query, 200]);
    }
    await problemOf(await call(handler, `${url}/${path}?format=xml`, params), 400);
    await problemOf(await call(handler, `${url}/${path}?day=7`, params), 400);
  }
});

test('GET common-periods counts the stations of every period, and names the one that the ranking is over', async () => {
  const found: CommonPeriods = await (await call(periods, `${url}/common-periods`, params)).json();
  const { basis, counts } = await (await call(ranking, `${url}/ranking`, params)).json();
  expect(found.stations).toBe(4);
  expect(found.common).toEqual(basis.period);
  expect(found.basis).toEqual(basis);
  const [first, last] = found.common!;
  const years = found.lastYear! - found.firstYear! + 1;
  expect(found.ranked).toHaveLength(years * years);
  expect(found.ranked[(first - found.firstYear!) * years + last - found.firstYear!]).toBe(counts.ranked);
  const rows = await rowsOf(await call(periods, `${url}/common-periods?format=csv`, params));
  const longEnough = years - found.basis.minYears + 1;
  expect(rows).toHaveLength((longEnough * (longEnough + 1)) / 2);
  expect(rows.find((row) => row.first_year === String(first) && row.last_year === String(last))).toEqual({
    ...{ first_year: String(first), last_year: String(last), years: String(last - first + 1) },
    ...{ stations_ranked: String(counts.ranked), stations_complete: String(counts.ranked) },
  });
});
