import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import { demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage, type PageOptions, serverUrl } from './harness.ts';

const eventually = <T>(look: () => T | Promise<T>) => expect.poll(look, { timeout: 15_000 });

interface RankedStation {
  station_code: string;
  rank: number | null;
  drying: boolean;
  trend: string | null;
}

interface Chart {
  starts: number[];
  ends: number[];
  z: (number | null)[];
  windows: number;
}

let slug: string;
/** the first rank, one whose trend may be chance, and one that is not ranked */
let steepest: string;
let unsure: string;
let unranked: string;

beforeAll(async () => {
  slug = await demoRegion();
  const { stations } = (await fetchJson(`/api/regions/${slug}/ranking`)) as { stations: RankedStation[] };
  const code = (found: RankedStation | undefined) => {
    if (!found) throw new Error('the demo region has no such station');
    return found.station_code;
  };
  steepest = code(stations.find(({ rank }) => rank === 1));
  unsure = code(stations.find(({ rank, trend }) => rank !== null && trend === 'none'));
  unranked = code(stations.find(({ rank, drying }) => rank === null && !drying));
});

async function stationPage(code: string, query = '', options: PageOptions = {}): Promise<Page> {
  const page = await newPage(`/regions/${slug}/stations/${encodeURIComponent(code)}${query}`, options);
  await hydrated(page);
  return page;
}

const parameter = (page: Page, name: string) => new URL(page.url()).searchParams.get(name);
const section = (page: Page, name: string) => page.getByRole('region', { name, exact: true });
async function csvOf(page: Page, name: string): Promise<string[]> {
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  return text.trim().split(/\r?\n/);
}

test('the start–end chart is read by keyboard, window by window', async () => {
  const page = await stationPage(steepest);
  const chart = (await fetchJson(`/api/regions/${slug}/stations/${steepest}/start-end`)) as Chart;
  const figure = page.getByRole('application', { name: /^Start–end chart/ });
  const readout = section(page, 'By the years chosen').getByRole('status');
  await figure.focus();
  await page.keyboard.press('Home');
  const [first, last] = [chart.starts[0], chart.ends[chart.ends.length - 1]];
  await eventually(() => readout.textContent()).toMatch(new RegExp(`^${first}–${last}: .* per decade, Z .*, p `));
  const z = chart.z[chart.ends.length - 1] ?? Number.NaN;
  expect(await readout.textContent()).toContain(Math.abs(z).toFixed(2));
  await page.keyboard.press('ArrowLeft');
  await eventually(() => readout.textContent()).toMatch(new RegExp(`^${first}–${last - 1}: `));
  await page.keyboard.press('ArrowDown');
  await eventually(() => readout.textContent()).toMatch(new RegExp(`^${first + 1}–${last - 1}: `));
  await page.keyboard.press('Escape');
  await eventually(() => readout.textContent()).toMatch(/^Point at a cell/);
});

test('what the colours say is chosen and kept in the address; the table and the file hold every window', async () => {
  const page = await stationPage(steepest);
  const years = section(page, 'By the years chosen');
  const { windows, z } = (await fetchJson(`/api/regions/${slug}/stations/${steepest}/start-end`)) as Chart;
  await years.getByText(/^Steadiness \d+\u00a0%: \d+ of \d+ windows/).waitFor();
  const picture = () => years.locator('canvas').evaluate((canvas) => (canvas as HTMLCanvasElement).toDataURL());
  const byZ = await picture();
  await years.getByRole('radio', { name: 'how much: % per decade' }).check();
  await eventually(() => parameter(page, 'chart')).toBe('change');
  await eventually(picture).not.toBe(byZ);
  await years.getByText('The chart as a table').click();
  const cells = years.getByRole('region', { name: 'Start–end chart as a table' }).locator('td');
  const filled = async () => (await cells.allTextContents()).filter(Boolean).length;
  await eventually(filled).toBe(z.filter((value) => value !== null).length);
  const lines = await csvOf(page, 'Start–end CSV');
  expect(lines[0]).toMatch(/^station_code,/);
  expect(lines.length - 1).toBe(windows);
});

