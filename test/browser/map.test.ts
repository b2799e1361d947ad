import { readFile } from 'node:fs/promises';
import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import { deleteRegion, demoRegion, fetchJson, newRegion } from './demo-region.ts';
import { accessibilityProblems, expectTrouble, hydrated, newPage, type PageOptions, serverUrl } from './harness.ts';

/** The ranking file's header, as other programs rely on it (README, "Ranking CSV"). */
const HEADER =
  'rank,rank_low,rank_high,station_code,station_name,river,latitude,longitude,drainage_area_km2,influence,years_used,' +
  'first_year,last_year,mean_minimum_m3s,mean_minimum_l_s_km2,slope_m3s_per_decade,slope_ci_low,slope_ci_high,' +
  'slope_percent_per_decade,kendall_tau,z,p_value,p_adjusted,trend,trend_of,zero_flow_years,unranked_reason,note,' +
  'steadiness,detectable_percent_per_decade,steepest_k,probability_among_steepest,' +
  'index,index_unit,mean_index,index_slope_per_decade,index_slope_ci_low,index_slope_ci_high';

interface StationAnswer extends Omit<Row, 'code' | 'name'> {
  station_code: string;
  station_name: string;
}

interface Row {
  code: string;
  name: string;
  latitude: number;
  longitude: number;
  rank: number | null;
  drying: boolean;
}

/** A busy machine may take its time; what never comes about still fails. */
const eventually = <T>(look: () => T | Promise<T>) => expect.poll(look, { timeout: 15_000 });

let slug: string;
let rows: Row[];
let ranked: Row[];

beforeAll(async () => {
  slug = await demoRegion();
  const { stations } = (await fetchJson(`/api/regions/${slug}/ranking`)) as { stations: StationAnswer[] };
  rows = stations.map(({ station_code: code, station_name: name, ...facts }) => ({ code, name, ...facts }));
  ranked = rows.filter((row) => row.rank !== null);
});

async function openMap(query = '', options: PageOptions = {}): Promise<Page> {
  const page = await newPage(`/regions/${slug}${query}`, options);
  await hydrated(page);
  await page.locator('.leaflet-needles-pane canvas').first().waitFor({ state: 'attached' });
  return page;
}

const tableRow = (page: Page, code: string) => page.locator(`tr[data-code="${code}"]`);
const codesShown = (page: Page) =>
  page.locator('tr[data-code]').evaluateAll((all) => all.map((row) => (row as HTMLElement).dataset.code));
const parameter = (page: Page, name: string) => new URL(page.url()).searchParams.get(name);
/** A view with one station in the very middle. */
const viewOn = (row: Row, zoom = 13) => `view=${row.latitude.toFixed(4)},${row.longitude.toFixed(4)},${zoom}`;

async function middleOfMap(page: Page): Promise<[number, number]> {
  const box = await page.locator('.leaflet-container').boundingBox();
  if (!box) throw new Error('there is no map');
  return [box.x + box.width / 2, box.y + box.height / 2];
}

test('the first ranks stand in order beside the map, and the answer over both', async () => {
  const page = await openMap();
  const first = ranked.slice(0, 8).map((row) => row.code);
  expect((await codesShown(page)).slice(0, 8)).toEqual(first);
  expect(await page.getByRole('heading', { level: 1 }).textContent()).toContain('map and ranking');
  await page.getByText(new RegExp(`of ${ranked.length} ranked stations fall`)).waitFor();
  await page.getByText(`, ${ranked.length} in view`).waitFor();
});

test('pointing at a mark points at its row; a click selects it in table and address, a click on open ground clears', async () => {
  const [station] = ranked;
  const page = await openMap(`?${viewOn(station)}`);
  const [x, y] = await middleOfMap(page);
  await page.mouse.move(x, y, { steps: 3 });
  await page.locator(`tr[data-code="${station.code}"][data-hovered]`).waitFor();
  await page.mouse.click(x, y);
  await page.locator(`tr[data-code="${station.code}"][data-selected]`).waitFor();
  await eventually(() => parameter(page, 'station')).toBe(station.code);
  await page.mouse.click(x - 120, y + 120);
  await eventually(() => parameter(page, 'station')).toBeNull();
});

