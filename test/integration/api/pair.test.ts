import { basename } from 'node:path';
import { parse } from 'csv-parse/sync';
import { beforeAll, expect, test } from 'vitest';
import { GET as pair } from '../../../app/api/regions/[region]/stations/[code]/pair/route.ts';
import { GET as references } from '../../../app/api/regions/[region]/stations/[code]/references/route.ts';
import { GET as weather } from '../../../app/api/regions/[region]/stations/[code]/weather/route.ts';
import { INDICES } from '../../../lib/basis.ts';
import { dayNumber, isoDate } from '../../../lib/calendar/day.ts';
import { PAIR_COLUMNS } from '../../../lib/export/pair-csv.ts';
import { WEATHER_COLUMNS } from '../../../lib/export/weather-csv.ts';
import { launchImport } from '../../../lib/jobs/import-job.ts';
import { addStation, editStation } from '../../../lib/store/station-edit.ts';
import { runCommand } from '../cli/run-command.ts';
import { sampleFiles } from '../jobs/sample-files.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

const place = importedRegion();

const of = (code: string) => ({ region: 'upper-wethe', code });
const url = (code: string, rest: string) => `/api/regions/upper-wethe/stations/${code}/${rest}`;
const rowsOf = (text: string) => parse(text, { columns: true }) as Record<string, string>[];

beforeAll(async () => {
  for (const code of ['C3', 'D4']) await editStation(place.region.id, code, { influence: 'natural' });
  await editStation(place.region.id, 'B2', { influence: 'regulated' });
  await addStation(place.region.id, { code: 'E5', name: 'Elm Bridge' });
});

/** Rain at C3, a little different every year. */
async function importRain(): Promise<void> {
  const rows: string[] = [];
  for (let day = dayNumber(1979, 1, 1); day <= dayNumber(2009, 12, 31); day += 1) {
    const year = Math.floor((day - dayNumber(1979, 1, 1)) / 365.25);
    rows.push(`C3,${isoDate(day)},${(1.5 + 0.1 * ((year * 7) % 5)).toFixed(1)}`);
  }
  const path = sampleFiles(`${place.folder}/rain`).write('rain.csv', `station,date,depth\n${rows.join('\n')}\n`);
  const files = [{ path, name: basename(path) }];
  const mapping = { quantity: 'rainfall' as const, unit: 'mm' as const, value: { column: 'depth' } };
  await (await launchImport({ region: { id: place.region.id }, files, choices: { all: { mapping } } })).result;
}

test('GET pair without references takes the natural stations, and finds the fall that is A1’s own', async () => {
  const response = await call(pair, url('A1', 'pair'), of('A1'));
  expect(response.status).toBe(200);
  const answer = await response.json();
  expect(new Set(answer.reference_codes)).toEqual(new Set(['C3', 'D4']));
  expect(answer.years).toHaveLength(answer.years.at(-1).year - answer.years[0].year + 1);
  expect(answer.trends.ratio.percent_per_decade).toBeLessThan(-10);
  expect(answer.trends.ratio.p_value).toBeLessThan(0.01);
  expect(answer.sentence).toMatch(/^Against the mean of (Cedar Weir|Dell Spring) and /);
  expect(answer.basisSentence).toMatch(/^Comparing 7-day minima/);
});

