import { Buffer } from 'node:buffer';
import { appendFileSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterEach, expect, test } from 'vitest';
import { deleteRegion, fetchJson, newRegion } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';

const made: string[] = [];
const madeFiles: string[] = [];
afterEach(async () => {
  for (const path of madeFiles.splice(0)) rmSync(dirname(path), { recursive: true });
  for (const slug of made.splice(0)) await deleteRegion(slug);
});

const importPage = async (options = {}) => {
  const slug = await newRegion('Import test');
  made.push(slug);
  const page = await newPage(`/regions/${slug}/import`, options);
  await hydrated(page);
  return { page, slug };
};

const file = (name: string, text: string) => ({ name, mimeType: 'text/plain', buffer: Buffer.from(text) });
const choose = (page: Page, ...files: ReturnType<typeof file>[]) => page.setInputFiles('input[type=file]', files);
const start = (page: Page) => page.getByRole('button', { name: /^Import \d+ files?$/ }).click();
const taken = (page: Page) => page.getByRole('heading', { name: /files? taken$/ }).waitFor();

const REGISTRY = [
  'code,name,river,lat,lon,area_km2',
  '0001,Aldery at Ford,Aldery,46.1,14.2,120',
  '0002,Brook at Mill,Brook,46.3,14.4,80',
].join('\n');

/** Consecutive days of one station as rows of station, date, flow. */
function days(code: string, count: number, flow: (day: number) => string): string[] {
  return Array.from({ length: count }, (_, day) => {
    const date = new Date(Date.UTC(2001, 0, 1 + day)).toISOString().slice(0, 10);
    return `${code},${date},${flow(day)}`;
  });
}
const flows = (...rows: string[][]) => ['station,date,flow_m3s', ...rows.flat()].join('\n');

/** A file that takes seconds to import, longer than a page takes to come back: eight million rows. */
function slowFile(): string {
  const path = join(mkdtempSync(join(tmpdir(), 'hungerstone-')), 'big.csv');
  const station = days('0000', 40_000, () => '1.234').join('\n');
  writeFileSync(path, 'station,date,flow_m3s\n');
  for (let code = 1000; code < 1200; code++) appendFileSync(path, `${station.replaceAll('0000,', `${code},`)}\n`);
  madeFiles.push(path);
  return path;
}

test('station list and flows together: the report counts every row and lists each rejected one', async () => {
  const { page, slug } = await importPage();
  const rows = days('0001', 400, (day) => (1 + day / 100).toFixed(2));
  rows[9] = '0001,2001-01-10,much';
  await choose(
    page,
    file('stations.csv', REGISTRY),
    file(
      'flows.csv',
      flows(
        rows,
        days('0002', 30, () => '0'),
      ),
    ),
  );
  await page.getByLabel('Imported by').fill('Ada');
  await start(page);
  await taken(page);
  const report = page.getByRole('region', { name: 'Report on flows.csv' });
  const text = (await report.textContent()) ?? '';
  expect(text).toContain('one row a station and day');
  expect(text).toMatch(/rejected\s*1|1\s*rejected/);
  const rejected = report.getByRole('region', { name: /Rejected rows/ });
  expect(await rejected.textContent()).toContain('0001,2001-01-10,much');
  const counts = await report.locator('dl > div').allTextContents();
  expect(counts.some((count) => /rows read/.test(count) && /430/.test(count))).toBe(true);
  expect(counts.some((count) => /accepted/.test(count) && /429/.test(count))).toBe(true);
  const first = report.getByRole('row', { name: /^0001/ });
  expect(await first.textContent()).toContain('2002-02-04');
  const history = page.getByRole('region', { name: 'Imports so far' }).last();
  await expect.poll(() => history.textContent()).toContain('Ada');
  const stations = (await fetchJson(`/api/regions/${slug}/stations`)) as { features: unknown[] };
  expect(stations.features.length).toBe(2);
});

test('all rejected rows can be had as CSV', async () => {
  const { page } = await importPage();
  const rows = days('0001', 60, (day) => (day % 2 ? 'not read' : '1.5'));
  await choose(page, file('flows.csv', flows(rows)));
  await start(page);
  await taken(page);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'All of them as CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  expect(text.trim().split(/\r?\n/).length).toBe(31);
});

test('a file that does not tell its unit is asked for it, and taken once it is given', async () => {
  const { page } = await importPage();
  const rows = ['date,flow', ...days('', 50, () => '12.5').map((row) => row.slice(1))];
  await choose(page, file('0009.csv', rows.join('\n')));
  await start(page);
  await page.getByRole('heading', { name: 'Something has to be told first' }).waitFor();
  const again = page.getByRole('button', { name: 'Try again' });
  expect(await again.isDisabled()).toBe(true);
  await page.getByLabel('Unit of the flows').selectOption('L/s');
  await again.click();
  await taken(page);
  const report = (await page.getByRole('region', { name: 'Report on 0009.csv' }).textContent()) ?? '';
  expect(report).toContain('Daily flows in L/s');
  expect(report).toContain('0009');
});

