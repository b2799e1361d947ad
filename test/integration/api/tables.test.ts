import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { GET as curves } from '../../../app/api/regions/[region]/curves/route.ts';
import { GET as layer } from '../../../app/api/regions/[region]/layers/[layer]/route.ts';
import { GET as layers } from '../../../app/api/regions/[region]/layers/route.ts';
import { GET as minima } from '../../../app/api/regions/[region]/minima/route.ts';
import { GET as ranking } from '../../../app/api/regions/[region]/ranking/route.ts';
import { GET as coverage } from '../../../app/api/regions/[region]/stations/[code]/coverage/route.ts';
import { GET as stationCurve } from '../../../app/api/regions/[region]/stations/[code]/curve/route.ts';
import { GET as stationMinima } from '../../../app/api/regions/[region]/stations/[code]/minima/route.ts';
import { GET as station } from '../../../app/api/regions/[region]/stations/[code]/route.ts';
import { GET as stations } from '../../../app/api/regions/[region]/stations/route.ts';
import { rankingCsv } from '../../../lib/export/ranking-csv.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

const place = importedRegion();

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe';
const rowsOf = async (response: Response) =>
  parse(await response.text(), { columns: true }) as Record<string, string>[];

test('GET ranking?format=csv is the ranking file, to be saved, with its metadata named beside it', async () => {
  const response = await call(ranking, `${url}/ranking?format=csv&spans=none`, params);
  expect(response.status).toBe(200);
  expect(response.headers.get('content-type')).toMatch(/^text\/csv/);
  expect(response.headers.get('content-disposition')).toContain('upper-wethe-ranking.csv');
  expect(response.headers.get('link')).toBe(
    '</api/regions/upper-wethe/ranking?format=metadata&spans=none>; rel="describedby"; type="application/csvm+json"',
  );
  expect(await response.text()).toBe(rankingCsv((await rankingOf(place.region, place.region.basis)).ranking.rows));
});

test('GET ranking?format=metadata describes that file', async () => {
  const response = await call(ranking, `${url}/ranking?format=metadata&days=30`, params);
  expect(response.headers.get('content-type')).toBe('application/csvm+json');
  const metadata = await response.json();
  expect(metadata.url).toBe('upper-wethe-ranking.csv');
  expect(metadata.notes[0].basis.days).toBe(30);
  expect(metadata.notes[0].dataHash).toMatch(/^[0-9a-f]{64}$/);
});

test('GET ranking narrowed by codes or bounds leaves rows out and no figure changed', async () => {
  const whole = await rowsOf(await call(ranking, `${url}/ranking?format=csv`, params));
  const byCode = await rowsOf(await call(ranking, `${url}/ranking?format=csv&stations=B2,C3`, params));
  expect(byCode).toEqual(whole.filter((row) => ['B2', 'C3'].includes(row.station_code)));
  const byPlace = await rowsOf(await call(ranking, `${url}/ranking?format=csv&in=7.05,50,7.25,51`, params));
  expect(byPlace).toEqual(whole.filter((row) => ['A1', 'B2'].includes(row.station_code)));
});

test('GET ranking under a basis in the query computes under it', async () => {
  const response = await call(ranking, `${url}/ranking?minYears=40`, params);
  const { counts, basis, basisSentence } = await response.json();
  expect(counts).toMatchObject({ stations: 4, ranked: 0, unranked: 4 });
  expect(basis.minYears).toBe(40);
  expect(basisSentence).toContain('at least 40 usable years');
});

test('a table has an entity tag that changes with what it shows, and answers 304 to who has it', async () => {
  const first = await call(ranking, `${url}/ranking?format=csv`, params);
  const etag = first.headers.get('etag')!;
  const again = await call(ranking, `${url}/ranking?format=csv`, params, {
    headers: { 'if-none-match': `W/${etag}, "x"` },
  });
  expect(again.status).toBe(304);
  expect(await again.text()).toBe('');
  for (const query of ['format=json', 'format=csv&days=30', 'format=csv&stations=A1']) {
    const other = await call(ranking, `${url}/ranking?${query}`, params, { headers: { 'if-none-match': etag } });
    expect([query, other.status]).toEqual([query, 200]);
  }
});

