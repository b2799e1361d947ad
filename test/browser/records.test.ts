import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import { layOutChart, rowY, yearX } from '../../app/regions/[region]/records/_chart/chart-layout.ts';
import { type Sort, sortStations } from '../../app/regions/[region]/records/_chart/sort-stations.ts';
import { yearCell } from '../../app/regions/[region]/records/_chart/year-cell.ts';
import { parseIsoDate } from '../../lib/calendar/day.ts';
import { lowFlowYearOfDay } from '../../lib/calendar/low-flow-year.ts';
import type { RegionRecords } from '../../lib/jobs/records-types.ts';
import { deleteRegion, demoRegion, fetchJson, newRegion } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';
import { flowLines, regionWithFlows } from './records-region.ts';

let slug: string;
let records: RegionRecords;

beforeAll(async () => {
  slug = await demoRegion();
  records = (await fetchJson(`/api/regions/${slug}/records`)) as RegionRecords;
});

const chart = (page: Page) => page.getByRole('application', { name: /^Chart of \d+ stations?/ });
const readout = (page: Page) => page.getByTestId('year-readout');

async function recordsPage(query = '', options = {}, region = slug) {
  const page = await newPage(`/regions/${region}/records${query}`, options);
  await hydrated(page);
  return page;
}

async function chartPage(query = '', options = {}, region = slug) {
  const page = await recordsPage(query, options, region);
  await chart(page).waitFor();
  return page;
}

/** Where a station's year lies on the chart in the page, by the program's own layout and order; both have unit tests. */
async function placeOf(page: Page, code: string, year: number, sort: Sort = 'river') {
  const rows = sortStations(records.stations, { sort, reverse: false, search: '' });
  const row = rows.findIndex(({ station }) => station.code === code);
  const box = await chart(page).evaluate((element) => ({
    width: element.clientWidth,
    left: element.scrollLeft,
    top: element.scrollTop,
  }));
  const layout = layOutChart(box.width, rows.length, records.firstYear ?? 0, records.lastYear ?? 0);
  return {
    x: yearX(layout, year, box) + layout.cell / 2,
    y: rowY(layout, row, box) + layout.rowHeight / 2,
  };
}

/** A station of the first screenful with a year that does not count. */
function withPartlyYear(): { code: string; name: string; year: number } {
  for (const { station } of sortStations(records.stations, { sort: 'river', reverse: false, search: '' }).slice(
    0,
    12,
  )) {
    const at = station.values.findIndex((days, i) => i > 0 && days > 100 && station.usable[i] === 0);
    if (at > 0 && station.firstYear !== null)
      return { code: station.code, name: station.name, year: station.firstYear + at };
  }
  throw new Error('the demo region has no year that does not count among its first stations');
}

test('the pointer reads a year’s counts and why it does not count, and a click opens it', async () => {
  const page = await chartPage();
  const { code, name, year } = withPartlyYear();
  const position = await placeOf(page, code, year);
  await chart(page).hover({ position });
  const station = records.stations.find((one) => one.code === code)!;
  const cell = yearCell(records, station, year)!;
  await expect.poll(() => readout(page).textContent()).toContain(`${cell.values} of ${cell.days} days with a value`);
  expect(await readout(page).textContent()).toContain(name);
  expect(await readout(page).textContent()).toContain(cell.reason);
  await chart(page).click({ position });
  await page.getByRole('heading', { level: 2, name: new RegExp(`^${literally(name)}, ${year}`) }).waitFor();
  const { searchParams } = new URL(page.url());
  expect([searchParams.get('station'), searchParams.get('year')]).toEqual([code, String(year)]);
});

test('a dated change is named in the readout of its year', async () => {
  const { basis, stations } = records;
  const [one] = stations.filter(({ changes }) => changes.length > 0);
  const { code, name, changes } = one;
  const year = lowFlowYearOfDay(parseIsoDate(changes[0].date), basis.yearStart);
  const page = await chartPage(`?q=${code}`);
  await expect.poll(() => chart(page).getAttribute('aria-label')).toContain('Chart of 1 station by');
  const width = await chart(page).evaluate((element) => element.clientWidth);
  const layout = layOutChart(width, 1, records.firstYear ?? 0, records.lastYear ?? 0);
  const none = { left: 0, top: 0 };
  const position = { x: yearX(layout, year, none) + layout.cell / 2, y: rowY(layout, 0, none) + layout.rowHeight / 2 };
  await chart(page).hover({ position });
  await expect.poll(() => readout(page).textContent()).toContain(`${changes[0].date}, ${changes[0].kind}`);
  expect(await readout(page).textContent()).toContain(name);
});