test('pointing at a row points at its mark, and a click on it selects', async () => {
  const page = await openMap();
  const station = ranked[3];
  const card = page.getByRole('region', { name: 'Map' }).getByText(station.name, { exact: true });
  await tableRow(page, station.code).locator('td').first().hover();
  await card.waitFor();
  await tableRow(page, station.code).locator('td').first().click();
  await eventually(() => parameter(page, 'station')).toBe(station.code);
  await page.mouse.move(5, 5);
  await card.waitFor();
  const link = page.getByRole('link', { name: 'Open the station’s page' });
  expect(await link.getAttribute('href')).toContain(`/stations/${station.code}?`);
});

test('the ranking follows the stations in view, a switch keeps all, and the address keeps the switch', async () => {
  const page = await openMap(`?${viewOn(ranked[0])}`);
  await eventually(async () => (await codesShown(page)).length).toBeLessThan(ranked.length / 2);
  expect(await codesShown(page)).toContain(ranked[0].code);
  await page.getByRole('checkbox', { name: 'Follow the map' }).uncheck();
  await eventually(async () => (await codesShown(page))[3]).toBe(ranked[3].code);
  await eventually(() => parameter(page, 'follow')).toBe('false');
  await page.reload();
  await hydrated(page);
  expect(await page.getByRole('checkbox', { name: 'Follow the map' }).isChecked()).toBe(false);
});

test('dragging the map writes the view to the address, and the button shows all stations again', async () => {
  const page = await openMap();
  const [x, y] = await middleOfMap(page);
  expect(parameter(page, 'view')).toBeNull();
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x - 500, y, { steps: 8 });
  await page.mouse.up();
  await eventually(() => parameter(page, 'view')).toMatch(/^-?\d+\.\d+,-?\d+\.\d+,\d+(\.\d+)?$/);
  await eventually(async () => (await codesShown(page)).length).toBeLessThan(12);
  await page.getByRole('button', { name: 'Show all stations' }).click();
  await page.getByText(`, ${ranked.length} in view`).waitFor();
  await eventually(() => parameter(page, 'view')).toBeNull();
  await page.getByRole('button', { name: 'Zoom in' }).click();
  await eventually(() => parameter(page, 'view')).not.toBeNull();
});

test('the divider moves by pointer and by keyboard, within its limits', async () => {
  const page = await openMap();
  const divider = page.getByRole('separator', { name: 'Divider between map and ranking' });
  const width = async () => (await page.locator('.leaflet-container').boundingBox())?.width ?? 0;
  const before = await width();
  const box = await divider.boundingBox();
  if (!box) throw new Error('there is no divider');
  await page.mouse.move(box.x + 4, box.y + 200);
  await page.mouse.down();
  await page.mouse.move(box.x + 204, box.y + 200, { steps: 5 });
  await page.mouse.up();
  expect(await width()).toBeGreaterThan(before + 150);
  await divider.focus();
  await page.keyboard.press('Home');
  expect(await divider.getAttribute('aria-valuenow')).toBe('20');
  await page.keyboard.press('ArrowLeft');
  expect(await divider.getAttribute('aria-valuenow')).toBe('20');
  await page.keyboard.press('Shift+ArrowRight');
  expect(await divider.getAttribute('aria-valuenow')).toBe('30');
  await eventually(() => parameter(page, 'split')).toBe('30');
});

test('a term edited in the sentence changes address and sentence, keeps the rest, and leaves the map standing', async () => {
  const page = await openMap(`?station=${ranked[0].code}&${viewOn(ranked[0], 9)}`);
  const canvas = await page.locator('.leaflet-needles-pane canvas').first().elementHandle();
  await page.getByRole('button', { name: '7-day minima' }).click();
  await page.getByLabel('Days averaged').fill('30');
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: '30-day minima' }).waitFor();
  expect(parameter(page, 'days')).toBe('30');
  expect(parameter(page, 'station')).toBe(ranked[0].code);
  expect(parameter(page, 'view')).not.toBeNull();
  expect(await canvas?.evaluate((element) => element.isConnected)).toBe(true);
  await page.goBack();
  await page.getByRole('button', { name: '7-day minima' }).waitFor();
});

test('Escape leaves a term as it was, and what cannot be used is refused in words', async () => {
  const page = await openMap();
  const term = page.getByRole('button', { name: '7-day minima' });
  await term.focus();
  await page.keyboard.press('Enter');
  await page.getByLabel('Days averaged').fill('400');
  await page.keyboard.press('Enter');
  await page.getByRole('alert').getByText('Basis key "days" cannot be 400: a whole number 1–365.').waitFor();
  await page.keyboard.press('Escape');
  await page.getByLabel('Days averaged').waitFor({ state: 'detached' });
  expect(await term.evaluate((element) => element === document.activeElement)).toBe(true);
  expect(parameter(page, 'days')).toBeNull();
});