test('a bad basis, an unknown parameter and an unknown region are refused by name', async () => {
  const bad = await problemOf(await call(ranking, `${url}/ranking?days=seven`, params), 400);
  expect(bad).toMatchObject({ type: 'urn:hungerstone:problem:bad-basis' });
  expect(bad.detail).toContain('"days"');
  const unknown = await problemOf(await call(ranking, `${url}/ranking?day=30`, params), 400);
  expect(unknown.detail).toContain('"day"');
  const format = await problemOf(await call(ranking, `${url}/ranking?format=xls`, params), 400);
  expect(format.detail).toContain('format');
  const bounds = await problemOf(await call(ranking, `${url}/ranking?in=1,2,3`, params), 400);
  expect(bounds.detail).toContain('west,south,east,north');
  const nowhere = await problemOf(await call(ranking, '/api/regions/nowhere/ranking', { region: 'nowhere' }), 404);
  expect(nowhere.detail).toContain('nowhere');
});

test('GET minima lists every year of every station', async () => {
  const rows = await rowsOf(await call(minima, `${url}/minima?format=csv&yearStart=1`, params));
  expect(rows).toHaveLength(4 * 30);
  expect(rows[0]).toMatchObject({ station_code: 'A1', year: '1980', usable: 'true', missing_days: '0', reason: '' });
  const one = await rowsOf(
    await call(stationMinima, `${url}/stations/B2/minima?format=csv&yearStart=1`, { ...params, code: 'B2' }),
  );
  expect(one).toEqual(rows.filter((row) => row.station_code === 'B2'));
});

test('GET curves answers the scale asked for and names who has none', async () => {
  const byArea = await (await call(curves, `${url}/curves`, params)).json();
  expect(byArea.unit).toBe('L/s/km²');
  expect(byArea.left_out).toEqual([{ station_code: 'D4', reason: expect.stringContaining('drainage area') }]);
  const ratios = await rowsOf(await call(curves, `${url}/curves?format=csv&normalise=mean&kind=median-annual`, params));
  expect(new Set(ratios.map(({ unit }) => unit))).toEqual(new Set(['1']));
  const one = await (await call(stationCurve, `${url}/stations/A1/curve`, { ...params, code: 'A1' })).json();
  expect(one.curves).toEqual(byArea.curves.slice(0, 1));
  expect(one.band).toEqual(byArea.band);
});

test('GET stations is GeoJSON unless asked otherwise', async () => {
  const response = await call(stations, `${url}/stations`, params);
  expect(response.headers.get('content-type')).toBe('application/geo+json');
  const { features } = await response.json();
  expect(features).toHaveLength(4);
  expect(features[0]).toMatchObject({ geometry: { type: 'Point', coordinates: [7.1, 50.1] } });
  const rows = await rowsOf(await call(stations, `${url}/stations?format=csv&stations=D4`, params));
  expect(rows).toEqual([expect.objectContaining({ station_code: 'D4', drainage_area_km2: '' })]);
});

test('GET a station answers its page, and a problem for one that is not there', async () => {
  const detail = await (await call(station, `${url}/stations/A1`, { ...params, code: 'A1' })).json();
  expect(detail.verdict).toMatch(/^Falling/);
  expect(detail.minima.years[0]).toBe(1979);
  await problemOf(await call(station, `${url}/stations/Z9`, { ...params, code: 'Z9' }), 404);
  await problemOf(await call(stationMinima, `${url}/stations/Z9/minima`, { ...params, code: 'Z9' }), 404);
});

test('GET coverage answers how complete each year is', async () => {
  const context = { ...params, code: 'A1' };
  const json = await (await call(coverage, `${url}/stations/A1/coverage?yearStart=1`, context)).json();
  expect(json.years).toHaveLength(30);
  const rows = await rowsOf(await call(coverage, `${url}/stations/A1/coverage?yearStart=1&format=csv`, context));
  expect(rows[4]).toMatchObject({
    year: '1984',
    state: 'usable',
    days: '366',
    missing_days: '0',
    below_detection_days: '0',
  });
});

test('GET layers lists them, and GET a layer answers its GeoJSON', async () => {
  const [{ id, name }] = await (await call(layers, `${url}/layers`, params)).json();
  expect(name).toBe('rivers');
  const shape = await (await call(layer, `${url}/layers/${id}`, { ...params, layer: String(id) })).json();
  expect(shape.features).toHaveLength(1);
  await problemOf(await call(layer, `${url}/layers/999`, { ...params, layer: '999' }), 404);
  await problemOf(await call(layer, `${url}/layers/x`, { ...params, layer: 'x' }), 404);
});
