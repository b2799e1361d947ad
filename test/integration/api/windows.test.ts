import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { GET as alternatives } from '../../../app/api/regions/[region]/alternatives/route.ts';
import { GET as breaks } from '../../../app/api/regions/[region]/breaks/route.ts';
import { GET as movement } from '../../../app/api/regions/[region]/movement/route.ts';
import { GET as startEnd } from '../../../app/api/regions/[region]/start-end/route.ts';
import { GET as stationBreaks } from '../../../app/api/regions/[region]/stations/[code]/breaks/route.ts';
import { GET as stationStartEnd } from '../../../app/api/regions/[region]/stations/[code]/start-end/route.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import type { StepTest } from '../../../lib/region/break-types.ts';
import type { OnTheWire, StartEnd } from '../../../lib/region/window-types.ts';
import { editStation } from '../../../lib/store/station-edit.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

const place = importedRegion();

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe';
const rowsOf = async (response: Response) =>
  parse(await response.text(), { columns: true }) as Record<string, string>[];
const ranking = async () => (await rankingOf(place.region, place.region.basis)).ranking;

test('GET stations/{code}/start-end: the cell of the whole period has the ranking’s figures to 4 digits', async () => {
  const response = await call(stationStartEnd, `${url}/stations/B2/start-end`, { ...params, code: 'B2' });
  const chart = (await response.json()) as OnTheWire<StartEnd> & { station_code: string; slopeUnit: string };
  const row = (await ranking()).rows.find(({ code }) => code === 'B2')!;
  const whole = chart.ends.length - 1;
  expect(chart).toMatchObject({ station_code: 'B2', slopeUnit: 'm³/s', steadiness: row.steadiness });
  expect(chart.z[whole]).toBeCloseTo(row.z!, 3);
  expect(chart.z.length).toBe(chart.starts.length * chart.ends.length);
  expect(chart.z.filter((z) => z !== null).length).toBe(chart.windows);
  for (const z of chart.z) expect(z === null || z === Number(z.toPrecision(4))).toBe(true);
});

test('GET stations/{code}/start-end?format=csv has a row a window; its metadata names the columns', async () => {
  const at = `${url}/stations/B2/start-end`;
  const rows = await rowsOf(await call(stationStartEnd, `${at}?format=csv`, { ...params, code: 'B2' }));
  const row = (await ranking()).rows.find(({ code }) => code === 'B2')!;
  const [whole] = rows.filter((each) => Number(each.years_used) === row.yearsUsed);
  expect(Number(whole.z)).toBeCloseTo(row.z!, 5);
  expect(Number(whole.slope_percent_per_decade)).toBeCloseTo(row.percentPerDecade!, 4);
  expect(rows.every((each) => Number(each.years_used) >= 15)).toBe(true);
  const response = await call(stationStartEnd, `${at}?format=metadata`, { ...params, code: 'B2' });
  const { tableSchema } = await response.json();
  expect(tableSchema.columns.map(({ name }: { name: string }) => name)).toEqual(Object.keys(whole));
  expect(whole.slope_unit).toBe('m³/s');
});

test('GET stations/{code}/start-end refuses a format and a station that there are not', async () => {
  const at = `${url}/stations/B2/start-end?format=geojson`;
  const { detail } = await problemOf(await call(stationStartEnd, at, { ...params, code: 'B2' }), 400);
  expect(detail).toContain('format');
  const nobody = await call(stationStartEnd, `${url}/stations/Q/start-end`, { ...params, code: 'Q' });
  expect((await problemOf(nobody, 404)).detail).toContain('no station "Q"');
});

test('GET movement without other terms is against the region’s own: nobody has moved', async () => {
  const { movements, tau, rankedBoth, againstSentence, basisSentence } = await (
    await call(movement, `${url}/movement`, params)
  ).json();
  const { counts } = await ranking();
  expect([rankedBoth, tau, againstSentence]).toEqual([counts.ranked, 1, basisSentence]);
  expect(movements.every(({ moved }: { moved: number }) => moved === 0)).toBe(true);
});

test('GET movement: places of both rankings, the other terms from the address', async () => {
  const here = await rankingOf(place.region, { ...place.region.basis, days: 60 });
  const there = await rankingOf(place.region, { ...place.region.basis, rankBy: 'kendall-tau' });
  const at = `${url}/movement?days=60&format=csv&against=${encodeURIComponent('rankBy=kendall-tau')}`;
  const rows = await rowsOf(await call(movement, at, params));
  const placeIn = (rows: { code: string; rank: number | null }[], code: string) =>
    String(rows.find((row) => row.code === code)?.rank ?? '');
  for (const row of rows) {
    expect(row.rank_after).toBe(placeIn(here.ranking.rows, row.station_code));
    expect(row.rank_before).toBe(placeIn(there.ranking.rows, row.station_code));
  }
  expect(rows.length).toBe(here.ranking.counts.ranked);
});

test('GET movement refuses other terms that are none, and a value that cannot be used', async () => {
  const answer = async (against: string) =>
    problemOf(await call(movement, `${url}/movement?against=${encodeURIComponent(against)}`, params), 400);
  expect(await answer('day=7')).toMatchObject({
    status: 400,
    detail: expect.stringContaining('"against" names "day"'),
  });
  expect(await answer('days=0')).toMatchObject({ detail: expect.stringContaining('"days"') });
});