test('terms that differ from the region’s own say so, with a way back', async () => {
  const page = await openMap('?days=30&alpha=0.05');
  await page.getByRole('button', { name: 'go back to those' }).click();
  await page.getByRole('button', { name: '7-day minima' }).waitFor();
  expect(parameter(page, 'alpha')).toBeNull();
});

test('an address with terms that cannot be used shows the region’s own and names what is wrong', async () => {
  const page = await openMap('?days=0');
  await page.getByRole('alert').getByText('Basis key "days" cannot be 0').waitFor();
  await page.getByRole('button', { name: '7-day minima' }).waitFor();
});

test('the ranked CSV of all is the file of the interface; that of what is shown has the same columns and its rows only', async () => {
  const page = await openMap('?days=30&q=vm01');
  await page.getByText(/\d+ match/).waitFor();
  const shown = await codesShown(page);
  expect(shown.length).toBeGreaterThan(0);
  expect(shown.length).toBeLessThan(ranked.length);
  await page.getByRole('button', { name: 'Ranked CSV' }).click();

  const whole = await download(page, () => page.getByRole('link', { name: /^CSV of all/ }).click());
  expect(whole).toBe(await (await fetch(`${serverUrl}/api/regions/${slug}/ranking?format=csv&days=30`)).text());
  expect(whole.split(/\r?\n/)[0]).toBe(HEADER);

  const part = await download(page, () => page.getByRole('button', { name: /^CSV of what is shown/ }).click());
  const [header, ...lines] = part.trim().split(/\r?\n/);
  expect(header).toBe(HEADER);
  expect(lines.map((line) => line.split(',')[3])).toEqual(shown);
  for (const line of lines) expect(whole).toContain(line);
});

async function download(page: Page, click: () => Promise<void>): Promise<string> {
  const [file] = await Promise.all([page.waitForEvent('download'), click()]);
  return readFile(await file.path(), 'utf8');
}

test('by keyboard alone: to the first rank on the map, on to a neighbour, selected, zoomed, moved, cleared', async () => {
  const page = await openMap();
  await page.locator('.leaflet-container').focus();
  await page.keyboard.press('Home');
  const spoken = page.getByRole('region', { name: 'Map' }).locator('[aria-live]');
  await eventually(() => spoken.textContent()).toContain(`${ranked[0].name}, rank 1:`);
  await page.keyboard.press('ArrowLeft');
  await eventually(() => spoken.textContent()).not.toContain(ranked[0].name);
  await page.keyboard.press('Enter');
  await eventually(() => parameter(page, 'station')).not.toBeNull();
  const chosen = rows.find((row) => row.code === parameter(page, 'station'));
  expect(await spoken.textContent()).toContain(chosen?.name);
  await page.keyboard.press('+');
  await eventually(() => parameter(page, 'view')).not.toBeNull();
  const zoomed = parameter(page, 'view');
  await page.waitForTimeout(400);
  await page.keyboard.press('Shift+ArrowRight');
  await eventually(() => parameter(page, 'view')).not.toBe(zoomed);
  await page.keyboard.press('Escape');
  await eventually(() => parameter(page, 'station')).toBeNull();
});

test('by keyboard alone: through the ranking, selected by Space, opened by Enter with the view along', async () => {
  const page = await openMap(`?${viewOn(ranked[0], 7)}&follow=false`);
  await tableRow(page, ranked[0].code).getByRole('link').focus();
  await page.keyboard.press('ArrowDown');
  const focused = () => page.evaluate(() => document.activeElement?.closest('tr')?.dataset.code);
  await eventually(focused).toBe(ranked[1].code);
  await page.keyboard.press('End');
  await eventually(focused).toBe(ranked[ranked.length - 1].code);
  await page.keyboard.press('Home');
  await eventually(focused).toBe(ranked[0].code);
  await page.keyboard.press('Space');
  await eventually(() => parameter(page, 'station')).toBe(ranked[0].code);
  await page.keyboard.press('Enter');
  await page.waitForURL(`**/stations/${ranked[0].code}?**`);
  expect(parameter(page, 'view')).not.toBeNull();
});

