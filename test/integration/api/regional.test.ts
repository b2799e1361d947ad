import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { GET as regional } from '../../../app/api/regions/[region]/regional/route.ts';
import { forgetResults } from '../../../lib/jobs/cached.ts';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import type { RegionalAnswers } from '../../../lib/region/regional-types.ts';
import { call, problemOf } from './call.ts';
import { importedRegion } from './imported-region.ts';

const place = importedRegion();

const params = { region: 'upper-wethe' };
const url = '/api/regions/upper-wethe/regional';
const answersOf = async (query = '') =>
  (await (await call(regional, `${url}${query}`, params)).json()) as RegionalAnswers & { basisSentence: string };

test('GET regional counts the stations that fall and rise beside chance, of every group and set', async () => {
  const answers = await answersOf();
  const { ranking } = await rankingOf(place.region, place.region.basis);
  expect(answers).toMatchObject({ method: 'permutation', replicates: 10_000, refused: null });
  expect(answers.basisSentence).toMatch(/^Comparing 7-day minima/);
  const [all] = answers.groups;
  expect(all).toMatchObject({ id: 'all', set: 'all', ranked: ranking.counts.ranked });
  const falling = ranking.rows.filter(({ rank, p, z }) => rank !== null && p! < 0.1 && z! < 0);
  expect(all.falling!.count).toBe(falling.length);
  expect(all.falling!.bound).toBeGreaterThanOrEqual(0);
  expect(all.sentences.chance).toContain(`of ${all.ranked} stations`);
  expect(answers.groups.every(({ codes, ranked }) => codes.length === ranked)).toBe(true);
});

test('GET regional has an independent set beside every group, and names the pairs that share water', async () => {
  const { groups, pairs } = await answersOf();
  expect(groups.map(({ set }) => set)).toEqual(groups.map((_, i) => (i % 2 === 0 ? 'all' : 'independent')));
  // Wethe at A1 has 120 of the 340 km² at B2: not more than half
  expect(pairs).toEqual([]);
  expect(groups[1].codes).toEqual(groups[0].codes);
});

test('GET regional?area= answers the stations of an area too, the same whether chance was kept or not', async () => {
  const area = '?area=7.05,50.05;7.25,50.05;7.25,50.25;7.05,50.25';
  const answers = await answersOf(area);
  const drawn = answers.groups.find(({ id }) => id === 'drawn')!;
  expect([...drawn.codes].sort()).toEqual(['A1', 'B2']);
  await forgetResults();
  expect(await answersOf(area)).toEqual(answers);
});

test('GET regional?method=sieve tries chance with carry-over', async () => {
  const answers = await answersOf('?method=sieve');
  expect(answers).toMatchObject({ method: 'sieve', replicates: 1000 });
  expect(answers.groups[0].falling!.expected).toBeGreaterThan(0);
  expect((await answersOf('?method=sieve&minYears=40')).groups[0].ranked).toBe(0);
});

test('GET regional?format=csv is a row a group and set, with its metadata', async () => {
  const response = await call(regional, `${url}?format=csv`, params);
  expect(response.headers.get('content-disposition')).toContain('upper-wethe-regional.csv');
  const rows = parse(await response.text(), { columns: true }) as Record<string, string>[];
  const { groups } = await answersOf();
  expect(rows.map((row) => [row.group, row.set, Number(row.ranked)])).toEqual(
    groups.map(({ id, set, ranked }) => [id, set, ranked]),
  );
  expect(rows[0].sentence_chance).toBe(groups[0].sentences.chance);
  expect(rows[0].falling_p).toBe(String(groups[0].falling!.p.toPrecision(10)).replace(/0+$/, ''));
  const metadata = await (await call(regional, `${url}?format=metadata`, params)).json();
  expect(metadata.tableSchema.columns.map(({ name }: { name: string }) => name)).toEqual(Object.keys(rows[0]));
});

test('GET regional answers 304 to who has it, and a region without ranked stations in words', async () => {
  const first = await call(regional, url, params);
  const again = await call(regional, url, params, { headers: { 'if-none-match': first.headers.get('etag')! } });
  expect(again.status).toBe(304);
  const none = await answersOf('?minYears=40');
  expect(none.groups).toHaveLength(2);
  expect(none.groups[0].sentences.chance).toBe(
    'None of the stations is ranked, so nothing can be said of them together.',
  );
});

test('GET regional refuses an area and a method that cannot be read, by name', async () => {
  const refused = async (query: string) =>
    (await problemOf(await call(regional, `${url}${query}`, params), 400)).detail;
  expect(await refused('?area=1,2;3,4')).toBe('"area": an area has 3 to 60 corners, this one has 2.');
  expect(await refused('?area=1,2;3,x;5,6')).toBe(
    '"area": corner 2 of the area must be longitude,latitude in degrees, not "3,x".',
  );
  expect(await refused('?method=guess')).toContain('"method"');
  expect(await refused('?format=geojson')).toContain('"format"');
});