test('GET alternatives: each choice has the counts of the ranking that its change asks for', async () => {
  const { alternatives: list } = await (await call(alternatives, `${url}/alternatives`, params)).json();
  const current = list.filter((each: { current: boolean }) => each.current);
  expect(current.map(({ term }: { term: string }) => term)).toEqual([
    'days',
    'yearStart',
    'season',
    'period',
    'serialCorrection',
  ]);
  const thirty = list.find(({ change }: { change: { days?: string } }) => change.days === '30');
  const { ranking: there } = await rankingOf(place.region, { ...place.region.basis, days: 30 });
  const { ranked, falling, rising } = there.counts;
  expect(thirty).toMatchObject({ label: '30-day minima', ranked, falling, rising, problem: null });
}, 60_000);

test('GET alternatives?format=csv holds the same list', async () => {
  const rows = await rowsOf(await call(alternatives, `${url}/alternatives?format=csv`, params));
  expect(rows.find(({ choice }) => choice === '30-day minima')).toMatchObject({ change: 'days=30', current: 'false' });
}, 60_000);

test('GET start-end: counts of the region, the whole period as the ranking’s rows say', async () => {
  const chart = await (await call(startEnd, `${url}/start-end`, params)).json();
  const rows = (await ranking()).rows.filter(({ rank }) => rank !== null);
  const { alpha } = place.region.basis;
  const whole = chart.ends.length - 1;
  expect(rows.length).toBeGreaterThan(0);
  expect(chart.stations[whole]).toBe(rows.length);
  expect(chart.negative[whole]).toBe(rows.filter(({ tau }) => tau! < 0).length);
  expect(chart.falling[whole]).toBe(rows.filter(({ p, z }) => p! < alpha && z! < 0).length);
  const csv = await rowsOf(await call(startEnd, `${url}/start-end?format=csv`, params));
  const last = csv.find((row) => row.last_year === String(chart.ends[whole]))!;
  expect([last.first_year, last.stations]).toEqual([String(chart.starts[0]), String(rows.length)]);
});

test('GET stations/{code}/breaks: a chosen break with both sides, and what the figures suggest', async () => {
  const { rows, basis } = await ranking();
  const row = rows.find(({ rank }) => rank !== null)!;
  const middle = row.years[row.years.length >> 1];
  const at = `${url}/stations/${row.code}/breaks?breaks=${middle}`;
  const answer = await (await call(stationBreaks, at, { ...params, code: row.code })).json();
  const [step] = answer.steps;
  expect(answer).toMatchObject({ code: row.code, tested: '7-day minima', unit: 'm³/s', problem: null });
  expect([step.break.year, step.before.years + step.after.years]).toEqual([middle, row.yearsUsed]);
  expect(step.before.first).toBe(basis.period![0]);
  expect(answer.suggested.words).toContain('Not tested');
});

test('GET stations/{code}/breaks takes the station’s own dated changes unless said, and so does the region', async () => {
  const { rows, basis } = await ranking();
  const row = rows.find(({ rank }) => rank !== null)!;
  const year = row.years[10];
  const date = `${year}-${String(basis.yearStart).padStart(2, '0')}-15`;
  const changes = [{ date, kind: 'dam' as const, note: 'an invented dam' }];
  await editStation(place.region.id, row.code, { changes });
  const own = await (
    await call(stationBreaks, `${url}/stations/${row.code}/breaks`, { ...params, code: row.code })
  ).json();
  expect(own.steps.map((step: StepTest) => [step.break.year, step.break.words])).toEqual([
    [year + 1, `dam, ${date}: an invented dam`],
  ]);
  const all = await (await call(breaks, `${url}/breaks`, params)).json();
  expect(all.stations.map(({ code }: { code: string }) => code)).toEqual([row.code]);
  expect(all.summary).toMatchObject([{ label: 'dam', tested: 1 }]);
  const csv = await rowsOf(await call(breaks, `${url}/breaks?format=csv`, params));
  expect(csv).toMatchObject([{ station_code: row.code, break_year: String(year + 1), break_from: 'change' }]);
});

test('GET breaks: a chosen break at every ranked station, with p adjusted over the table', async () => {
  const { rows } = await ranking();
  const ranked = rows.filter(({ rank }) => rank !== null);
  const year = ranked[0].years[15];
  const all = await (await call(breaks, `${url}/breaks?breaks=${year}`, params)).json();
  expect(all.stations.length).toBe(ranked.length);
  for (const { steps } of all.stations) expect(steps[0].pAdjusted).toBeGreaterThanOrEqual(steps[0].p);
  expect(all.summary[0].tested).toBe(ranked.length);
  const metadata = await (await call(breaks, `${url}/breaks?breaks=${year}&format=metadata`, params)).json();
  expect(metadata.url).toBe('upper-wethe-breaks.csv');
});

test('GET breaks refuses what is no list of breaks, with what would do', async () => {
  for (const text of ['seventy', '1975-1990', '']) {
    const problem = await problemOf(await call(breaks, `${url}/breaks?breaks=${text}`, params), 400);
    expect(JSON.stringify(problem)).toContain('first low-flow years after a break');
  }
});