test('the search leaves the stations that answer, wherever they are listed', async () => {
  const page = await openMap();
  const station = ranked[5];
  await page.getByLabel('Find a station by name, code or river').fill(station.code);
  await eventually(() => codesShown(page)).toEqual([station.code]);
  await eventually(() => parameter(page, 'q')).toBe(station.code);
  await page.getByLabel('Find a station by name, code or river').fill('no such river');
  await page.getByText(/None of the \d+ ranked stations is in view and found/).waitFor();
});

test('stations that are not ranked stand in a list of their own with the reason, drying ones in another', async () => {
  const page = await openMap();
  const unranked = rows.filter((row) => row.rank === null && !row.drying);
  await page.getByRole('tab', { name: /Not ranked, and why/ }).click();
  const items = page.getByRole('tabpanel').getByRole('listitem');
  await items.first().waitFor();
  expect(await items.count()).toBe(unranked.length);
  for (const text of await items.locator('p').allTextContents()) expect(text.length).toBeGreaterThan(10);
  await page.getByRole('tab', { name: /^Drying/ }).click();
  await page.getByRole('columnheader', { name: 'dry days / decade' }).waitFor();
  expect(await codesShown(page)).toEqual(rows.filter((row) => row.drying).map((row) => row.code));
  await eventually(() => parameter(page, 'tab')).toBe('drying');
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)('nothing on the screen breaks WCAG 2.2 AA (%s, %i wide)', async (colorScheme, width) => {
  const page = await openMap(`?station=${ranked[0].code}`, { colorScheme, width });
  await page.getByRole('link', { name: 'Open the station’s page' }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('an open term and the open download menu break nothing either', async () => {
  const page = await openMap();
  await page.getByRole('button', { name: /^Mann–Kendall/ }).click();
  await page.getByLabel('False discoveries accepted').waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Ranked CSV' }).click();
  await page.getByRole('link', { name: /^CSV of all/ }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('on a phone map and ranking stand one above the other, or alone, and nothing is cut off sideways', async () => {
  const page = await openMap('', { width: 390, height: 844 });
  const map = page.locator('.leaflet-container');
  const list = page.getByRole('region', { name: 'Ranking' });
  expect(await map.isVisible()).toBe(true);
  expect(await list.isVisible()).toBe(true);
  const [mapBox, listBox] = [await map.boundingBox(), await list.boundingBox()];
  expect(listBox?.y).toBeGreaterThanOrEqual((mapBox?.y ?? 0) + (mapBox?.height ?? 0));
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390);
  await page.getByRole('radio', { name: 'Ranking' }).check();
  await eventually(() => map.isVisible()).toBe(false);
  await page.getByRole('radio', { name: 'Map' }).check();
  await eventually(() => map.isVisible()).toBe(true);
  expect(await list.count()).toBe(0);
});

test('a chosen theme is kept and shown before the page is', async () => {
  const page = await openMap('', { colorScheme: 'light' });
  const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  const light = await paper();
  await page.getByRole('button', { name: /^Theme: as the device/ }).click();
  await page.getByRole('button', { name: /^Theme: light/ }).click();
  await page.getByRole('button', { name: /^Theme: dark/ }).waitFor();
  const dark = await paper();
  expect(dark).not.toBe(light);
  await page.reload({ waitUntil: 'commit' });
  await page.waitForSelector('body', { state: 'attached' });
  expect(await paper()).toBe(dark);
});

test('a region without stations says what to bring', async () => {
  const empty = await newRegion('Empty basin');
  try {
    const page = await newPage(`/regions/${empty}`);
    await page.getByRole('heading', { name: /has no stations yet/ }).waitFor();
    expect(await page.getByRole('link', { name: 'Import records' }).getAttribute('href')).toBe(
      `/regions/${empty}/import`,
    );
    expect(await accessibilityProblems(page)).toEqual([]);
  } finally {
    await deleteRegion(empty);
  }
});

test('the first page lists the regions with what they hold, says which are invented, and breaks no rule', async () => {
  for (const width of [1280, 390]) {
    const page = await newPage('/', { width });
    await hydrated(page);
    const row = page.getByRole('row', { name: /invented, for trying things out/ }).first();
    expect(await row.textContent()).toContain(String(rows.length));
    expect(await row.getByRole('link').getAttribute('href')).toBe(`/regions/${slug}`);
    expect(await accessibilityProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(width);
  }
});

test('a region that does not exist is answered with words and the way back', async () => {
  const page = await newPage();
  expectTrouble(page, /404/);
  const answer = await page.goto('/regions/no-such-region');
  expect(answer?.status()).toBe(404);
  await page.getByRole('heading', { name: 'There is no such page' }).waitFor();
});