test('GET pair?format=csv has a row a common year, and its metadata describes every column and the outcome', async () => {
  const csv = await call(pair, url('A1', 'pair?with=C3&format=csv'), of('A1'));
  expect(csv.headers.get('content-disposition')).toContain('upper-wethe-A1-against-a-reference.csv');
  const rows = rowsOf(await csv.text());
  expect(Object.keys(rows[0])).toEqual(PAIR_COLUMNS.map(({ name }) => name));
  expect(rows[0]).toMatchObject({ station_code: 'A1', reference_codes: 'C3', index: 'minimum', index_unit: 'm³/s' });
  const mean = (name: string) => rows.reduce((sum, row) => sum + Number(row[name]), 0) / rows.length;
  // each is over its own mean, so that both sums come to the number of years
  expect(mean('reference')).toBeCloseTo(1, 8);
  expect(Number(rows.at(-1)?.station_sum)).toBeCloseTo(rows.length, 6);
  expect(Number(rows[3].ratio)).toBeCloseTo(
    Number(rows[3].index_value) / mean('index_value') / Number(rows[3].reference),
    8,
  );
  const metadata = await (await call(pair, url('A1', 'pair?with=C3&format=metadata'), of('A1'))).json();
  expect(metadata.tableSchema.columns).toHaveLength(PAIR_COLUMNS.length);
  expect(metadata.notes[1].trends.ratio.p_value).toBeLessThan(0.01);
});

test('GET pair?format=geojson has the stations with their part; the basis goes along', async () => {
  const answer = await (await call(pair, url('A1', 'pair?with=C3,D4&format=geojson&days=30'), of('A1'))).json();
  expect(answer.features.map(({ properties }: { properties: { part: string } }) => properties.part)).toEqual([
    'station',
    'reference',
    'reference',
  ]);
  expect(answer.basis.days).toBe(30);
});

test('GET pair answers 304 to its own ETag, and another one for other references', async () => {
  const first = await call(pair, url('A1', 'pair?with=C3'), of('A1'));
  const etag = first.headers.get('etag') ?? '';
  const again = await call(pair, url('A1', 'pair?with=C3'), of('A1'), { headers: { 'if-none-match': etag } });
  expect(again.status).toBe(304);
  expect((await call(pair, url('A1', 'pair?with=D4'), of('A1'))).headers.get('etag')).not.toBe(etag);
});

test('GET pair refuses the station itself, an unknown one, one twice, and none', async () => {
  const detailOf = async (rest: string) => (await problemOf(await call(pair, url('A1', rest), of('A1')), 400)).detail;
  expect(await detailOf('pair?with=A1')).toBe('"A1" cannot be its own reference: name other stations.');
  expect(await detailOf('pair?with=C3,Z9')).toBe('Upper Wethe has no station "Z9" to compare with.');
  expect(await detailOf('pair?with=C3,C3')).toBe('"C3" is named twice as reference: name it once.');
  expect(await detailOf('pair?with=')).toMatch(/name the references\.$/);
  await problemOf(await call(pair, url('Z9', 'pair?with=C3'), of('Z9')), 404);
});

test('GET pair says in words that a reference has no flow, and that too few years are shared', async () => {
  const empty = await (await call(pair, url('A1', 'pair?with=E5'), of('A1'))).json();
  expect(empty).toMatchObject({ years: [], trends: { ratio: null } });
  expect(empty.problem).toMatch(/^Elm Bridge has no usable year in /);
  const few = await (await call(pair, url('A1', 'pair?with=C3&period=1981-1982'), of('A1'))).json();
  expect(few.problem).toMatch(/have only 2 usable years .* in common in 1981–1982; 3 are needed/);
});

test.each(INDICES)('GET pair compares by %s, or says why not', async (index) => {
  const response = await call(pair, url('A1', `pair?with=C3&index=${index}`), of('A1'));
  expect(response.status).toBe(200);
  const text = await response.text();
  const answer = JSON.parse(text);
  expect(answer.basis.index).toBe(index);
  expect(answer.sentence).not.toMatch(/NaN|undefined|null|unknown amount/);
  // flows that never stop have no zero-flow days, and dates have no ratio
  if (index === 'minimum-date' || index === 'zero-flow-days') expect(answer.problem).toMatch(/\. Choose another /);
  else expect(answer.trends.ratio.p_value).toBeLessThan(1);
});

