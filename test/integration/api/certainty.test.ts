import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { GET as certainty } from '../../../app/api/regions/[region]/certainty/route.ts';
import { GET as ranking } from '../../../app/api/regions/[region]/ranking/route.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import type { Certainty } from '../../../lib/region/certainty-types.ts';
import { openConnection } from '../../../lib/store/connection.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

importedRegion();

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe';
const answerOf = async (query = '') =>
  (await (await call(certainty, `${url}/certainty${query}`, params)).json()) as Certainty;
const rowsOf = async (query: string) =>
  parse(await (await call(ranking, `${url}/ranking?format=csv${query}`, params)).text(), {
    columns: true,
  }) as Record<string, string>[];

test('GET certainty says how sure every ranked place is, the same whenever it is computed', async () => {
  const answer = await answerOf();
  expect(answer).toMatchObject({ replicates: 500, toldApart: expect.any(Boolean) });
  expect(answer.spans.length).toBeGreaterThan(2);
  for (const { rankLow, rankHigh, amongSteepest } of answer.spans) {
    expect(rankLow).toBeGreaterThanOrEqual(1);
    expect(rankHigh).toBeLessThanOrEqual(answer.spans.length);
    expect(amongSteepest).toHaveLength(answer.spans.length);
  }
  expect(answer.detectable.every(({ perDecade }) => perDecade === null || perDecade > 0)).toBe(true);
  await forgetResults();
  const connection = openConnection();
  connection.exec('DELETE FROM Result');
  connection.close();
  expect(await answerOf()).toEqual(answer);
});

test('GET ranking carries the spans and the chance for the k asked for, or leaves them out', async () => {
  const { spans, detectable } = await answerOf();
  const rows = await rowsOf('&k=2');
  for (const row of rows.filter(({ rank }) => rank !== '')) {
    const span = spans.find(({ code }) => code === row.station_code)!;
    expect([row.rank_low, row.rank_high]).toEqual([String(span.rankLow), String(span.rankHigh)]);
    expect(row.steepest_k).toBe('2');
    expect(Number(row.probability_among_steepest)).toBeCloseTo(span.amongSteepest[1], 9);
    const shown = detectable.find(({ code }) => code === row.station_code)!;
    expect(Number(row.detectable_percent_per_decade)).toBeCloseTo(shown.percentPerDecade!, 6);
  }
  expect((await rowsOf('&spans=none'))[0]).toMatchObject({ rank: '1', rank_low: '', steepest_k: '' });
  const geojson = await (await call(ranking, `${url}/ranking?format=geojson`, params)).json();
  const [feature] = geojson.features;
  expect(feature.properties).toMatchObject({ rank_low: spans[0].rankLow, steepest_k: 5 });
});

test('GET certainty?format=csv is the table at one k, with its columns described', async () => {
  const { spans } = await answerOf();
  const response = await call(certainty, `${url}/certainty?format=csv&k=1`, params);
  expect(response.headers.get('content-disposition')).toContain('upper-wethe-certainty.csv');
  const rows = parse(await response.text(), { columns: true }) as Record<string, string>[];
  expect(rows[0]).toMatchObject({ station_code: spans[0].code, steepest_k: '1', rank_low: String(spans[0].rankLow) });
  const metadata = await (await call(certainty, `${url}/certainty?format=metadata`, params)).json();
  expect(metadata.tableSchema.columns.map(({ name }: { name: string }) => name)).toEqual(Object.keys(rows[0]));
});

test('GET certainty and ranking refuse what cannot be asked', async () => {
  for (const k of ['0', '51', 'two', '1.5']) {
    const problem = await problemOf(await call(certainty, `${url}/certainty?k=${k}`, params), 400);
    expect(problem.detail).toContain('"k"');
  }
  await problemOf(await call(ranking, `${url}/ranking?spans=95`, params), 400);
  await problemOf(await call(certainty, `${url}/certainty?wait=maybe`, params), 400);
  await problemOf(await call(certainty, '/api/regions/nowhere/certainty', { region: 'nowhere' }), 404);
});

test('GET certainty of a region without a ranked station is empty', async () => {
  expect(await answerOf('?minYears=90')).toMatchObject({ spans: [], detectable: [] });
});