test('columns of fixed width: the column of the flows is chosen from a preview', async () => {
  const { page } = await importPage();
  const rows = Array.from({ length: 40 }, (_, day) => {
    const date = new Date(Date.UTC(2003, 0, 1 + day));
    const [year, month, dayOfMonth] = [date.getUTCFullYear(), date.getUTCMonth() + 1, date.getUTCDate()];
    const cell = (value: number) => value.toFixed(4).padStart(10);
    return `${year}${String(month).padStart(2)}${String(dayOfMonth).padStart(2)}${cell(3.25)}${cell(1 + day / 10)}${cell(0.5)}`;
  });
  await choose(page, file('0007.txt', rows.join('\n')));
  await start(page);
  await page.getByText('Which column holds the flows?').waitFor();
  await page.getByRole('radio', { name: /1\.0000\s+1\.1000/ }).check();
  const unit = page.getByLabel('Unit of the flows');
  if (await unit.count()) await unit.selectOption('m3/s');
  await page.getByRole('button', { name: 'Try again' }).click();
  await page.getByRole('heading', { name: /files? taken$|Something has to be told first/ }).waitFor();
  if (await unit.count()) {
    await unit.selectOption('m3/s');
    await page.getByRole('button', { name: 'Try again' }).click();
  }
  await taken(page);
  const row = page.getByRole('region', { name: 'Report on 0007.txt' }).getByRole('row', { name: /^0007/ });
  expect(await row.textContent()).toMatch(/4\.90/);
});

test('a bad file names file, row, value and remedy, and leaves everything as it was', async () => {
  const { page, slug } = await importPage();
  const registry = `${REGISTRY}\n0003,Cold at Weir,Cold,95,14,50`;
  await choose(page, file('stations.csv', registry), file('flows.csv', flows(days('0001', 40, () => '1'))));
  await start(page);
  await page.getByRole('heading', { name: 'The files were not taken' }).waitFor();
  const problem = (await page.getByRole('region', { name: 'stations.csv was not taken' }).textContent()) ?? '';
  expect(problem).toMatch(/[Rr]ow 4/);
  expect(problem).toContain('95');
  const stations = (await fetchJson(`/api/regions/${slug}/stations`)) as { features: unknown[] };
  expect(stations.features).toEqual([]);
  expect(await fetchJson(`/api/regions/${slug}/imports`)).toEqual([]);
});

test('unlike values are refused with their count until new ones are wanted', async () => {
  const { page } = await importPage();
  await choose(page, file('first.csv', flows(days('0001', 40, () => '1'))));
  await start(page);
  await taken(page);
  await choose(page, file('second.csv', flows(days('0001', 40, (day) => (day < 5 ? '2' : '1')))));
  await start(page);
  await page.getByRole('region', { name: 'second.csv was not taken' }).waitFor();
  expect(await page.getByRole('region', { name: 'second.csv was not taken' }).textContent()).toContain('5');
  await page.getByLabel(/Take the new values/).check();
  await page.getByRole('button', { name: 'Try again' }).click();
  await taken(page);
});

test('undo asks first, then takes values and stations away again', async () => {
  const { page, slug } = await importPage();
  await choose(page, file('flows.csv', flows(days('0001', 40, () => '1'))));
  await start(page);
  await taken(page);
  await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
  const dialog = page.getByRole('alertdialog');
  await dialog.getByRole('heading', { name: 'Undo the import of flows.csv?' }).waitFor();
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  expect(((await fetchJson(`/api/regions/${slug}/imports`)) as unknown[]).length).toBe(1);
  await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
  await dialog.getByRole('button', { name: 'Undo the import' }).click();
  await page.getByText('None yet.').waitFor();
  const stations = (await fetchJson(`/api/regions/${slug}/stations`)) as { features: unknown[] };
  expect(stations.features).toEqual([]);
});

test('a running import survives a closed page, can be cancelled, and leaves nothing', async () => {
  const { page, slug } = await importPage();
  await page.setInputFiles('input[type=file]', slowFile());
  await start(page);
  await page.getByRole('progressbar').waitFor();
  await page.getByText(/the import goes on/).waitFor();
  await page.reload();
  await hydrated(page);
  await page.getByRole('button', { name: 'Cancel' }).click();
  await page.getByText('Cancelled. Nothing was changed.').waitFor();
  expect(await fetchJson(`/api/regions/${slug}/imports`)).toEqual([]);
}, 120_000);

test('files are dropped, and one can be left out again', async () => {
  const { page } = await importPage();
  const transfer = await page.evaluateHandle(() => {
    const data = new DataTransfer();
    data.items.add(new File(['station,date,flow\n'], 'dropped.csv'));
    data.items.add(new File(['x'], 'other.csv'));
    return data;
  });
  await page.getByRole('region', { name: 'Files to import' }).dispatchEvent('drop', { dataTransfer: transfer });
  await page.getByRole('button', { name: 'Import 2 files' }).waitFor();
  await page.getByRole('button', { name: 'Leave out other.csv' }).click();
  await page.getByRole('button', { name: 'Import 1 file' }).waitFor();
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
] as const)(
  'keeps WCAG 2.2 AA and its width with a report and a dialog, %s at %i pixels',
  async (colorScheme, width) => {
    const { page } = await importPage({ colorScheme, width, height: 844 });
    const rows = days('0001', 60, (day) => (day === 3 ? 'not read' : '1.5'));
    await choose(page, file('flows.csv', flows(rows)));
    expect(await accessibilityProblems(page)).toEqual([]);
    await start(page);
    await taken(page);
    expect(await accessibilityProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
    await page.getByRole('button', { name: 'Undo the import of flows.csv' }).click();
    await page.getByRole('alertdialog').waitFor();
    expect(await accessibilityProblems(page)).toEqual([]);
  },
);
