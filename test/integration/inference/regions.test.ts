import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { runCommand } from '../cli/run-command.ts';
import { codesOf, ODD_REGIONS, oddRegions } from './odd-regions.ts';
import {
  askRegion,
  askStation,
  expectSound,
  REGION_ROUTES,
  refusal,
  STATION_ROUTES,
  soundText,
} from './sound-answer.ts';

oddRegions();

const rowsOf = (csv: string) => parse(csv, { columns: true }) as Record<string, string>[];
const jsonOf = async (response: Response) => JSON.parse(await soundText(response, response.url));
const FORMATS = ['', 'format=csv', 'format=metadata'];

test.each(ODD_REGIONS)('every answer about the region "%s" is sound, in every form', async (slug) => {
  for (const route of REGION_ROUTES) {
    const more = { regional: ['method=sieve'], breaks: ['breaks=2005'] }[route as string] ?? [];
    for (const query of [...FORMATS, ...more, ...more.map((one) => `${one}&format=csv`)])
      await soundText(await askRegion(slug, route, `?${query}`), `${slug} ${route} ${query}`);
  }
});

test.each(ODD_REGIONS)('every answer about the stations of "%s" is sound, or says what is missing', async (slug) => {
  for (const code of codesOf(slug)) {
    for (const route of STATION_ROUTES) {
      for (const query of [...FORMATS, ...(route === 'breaks' ? ['breaks=2005', 'breaks=2005&format=csv'] : [])]) {
        const response = await askStation(slug, code, route, `?${query}`);
        const where = `${slug} ${code} ${route} ${query}`;
        if (route === 'weather' && response.status === 404)
          expect(await refusal(response, 404)).toMatch(/ holds neither rainfall nor evaporation\.$/);
        else if (route === 'pair' && response.status === 400)
          expect(await refusal(response)).toMatch(/^No natural station shares .*: name the references\.$/);
        else await soundText(response, where);
      }
    }
  }
});

test.each(ODD_REGIONS)('rank, regional, windows and breaks end well in "%s"', async (slug) => {
  const region = ['--region', slug.replaceAll('-', ' ')];
  for (const argv of [
    ['rank', ...region],
    ['rank', ...region, '--no-spans', '--format', 'json'],
    ['regional', ...region],
    ['regional', ...region, '--chance', 'sieve', '--format', 'json'],
    ['windows', ...region],
    ['windows', ...region, '--station', 'A1', '--format', 'json'],
    ['breaks', ...region, '--breaks', '2005,1900'],
  ]) {
    const { code, stdout, stderr } = await runCommand(...argv);
    expect([argv.join(' '), code, code === 0 ? '' : stderr]).toEqual([argv.join(' '), 0, '']);
    expectSound(stdout + stderr, argv.join(' '));
    expect(stdout).not.toBe('');
  }
});

test('values that are all equal: no trend, p 1, places not told apart, and no trend called detectable', async () => {
  const { stations, counts } = await jsonOf(await askRegion('all-equal', 'ranking'));
  expect(counts).toMatchObject({ ranked: 3, falling: 0, rising: 0 });
  for (const row of stations) {
    // every difference is 0: S = 0, and the median slope is 0
    expect(row).toMatchObject({ z: 0, p_value: 1, p_adjusted: 1, slope_m3s_per_decade: 0, trend: 'none' });
    expect(row).toMatchObject({ rank_low: 1, rank_high: 3, detectable_percent_per_decade: null });
  }
  const regional = await jsonOf(await askRegion('all-equal', 'regional'));
  expect(regional.groups[0]).toMatchObject({ falling: { count: 0, p: 1 }, kendall: { s: 0, p: 1 } });
  const pair = await jsonOf(await askStation('all-equal', 'A1', 'pair', '?with=B2'));
  expect(pair.trends.ratio).toMatchObject({ p_value: 1, percent_per_decade: 0 });
  expect(pair.sentence).not.toContain('would have shown');
});

test('values that are all zero: listed under Drying, and no ratio to them', async () => {
  const { stations, counts } = await jsonOf(await askRegion('all-zero', 'ranking'));
  expect(counts).toMatchObject({ ranked: 0, drying: 3, falling: 0, rising: 0 });
  for (const row of stations) expect(row).toMatchObject({ rank: null, trend: 'none', trend_of: 'zero-days' });
  expect((await jsonOf(await askRegion('all-zero', 'regional'))).groups[0].ranked).toBe(0);
  const { problem, years } = await jsonOf(await askStation('all-zero', 'A1', 'pair', '?with=B2'));
  expect([problem, years]).toEqual([expect.stringContaining('are listed under Drying'), []]);
});

test('two values only: ties are counted in the variance, and a step is found', async () => {
  const text = await soundText(
    await askRegion('two-values', 'ranking', '?serialCorrection=none&yearStart=1&format=csv'),
    'two values',
  );
  const byCode = Object.fromEntries(rowsOf(text).map((row) => [row.station_code, row]));
  // 15 years of 3, then 15 of 2: S = −15·15; variance (30·29·65 − 2·15·14·35)/18 = 2325; z = −224/√2325
  expect(Number(byCode.A1.z)).toBeCloseTo(-224 / Math.sqrt(2325), 8);
  expect(byCode.A1.trend).toBe('falling');
  // 2 and 3 by turns from 1990 on: of pairs 2 … 3 there are 15·16/2, of pairs 3 … 2 there are 15·14/2; S = 15
  expect(Number(byCode.B2.z)).toBeCloseTo(14 / Math.sqrt(2325), 8);
  // 28 years of 3, 2 of 2: S = −56; variance (30·29·65 − 28·27·61 − 2·1·9)/18
  expect(Number(byCode.C3.z)).toBeCloseTo(-55 / Math.sqrt((30 * 29 * 65 - 28 * 27 * 61 - 2 * 9) / 18), 8);
  const { suggested } = await jsonOf(await askStation('two-values', 'A1', 'breaks', '?yearStart=1'));
  expect(suggested).toMatchObject({ lastBefore: 2004, k: 225 });
});

test('no values at all: nobody is ranked, each row says why, and nothing is said of them together', async () => {
  const { stations, counts, warnings } = await jsonOf(await askRegion('no-values', 'ranking'));
  expect(counts).toMatchObject({ stations: 2, ranked: 0, unranked: 2 });
  for (const row of stations) expect(row.unranked_reason).toBe('no usable year');
  expect(warnings).toContain('No station is ranked; each row says why.');
  expect(await jsonOf(await askRegion('no-values', 'certainty'))).toMatchObject({ spans: [], detectable: [] });
  expect((await jsonOf(await askStation('no-values', 'A1', 'breaks', '?breaks=2005'))).problem).toBe('no usable year');
});

test('a single station has place 1 of 1 for sure, and nobody to be paired with', async () => {
  const { stations } = await jsonOf(await askRegion('one-station', 'ranking'));
  expect(stations).toMatchObject([{ rank: 1, rank_low: 1, rank_high: 1, probability_among_steepest: 1 }]);
  const { groups } = await jsonOf(await askRegion('one-station', 'regional'));
  expect(groups[0]).toMatchObject({ ranked: 1, falling: null, kendall: null });
  expect(groups[0].sentences.chance).toContain('Only 1 station is ranked');
});

test('two stations: the chances of being the steepest add up to 1', async () => {
  const { spans } = await jsonOf(await askRegion('two-stations', 'certainty'));
  const chances = spans.map(({ amongSteepest }: { amongSteepest: number[] }) => amongSteepest[0]);
  expect(chances).toHaveLength(2);
  expect(chances[0] + chances[1]).toBeCloseTo(1, 9);
});
