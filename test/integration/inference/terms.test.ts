import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { INDICES, SERIAL_CORRECTIONS } from '../../../lib/basis.ts';
import { oddRegions } from './odd-regions.ts';
import { askRegion, askStation, REGION_ROUTES, refusal, soundText } from './sound-answer.ts';

oddRegions();

const RANK_BY = ['percent-per-decade', 'specific-change', 'kendall-tau'];
const SLUG = 'mixed';

test.each(INDICES)('the ranking by %s is sound under every correction and every figure to rank by', async (index) => {
  for (const serialCorrection of SERIAL_CORRECTIONS) {
    for (const rankBy of RANK_BY) {
      const terms = `index=${index}&serialCorrection=${serialCorrection}&rankBy=${rankBy}`;
      const text = await soundText(await askRegion(SLUG, 'ranking', `?spans=none&format=csv&${terms}`), terms);
      const rows = parse(text, { columns: true }) as Record<string, string>[];
      expect(rows).toHaveLength(6);
      for (const row of rows) {
        if (row.p_value === '') expect(row.unranked_reason).not.toBe('');
        else expect(Number(row.p_value) >= 0 && Number(row.p_value) <= 1).toBe(true);
      }
    }
  }
});

test.each([
  ...INDICES.map((index) => `index=${index}`),
  ...SERIAL_CORRECTIONS.map((name) => `serialCorrection=${name}`),
  ...RANK_BY.map((name) => `rankBy=${name}`),
  'alpha=0.001',
  'alpha=0.5',
  'minYears=3&minCoverage=0',
  'period=1900-1920',
  'period=2005-2005',
  'period=own',
  'minYears=30&period=2000-2010',
  'days=60&season=2-2',
])('with %s every answer is sound', async (terms) => {
  for (const route of REGION_ROUTES) {
    if (route === 'alternatives' || route === 'movement') continue;
    const more = { regional: '&method=sieve', breaks: '&breaks=2005' }[route as string] ?? '';
    for (const query of new Set([`?${terms}`, `?${terms}${more}&format=csv`]))
      await soundText(await askRegion(SLUG, route, query), `${route}${query}`);
  }
  await soundText(await askRegion(SLUG, 'movement', `?${terms}`), `movement ${terms}`);
  for (const code of ['A1', 'B2', 'E5']) {
    await soundText(await askStation(SLUG, code, 'start-end', `?${terms}`), `${code} start-end ${terms}`);
    await soundText(await askStation(SLUG, code, 'breaks', `?breaks=2005&${terms}`), `${code} breaks ${terms}`);
    await soundText(await askStation(SLUG, code, 'pair', `?with=F6&${terms}`), `${code} pair ${terms}`);
    await soundText(await askStation(SLUG, code, 'weather', `?${terms}`), `${code} weather ${terms}`);
  }
});

test('alternatives and movement of terms far from the region’s own are sound', async () => {
  await soundText(await askRegion(SLUG, 'alternatives', '?index=deficit'), 'alternatives deficit');
  await soundText(await askRegion(SLUG, 'alternatives', '?period=1900-1920&format=csv'), 'alternatives 1900');
  const against = encodeURIComponent('period=1900-1920');
  const text = await soundText(await askRegion(SLUG, 'movement', `?against=${against}`), 'movement 1900');
  expect(JSON.parse(text)).toMatchObject({ rankedBefore: 0, rankedBoth: 0, tau: null });
});

test('a period outside the records, and one shorter than minYears, leave nobody ranked and say so', async () => {
  const ask = async (query: string) =>
    JSON.parse(await soundText(await askRegion(SLUG, 'ranking', `?spans=none&${query}`), query));
  const outside = await ask('period=1900-1920');
  expect(outside.counts.ranked).toBe(0);
  expect(outside.stations[0].unranked_reason).toBe('no usable year in 1900–1920');
  const short = await ask('minYears=30&period=2000-2010');
  expect(short.warnings[0]).toContain('2000–2010 has 11 years, fewer than the 30 usable ones asked for');
  const single = await ask('period=2005-2005');
  expect(single.warnings[0]).toContain('The period 2005 has 1 year, fewer than the 20 usable ones asked for');
});

test('an n-day mean that is longer than the season is told as the reason that nobody is ranked', async () => {
  const ask = async (query: string) =>
    JSON.parse(await soundText(await askRegion(SLUG, 'ranking', `?spans=none&${query}`), query));
  const { warnings, counts } = await ask('days=60&season=2-2');
  expect(counts.ranked).toBe(0);
  expect(warnings).toContain(
    'No 60-day mean lies within February–February, which has at most 29 days: take a longer season or fewer days.',
  );
  expect((await ask('days=28&season=2-2')).warnings.join()).not.toContain('lies within');
});

test.each([
  ['alpha=0', '"alpha" cannot be 0: a number 0.001–0.5.'],
  ['alpha=1', '"alpha" cannot be 1: a number 0.001–0.5.'],
  ['alpha=0.0009', '"alpha" cannot be 0.0009: a number 0.001–0.5.'],
  ['alpha=Infinity', '"alpha" cannot be "Infinity": a number 0.001–0.5.'],
  ['minYears=2', '"minYears" cannot be 2: a whole number 3–1000.'],
  ['minYears=1001', '"minYears" cannot be 1001: a whole number 3–1000.'],
  ['period=2005-2004', 'the first year must not come after the last'],
  ['period=999-1500', '[first, last] low-flow years 1000–9999 in rising order'],
  ['period=1990-9999', 'at most 500 years'],
  ['season=11-2&yearStart=1', 'a year that starts in November would hold it'],
  ['season=13-14', '"season" cannot be [13,14]'],
  ['index=flow', '"index" cannot be "flow": minimum, q95,'],
  ['serialCorrection=all', '"serialCorrection" cannot be "all": ar1-regional,'],
  ['rankBy=p', '"rankBy" cannot be "p": percent-per-decade,'],
])('%s is refused by every route, by name', async (terms, words) => {
  for (const route of REGION_ROUTES) expect(await refusal(await askRegion(SLUG, route, `?${terms}`))).toContain(words);
  for (const route of ['start-end', 'breaks', 'pair', 'weather'] as const)
    expect(await refusal(await askStation(SLUG, 'A1', route, `?${terms}`))).toContain(words);
});