test('beside a trend that may be chance stands the one that the record would have shown, in percent per decade', async () => {
  const page = await stationPage(unsure);
  await page
    .getByText(/^Detectable trend: this record would have shown ±[\d.]+ % per decade or more, either way/)
    .waitFor();
  const sure = section(page, 'How sure?');
  await eventually(() => sure.textContent()).toMatch(/Rank span, 90 %\d+(–\d+)? of \d+/);
  expect(await sure.textContent()).toMatch(/Steadiness\d+\u00a0%/);
  await stationPage(steepest).then(async (other) => {
    await eventually(() => section(other, 'How sure?').textContent()).toMatch(/Detectable trend, per decade±/);
    expect(await other.getByText(/^Detectable trend: this record/).count()).toBe(0);
  });
});

test('the place comes with its certainty and with the number of steepest that the address asks after', async () => {
  const page = await stationPage(steepest, '?k=2');
  await page
    .getByText(/ranked 1 of \d+, place \d+(–\d+)? with 90.% certainty, among the 2 steepest declines with/)
    .waitFor();
});

test('a break is chosen by keyboard, kept in the address, compared, written to a file, and taken away again', async () => {
  const page = await stationPage(unsure);
  const breaks = section(page, 'Before and after');
  await breaks.getByLabel('First low-flow year after a break').focus();
  await page.keyboard.type('2000');
  await page.keyboard.press('Enter');
  await eventually(() => parameter(page, 'breaks')).toBe('2000');
  const table = breaks.getByRole('region', { name: 'Before and after as a table' });
  await table.getByRole('rowheader', { name: /2000/ }).waitFor();
  const text = (await table.getByRole('row').nth(1).textContent()) ?? '';
  expect(text).toMatch(/may be chance|lower after|higher after/);
  const address = `/api/regions/${slug}/stations/${unsure}/breaks?breaks=2000&format=csv`;
  const lines = await csvOf(page, 'Breaks CSV');
  expect(lines.join('\n')).toBe((await (await fetch(serverUrl + address)).text()).trim().split(/\r?\n/).join('\n'));
  await breaks.getByRole('button', { name: /^Remove the break before/ }).click();
  await eventually(() => parameter(page, 'breaks')).toBeNull();
  await table.getByRole('rowheader', { name: /chosen/ }).waitFor({ state: 'detached' });
});

test('the break that the figures suggest is shown without a test at it', async () => {
  const page = await stationPage(unsure);
  const breaks = section(page, 'Before and after');
  await breaks
    .getByText(/^The figures themselves would part after .* Not tested: these figures chose the year\.$/)
    .waitFor();
});

test('an address with terms that cannot be used shows all sections on the region’s own', async () => {
  const page = await stationPage(unsure, '?days=0');
  await page.getByText('Basis key "days" cannot be 0').waitFor();
  await section(page, 'By the years chosen').locator('canvas').waitFor();
  await page.getByText(/^Detectable trend: this record/).waitFor();
});

test('a station that is not ranked has neither a place nor a comparison, and its page says why', async () => {
  const page = await stationPage(unranked);
  await page
    .getByText(/^Not ranked:/)
    .first()
    .waitFor();
  expect(await section(page, 'Before and after').count()).toBe(0);
  expect(await section(page, 'How sure?').count()).toBe(0);
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)(
  'the sections on years and breaks break no rule and no width, %s at %i pixels',
  async (colorScheme, width) => {
    const page = await stationPage(unsure, '?breaks=1995,2005', { colorScheme, width, height: 844 });
    await section(page, 'Before and after').getByRole('rowheader', { name: /2005/ }).waitFor();
    await section(page, 'By the years chosen').locator('canvas').waitFor();
    await section(page, 'By the years chosen').getByText('The chart as a table').click();
    await page.getByText(/^Detectable trend: this record/).waitFor();
    expect(await accessibilityProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
  },
);