test('GET references lists natural stations with correlation, common years and distance', async () => {
  const answer = await (await call(references, url('A1', 'references'), of('A1'))).json();
  expect(answer.references.map((each: { station_code: string }) => each.station_code).sort()).toEqual(['C3', 'D4']);
  for (const each of answer.references) {
    expect(each.common_years).toBeGreaterThanOrEqual(20);
    expect(each.distance_km).toBeGreaterThan(20);
    expect(Math.abs(each.rank_correlation)).toBeLessThanOrEqual(1);
  }
});

test('GET weather says that the region holds none', async () => {
  const { detail } = await problemOf(await call(weather, url('A1', 'weather'), of('A1')), 404);
  expect(detail).toBe('Upper Wethe holds neither rainfall nor evaporation.');
});

test('GET weather takes the nearest record, and gives minima, weather and what is left of each year', async () => {
  await importRain();
  const answer = await (await call(weather, url('A1', 'weather?antecedentDays=100'), of('A1'))).json();
  expect(answer).toMatchObject({ quantity: 'rainfall', measured_at: 'C3', antecedent_days: 100, problem: null });
  for (const each of answer.years) {
    // 100 days of 1.5 to 1.9 mm
    expect(each.weather_mm).toBeGreaterThanOrEqual(150 - 1e-9);
    expect(each.weather_mm).toBeLessThanOrEqual(190 + 1e-9);
    expect(each.fitted_m3s + each.residual_m3s).toBeCloseTo(each.minimum_m3s, 10);
  }
  expect(answer.trends.given_weather.p_value).toBeLessThan(0.01);
  const csv = rowsOf(await (await call(weather, url('A1', 'weather?format=csv'), of('A1'))).text());
  expect(Object.keys(csv[0])).toEqual(WEATHER_COLUMNS.map(({ name }) => name));
  expect(csv[0]).toMatchObject({ station_code: 'A1', quantity: 'rainfall', measured_at: 'C3', antecedent_days: '180' });
});

test('GET weather refuses weather that is not stored and numbers of days that cannot be', async () => {
  const detailOf = async (rest: string) =>
    (await problemOf(await call(weather, url('A1', rest), of('A1')), 400)).detail;
  expect(await detailOf('weather?quantity=potential-evaporation')).toBe(
    'Upper Wethe holds no potential evaporation; it holds rainfall at C3.',
  );
  expect(await detailOf('weather?from=A1')).toBe('Upper Wethe holds no weather at "A1"; it holds rainfall at C3.');
  for (const days of ['0', '732', '1.5', 'x']) {
    expect(await detailOf(`weather?antecedentDays=${days}`)).toContain('antecedentDays');
  }
});

test('pair writes the comparison to stdout and what it came to to stderr', async () => {
  const { code, stdout, stderr } = await runCommand(
    'pair',
    '--region',
    'Upper Wethe',
    '--station',
    'A1',
    '--with',
    'C3',
  );
  expect(code).toBe(0);
  expect(stdout).toBe(await (await call(pair, url('A1', 'pair?with=C3&format=csv'), of('A1'))).text());
  expect(stderr).toMatch(/^Against Cedar Weir, the 7-day minimum of Alder Mill lost /m);
});

test('pair fails in words: no station, two, the station itself, an unknown one, no flow', async () => {
  const run = (...words: string[]) => runCommand('pair', '--region', 'Upper Wethe', ...words);
  expect(await run()).toMatchObject({ code: 2, stdout: '' });
  expect(await run('--station', 'A1', '--station', 'B2')).toMatchObject({ code: 2, stdout: '' });
  const itself = await run('--station', 'A1', '--with', 'A1');
  expect(itself).toMatchObject({ code: 1, stdout: '' });
  expect(itself.stderr).toContain('"A1" cannot be its own reference');
  expect((await run('--station', 'Z9')).stderr).toContain('no station "Z9"');
  const empty = await run('--station', 'A1', '--with', 'E5');
  expect(empty).toMatchObject({ code: 1, stdout: '' });
  expect(empty.stderr).toContain('Elm Bridge has no usable year');
});
