import { beforeAll, expect, test } from 'vitest';
import { type DemoStation, demoRegion, demoStations } from './demo-region.ts';
import { accessibilityProblems, expectTrouble, hydrated, newPage, serverUrl } from './harness.ts';

let slug: string;
let stations: DemoStation[];

beforeAll(async () => {
  slug = await demoRegion();
  stations = await demoStations(slug);
});

const stationPage = async (station: DemoStation, query = '', options = {}) => {
  const page = await newPage(`/regions/${slug}/stations/${encodeURIComponent(station.code)}${query}`, options);
  await hydrated(page);
  return page;
};

test('tells the station’s place, its facts and a verdict with figures', async () => {
  const page = await stationPage(stations[1]);
  await page.getByRole('heading', { level: 1, name: stations[1].name }).waitFor();
  expect(await page.textContent('main')).toMatch(/ranked 2 of \d+/);
  expect(await page.textContent('main')).toMatch(/95 % interval/);
  expect(await page.getByText(stations[1].code, { exact: true }).count()).toBeGreaterThan(0);
});

test('the arrow keys read single years of the minima and of the record', async () => {
  const page = await stationPage(stations[0]);
  const minima = page.getByRole('slider', { name: /^Lowest 7-day mean of each year/ });
  await minima.focus();
  await page.keyboard.press('End');
  const last = await minima.getAttribute('aria-valuetext');
  await page.keyboard.press('ArrowLeft');
  const before = await minima.getAttribute('aria-valuetext');
  expect(last).toMatch(/days? missing/);
  expect(before).toMatch(/days? missing/);
  expect(before).not.toBe(last);
  const coverage = page.getByRole('slider', { name: /^Days with a value/ });
  await coverage.focus();
  await page.keyboard.press('Home');
  expect(await coverage.getAttribute('aria-valuetext')).toMatch(/\d+ of \d+ days with a value/);
});

test('the table of minima unfolds, and the CSV file has as many years', async () => {
  const page = await stationPage(stations[0]);
  await page.getByText('The minima as a table').click();
  const rows = await page.getByRole('region', { name: 'Annual minima as a table' }).getByRole('row').count();
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Minima CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  const lines = text.trim().split(/\r?\n/);
  expect(lines[0]).toMatch(/^station_code,year,usable,missing_days,minimum_m3s,date,reason,flagged_days/);
  expect(lines.length).toBe(rows);
  expect(lines[1].split(',')[0]).toBe(stations[0].code);
});

test('the curve CSV is of this station on this basis', async () => {
  const page = await stationPage(stations[0], '?normalise=median');
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Curve CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  const [, first] = text.trim().split(/\r?\n/);
  expect(first.split(',')[0]).toBe(stations[0].code);
  expect(first.split(',')[3]).toBe('1');
});

test('] and [ step through the ranking, and a link goes back to the map with its view', async () => {
  const page = await stationPage(stations[0], '?view=46.0512,14.5060,8&days=30');
  await page.waitForSelector('.recharts-line-curve');
  await page.keyboard.press(']');
  await page.getByRole('heading', { level: 1 }).filter({ hasNotText: stations[0].name }).waitFor();
  await page.keyboard.press('[');
  await page.getByRole('heading', { level: 1, name: stations[0].name }).waitFor();
  const back = await page.getByRole('link', { name: /Map and ranking/ }).getAttribute('href');
  expect(back).toContain('view=46.0512,14.5060,8');
  expect(back).toContain('days=30');
  expect(back).toContain(`station=${stations[0].code}`);
});

test('a neighbour’s page is one click away', async () => {
  const page = await stationPage(stations[0]);
  const neighbour = page.getByRole('region', { name: 'Neighbours' }).getByRole('link').first();
  const name = (await neighbour.textContent()) ?? '';
  await neighbour.click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
});

test('a station without a drainage area says why it has no curve, and how to get one', async () => {
  const station = stations.find((candidate) => candidate.areaKm2 === null);
  if (!station) throw new Error('the demo region has no station without a drainage area');
  const page = await stationPage(station);
  await page.getByText(/^No curve on these terms: no drainage area/).waitFor();
  await page.getByRole('link', { name: 'Compare as a ratio to the median flow' }).click();
  await page.waitForSelector('.recharts-line-curve');
  expect(new URL(page.url()).searchParams.get('normalise')).toBe('median');
});

test('every station of the region has a page that can be read, ranked or not', async () => {
  for (const station of stations) {
    const response = await fetch(`${serverUrl}/regions/${slug}/stations/${encodeURIComponent(station.code)}`);
    expect(response.status, station.code).toBe(200);
    const html = await response.text();
    const words = html.replace(/<(script|style)\b[\s\S]*?<\/\1>/g, '').replace(/<[^>]*>/g, ' ');
    expect(words, station.code).toMatch(/Annual minima/);
    expect(words, station.code).toMatch(/Falling|Rising|No significant trend|Not ranked|[Dd]ry/);
    expect(words, station.code).not.toMatch(/\b(NaN|undefined|null|Infinity)\b/);
  }
}, 180_000);

test('an unknown code answers that there is no such station', async () => {
  const page = await newPage();
  expectTrouble(page, /404/);
  await page.goto(`/regions/${slug}/stations/no-such-code`);
  await page.getByRole('heading', { name: /no station of that code/ }).waitFor();
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
] as const)('keeps WCAG 2.2 AA and its width, %s at %i pixels', async (colorScheme, width) => {
  const page = await stationPage(stations[0], '', { colorScheme, width, height: 844 });
  await page.waitForSelector('.recharts-line-curve');
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
});
