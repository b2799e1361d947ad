import { appendFileSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { strToU8, zipSync } from 'fflate';
import { afterEach, expect, test } from 'vitest';
import { fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';
import {
  days,
  file,
  flows,
  importPage,
  REGISTRY,
  send,
  show,
  standing,
  start,
  stationCodes,
  taken,
  unitless,
  willBeMade,
} from './import-page.ts';

const madeFiles: string[] = [];
afterEach(() => {
  for (const path of madeFiles.splice(0)) rmSync(dirname(path), { recursive: true });
});

/** A file that takes seconds to import, longer than a page takes to come back: eight million rows. */
function slowFile(): string {
  const path = join(mkdtempSync(join(tmpdir(), 'hungerstone-')), 'big.csv');
  const station = days('0000', 40_000, () => '1.234').join('\n');
  writeFileSync(path, 'station,date,flow_m3s\n');
  for (let code = 1000; code < 1300; code++) appendFileSync(path, `${station.replaceAll('0000,', `${code},`)}\n`);
  madeFiles.push(path);
  return path;
}

test('station list and flows together: the report counts every row and lists each rejected one', async () => {
  const { page, slug } = await importPage();
  const rows = days('0001', 400, (day) => (1 + day / 100).toFixed(2));
  rows[9] = '0001,2001-01-10,much';
  const text = flows(
    rows,
    days('0002', 30, () => '0'),
  );
  await send(page, file('stations.csv', REGISTRY), file('flows.csv', text));
  await page.getByLabel('Imported by').fill('Ada');
  await start(page);
  await taken(page);
  const report = page.getByRole('region', { name: 'Report on flows.csv' });
  expect((await report.textContent()) ?? '').toContain('one row a station and day');
  const rejected = report.getByRole('region', { name: /Rejected rows/ });
  expect(await rejected.textContent()).toContain('0001,2001-01-10,much');
  const counts = await report.locator('dl > div').allTextContents();
  expect(counts.some((count) => /rows read/.test(count) && /430/.test(count))).toBe(true);
  expect(counts.some((count) => /accepted/.test(count) && /429/.test(count))).toBe(true);
  expect(await report.getByRole('row', { name: /^0001/ }).textContent()).toContain('2002-02-04');
  const history = page.getByRole('region', { name: 'Imports so far' }).last();
  await expect.poll(() => history.textContent()).toContain('Ada');
  const [newest] = (await fetchJson(`/api/regions/${slug}/imports`)) as { sha256: string; fileName: string }[];
  expect(newest.fileName).toBe('flows.csv');
  expect(await history.textContent()).toContain(newest.sha256.slice(0, 8));
  expect(await stationCodes(slug)).toEqual(['0001', '0002']);
});

test('all rejected rows can be had as CSV', async () => {
  const { page } = await importPage();
  await send(page, file('flows.csv', flows(days('0001', 60, (day) => (day < 30 ? 'not read' : '1.5')))));
  await start(page);
  await taken(page);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'All of them as CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  expect(text.trim().split(/\r?\n/).length).toBe(31);
});

test('a bad station list names row, value and remedy, is listed as unreadable, and can be left out', async () => {
  const { page, slug } = await importPage();
  const registry = `${REGISTRY}\n0003,Cold at Weir,Cold,95,14,50`;
  await send(page, file('stations.csv', registry), file('flows.csv', flows(days('0001', 40, () => '1'))));
  const panel = await show(page, 'stations.csv');
  const text = (await panel.textContent()) ?? '';
  expect(text).toMatch(/[Rr]ow 4/);
  expect(text).toContain('95');
  const button = page.getByRole('button', { name: /^Import \d/ });
  expect(await button.isDisabled()).toBe(true);
  await page.getByLabel('Take stations.csv').uncheck();
  expect(await button.isDisabled()).toBe(false);
  expect(await fetchJson(`/api/regions/${slug}/imports`)).toEqual([]);
  await start(page);
  await taken(page);
  expect(await stationCodes(slug)).toEqual(['0001']);
});

test('what only reading all of a file shows sends it back to its panel, and nothing was changed', async () => {
  const { page, slug } = await importPage();
  const rows = days('0001', 30_000, () => '1.5');
  rows.push('0001,2001-01-01,9.5');
  await send(page, file('flows.csv', flows(rows)));
  expect(await standing(page, 'flows.csv').textContent()).toContain('ready');
  await start(page);
  await standing(page, 'cannot be read').waitFor();
  await expect.poll(() => page.getByRole('article', { name: 'flows.csv' }).textContent()).toContain('9.5');
  expect(await fetchJson(`/api/regions/${slug}/imports`)).toEqual([]);
});

test('a region is made by its first import, and giving up leaves none', async () => {
  const before = (await fetchJson('/api/regions')) as unknown[];
  const page = await newPage('/');
  await hydrated(page);
  await send(page, file('flows.csv', flows(days('0001', 40, () => '1'))));
  await page.getByRole('button', { name: 'Give up' }).click();
  await page.getByText('Drop files here').waitFor();
  expect(((await fetchJson('/api/regions')) as unknown[]).length).toBe(before.length);
  await send(page, file('flows.csv', flows(days('0001', 40, () => '1'))));
  const name = `Made by import ${Date.now()}`;
  await page.getByLabel('Name of the new region').fill(name);
  await start(page);
  await taken(page);
  const slug = name.toLowerCase().replaceAll(' ', '-');
  willBeMade(slug);
  await page.getByRole('link', { name: 'Open the map' }).waitFor();
  expect(await page.getByRole('link', { name: 'Open the map' }).getAttribute('href')).toBe(`/regions/${slug}`);
  expect(await stationCodes(slug)).toEqual(['0001']);
});

test('undo says what will happen, asks first, then takes values and stations away again', async () => {
  const { page, slug } = await importPage();
  await send(page, file('flows.csv', flows(days('0001', 40, () => '1'))));
  await start(page);
  await taken(page);
  await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
  const dialog = page.getByRole('alertdialog');
  await dialog.getByRole('heading', { name: 'Undo the import of flows.csv?' }).waitFor();
  expect(await dialog.textContent()).toContain('40 days had no value before it');
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  expect(((await fetchJson(`/api/regions/${slug}/imports`)) as unknown[]).length).toBe(1);
  await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
  await dialog.getByRole('button', { name: 'Undo the import' }).click();
  await page.getByText('None yet.').waitFor();
  expect(await stationCodes(slug)).toEqual([]);
});

test('a running import survives a closed page, can be cancelled, and leaves nothing but its files to go on with', async () => {
  const { page, slug } = await importPage();
  await page.setInputFiles('input[type=file]:not([data-folder])', slowFile());
  await page.getByRole('heading', { name: '1 file to import' }).waitFor();
  await start(page);
  await page.getByRole('progressbar').waitFor();
  await page.getByText(/rows a second · about \d+ (second|minute)s? left · the page may be closed/).waitFor();
  await page.goto(`/regions/${slug}/import`);
  await hydrated(page);
  await page.getByRole('button', { name: 'Cancel' }).click();
  await page.getByText('Cancelled. Nothing was changed.').waitFor();
  expect(await fetchJson(`/api/regions/${slug}/imports`)).toEqual([]);
  await page.getByRole('heading', { name: '1 file to import' }).waitFor();
  await page.getByRole('button', { name: 'Give up' }).click();
  await page.getByText('Drop files here').waitFor();
  // the screen does not wait until so large a file has gone
  await expect.poll(() => fetchJson(`/api/regions/${slug}/uploads`)).toEqual([]);
}, 120_000);

test('an upload waits: its address brings it back with what was said, and the page offers it', async () => {
  const { page, slug } = await importPage();
  await send(page, file('flows.csv', unitless(days('0001', 40, () => '1'))));
  await page.getByLabel('Unit of the values').selectOption('L/s');
  await standing(page, 'ready').waitFor();
  await page.reload();
  await standing(page, 'ready').waitFor();
  await expect.poll(() => page.getByLabel('Unit of the values').inputValue()).toBe('L/s');
  await page.goto(`/regions/${slug}/import`);
  await hydrated(page);
  await page
    .getByRole('region', { name: 'Files that wait for their import' })
    .getByRole('button', { name: 'Go on' })
    .click();
  await standing(page, 'ready').waitFor();
});

test('files and folders are dropped, and archives are unpacked', async () => {
  const { page } = await importPage();
  const archive = zipSync({ 'a/0001.csv': strToU8(unitless(days('0001', 40, () => '1'))) });
  const transfer = await page.evaluateHandle(
    (bytes) => {
      const data = new DataTransfer();
      data.items.add(new File([new Uint8Array(bytes)], 'all.zip'));
      data.items.add(new File(['station,date,flow_m3s\n0002,2001-01-01,1\n0002,2001-01-02,1\n'], 'dropped.csv'));
      return data;
    },
    [...archive],
  );
  await page.getByRole('region', { name: 'Files to import' }).dispatchEvent('drop', { dataTransfer: transfer });
  await page.getByRole('heading', { name: '2 files to import' }).waitFor();
  await standing(page, '0001.csv').waitFor();
  await standing(page, 'dropped.csv').waitFor();
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)('keeps WCAG 2.2 AA and its width in every state, %s at %i pixels', async (colorScheme, width) => {
  const { page } = await importPage({ colorScheme, width, height: 844 });
  const fits = async () => {
    expect(await accessibilityProblems(page)).toEqual([]);
    const over = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(over).toBeLessThanOrEqual(0);
  };
  const rows = days('0001', 60, (day) => (day === 3 ? 'not read' : '1.5'));
  await send(page, file('flows.csv', unitless(rows)));
  await fits();
  await page.getByText('Signs, missing values and other terms').click();
  await fits();
  await page.getByLabel('Unit of the values').selectOption('m3/s');
  await standing(page, 'ready').waitFor();
  await start(page);
  await taken(page);
  await fits();
  await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
  await page.getByRole('alertdialog').waitFor();
  await fits();
});