test('by keyboard alone: from the chart to a year, along its days, and back', async () => {
  const page = await chartPage('?sort=code');
  await chart(page).focus();
  await page.keyboard.press('End');
  await page.keyboard.press('Home');
  for (let step = 0; step < 3; step++) await page.keyboard.press('ArrowDown');
  const [, , , { station }] = sortStations(records.stations, { sort: 'code', reverse: false, search: '' });
  await expect.poll(() => readout(page).textContent()).toContain(station.name);
  const last = (station.firstYear ?? 0) + station.values.length - 2;
  for (let year = records.firstYear ?? 0; year < last; year++) await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Enter');
  const heading = page.getByRole('heading', { level: 2, name: new RegExp(`^${literally(station.name)}, ${last}`) });
  await heading.waitFor();
  await expect.poll(() => heading.evaluate((element) => element === document.activeElement)).toBe(true);
  const days = page.getByRole('application', { name: /^Daily flows of/ });
  await days.focus();
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('Shift+ArrowRight');
  const [from, to] = [page.getByLabel('From', { exact: true }), page.getByLabel('To', { exact: true })];
  expect(Date.parse(await to.inputValue()) - Date.parse(await from.inputValue())).toBe(2 * 86_400_000);
  await page.keyboard.press('Escape');
  expect(await from.inputValue()).toBe('');
  await page.keyboard.press('Escape');
  await heading.waitFor({ state: 'detached' });
  await expect.poll(() => new URL(page.url()).searchParams.has('year')).toBe(false);
});

test('sorting by area puts the largest catchment first, the other way round the smallest; the address keeps it', async () => {
  const page = await chartPage();
  await page.getByLabel('Sorted by').selectOption('area');
  await expect.poll(() => new URL(page.url()).searchParams.get('sort')).toBe('area');
  const areas = records.stations.filter(({ areaKm2 }) => areaKm2 !== null);
  const largest = areas.reduce((a, b) => ((b.areaKm2 ?? 0) > (a.areaKm2 ?? 0) ? b : a));
  const smallest = areas.reduce((a, b) => ((b.areaKm2 ?? 0) < (a.areaKm2 ?? 0) ? b : a));
  await chart(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect.poll(() => readout(page).textContent()).toContain(`(${largest.code})`);
  await page.getByLabel('the other way round').check();
  await expect.poll(() => new URL(page.url()).searchParams.get('reverse')).toBe('true');
  await page.reload();
  await hydrated(page);
  await chart(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect.poll(() => readout(page).textContent()).toContain(`(${smallest.code})`);
});

test('a search leaves the stations that answer it, and says so when none does', async () => {
  const page = await chartPage();
  const [{ name }] = records.stations;
  await page.getByRole('searchbox', { name: 'Find' }).fill(name.toUpperCase());
  await page.getByText(new RegExp(`^1 of ${records.stations.length} stations$`)).waitFor();
  await page.getByRole('searchbox', { name: 'Find' }).fill('nowhere at all');
  await page.getByRole('heading', { name: 'No station answers the search' }).waitFor();
  await page.getByRole('button', { name: 'Show all stations' }).click();
  await chart(page).waitFor();
});

test('the table holds what the chart holds: a row a station, and the years of one of them, each a way to its days', async () => {
  const page = await chartPage('?sort=code');
  await page.getByText(/^As a table/).click();
  const table = page.getByRole('region', { name: 'Records by station' });
  await expect.poll(() => table.getByRole('row').count()).toBe(Math.min(100, records.stations.length) + 1);
  const station = records.stations.find(({ firstYear }) => firstYear !== null)!;
  await table.getByRole('button', { name: station.name, exact: true }).click();
  const years = page.getByRole('region', { name: `Years of ${station.name}` });
  await expect.poll(() => years.getByRole('row').count()).toBe(station.values.length + 1);
  await years.getByRole('link').nth(2).click();
  await page.getByRole('heading', { level: 2, name: new RegExp(`^${literally(station.name)}, `) }).waitFor();
});

test('an open year has its days as a table and as a file, steps to the next year and leads to the station', async () => {
  const { code, name, year } = withPartlyYear();
  const page = await chartPage(`?station=${code}&year=${year}`);
  await page.getByText('Days as a table').click();
  const table = page.getByRole('region', { name: /^Days of/ });
  await expect.poll(() => table.getByRole('row').count()).toBeGreaterThan(365);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Days CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  expect(text.split('\r\n')[0]).toBe('station_code,date,value,unit,flags,text');
  await page.getByRole('button', { name: 'The year after' }).click();
  await page.getByRole('heading', { level: 2, name: new RegExp(`, ${year + 1}`) }).waitFor();
  await page.getByRole('link', { name: 'Station', exact: true }).click();
  await page.getByRole('heading', { level: 1, name }).waitFor();
});

test('Records stands in the navigation of every page of a region', async () => {
  const page = await newPage(`/regions/${slug}`);
  await page
    .getByRole('navigation', { name: /^Pages of/ })
    .getByRole('link', { name: 'Records' })
    .click();
  await chart(page).waitFor();
  expect(new URL(page.url()).pathname).toBe(`/regions/${slug}/records`);
});

test('a year under the pointer of a station’s page leads to that year among the records', async () => {
  const { code, name } = withPartlyYear();
  const page = await newPage(`/regions/${slug}/stations/${encodeURIComponent(code)}`);
  await hydrated(page);
  const strip = page.getByRole('slider', { name: /^Days with a value/ });
  await strip.focus();
  await page.keyboard.press('End');
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('Enter');
  await page.getByRole('heading', { level: 2, name: new RegExp(`^${literally(name)}, `) }).waitFor();
});

test('a region without stations says what to bring', async () => {
  const empty = await newRegion('Records of nothing');
  const page = await recordsPage('', {}, empty);
  await page.getByRole('link', { name: 'Import records' }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  await deleteRegion(empty);
});

test('a region of one station has a chart of one row, and says that no period is long enough', async () => {
  const one = await regionWithFlows('Records of one', flowLines('A1', '2001-01-01', '2004-12-31'));
  const page = await chartPage('', {}, one);
  await chart(page).focus();
  await page.keyboard.press('ArrowRight');
  await expect.poll(() => readout(page).textContent()).toMatch(/\(A1\)/);
  await page.getByRole('radio', { name: 'Common period' }).check();
  await page.getByRole('heading', { name: 'No period is long enough' }).waitFor();
  await deleteRegion(one);
});

test('on a phone the page keeps its width, begins at the latest years, and a tap opens a year', async () => {
  const page = await chartPage('', { width: 390, height: 844 });
  await expect.poll(() => page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  const { left, room } = await chart(page).evaluate((box) => ({
    left: box.scrollLeft,
    room: box.scrollWidth - box.clientWidth,
  }));
  expect(left).toBeGreaterThanOrEqual(room - 1);
  const { code, name } = withPartlyYear();
  const station = records.stations.find((one) => one.code === code)!;
  const year = (station.firstYear ?? 0) + station.values.length - 3;
  const opened = page.getByRole('heading', { level: 2, name: new RegExp(`^${literally(name)}, ${year}`) });
  // On a busy machine the chart may still lay itself out when the first tap comes, and its places move.
  const tap = async () => {
    await chart(page).click({ position: await placeOf(page, code, year) });
    await page.waitForTimeout(1000);
    return opened.isVisible();
  };
  await expect.poll(tap, { timeout: 20_000 }).toBe(true);
  await expect.poll(() => page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
});

test.each([
  ['light', 1440, ''],
  ['dark', 1440, ''],
  ['light', 390, ''],
  ['light', 1440, 'panel'],
  ['dark', 390, 'panel'],
  ['light', 1440, 'findings'],
  ['dark', 390, 'findings'],
  ['light', 1440, 'periods'],
  ['dark', 390, 'periods'],
] as const)('keeps WCAG 2.2 AA and its width, %s at %i pixels: %s', async (colorScheme, width, view) => {
  const { code, year } = withPartlyYear();
  const query = view === '' ? '' : view === 'panel' ? `?station=${code}&year=${year}` : `?show=${view}`;
  const page = await recordsPage(query, { colorScheme, width, height: 844 });
  await page
    .getByRole(view === 'findings' ? 'heading' : 'application')
    .first()
    .waitFor();
  if (view === 'panel') await page.getByRole('application', { name: /^Daily flows/ }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(width);
});

const literally = (text: string): string => text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
