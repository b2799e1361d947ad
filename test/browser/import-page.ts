/** What the tests of the import screen stand on: a region of its own, files made on the spot, the screen's steps. */
import { Buffer } from 'node:buffer';
import type { Page } from 'playwright-core';
import { afterEach } from 'vitest';
import { deleteRegion, fetchJson, newRegion } from './demo-region.ts';
import { hydrated, newPage, type PageOptions } from './harness.ts';

const made: string[] = [];
afterEach(async () => {
  for (const slug of made.splice(0)) await deleteRegion(slug);
});

/** The import page of a new, empty region, which goes again after the test. */
export async function importPage(options: PageOptions = {}): Promise<{ page: Page; slug: string }> {
  const slug = await newRegion('Import test');
  made.push(slug);
  const page = await newPage(`/regions/${slug}/import`, options);
  await hydrated(page);
  return { page, slug };
}

/** Takes away a region that a test has made by itself. */
export const willBeMade = (slug: string): number => made.push(slug);

export interface TestFile {
  name: string;
  mimeType: string;
  buffer: Buffer;
}

export const file = (name: string, text: string | Uint8Array): TestFile => ({
  ...{ name, mimeType: 'application/octet-stream' },
  buffer: Buffer.from(text as Uint8Array),
});

/** Chooses files, and waits until they have been sent and looked at. */
export async function send(page: Page, ...files: TestFile[]): Promise<void> {
  await page.setInputFiles('input[type=file]:not([data-folder])', files);
  await page.getByRole('heading', { name: /files? to import$/ }).waitFor();
  await page.locator('article[aria-busy=false]').waitFor();
}

/** The panel of one file; selects the file first. */
export async function show(page: Page, name: string) {
  await page.getByRole('navigation', { name: 'Files' }).getByRole('button', { name }).click();
  const panel = page.getByRole('article', { name, exact: true });
  await settled(page);
  return panel;
}

/** Waits until the file at hand has been looked at under the last choice. */
export async function settled(page: Page): Promise<void> {
  // longer than a choice takes to be sent
  await page.waitForTimeout(250);
  await page.locator('article[aria-busy=false]').waitFor();
}

export const standing = (page: Page, name: string) =>
  page.getByRole('navigation', { name: 'Files' }).getByRole('button', { name });

export const start = (page: Page) => page.getByRole('button', { name: /^Import \d+ files?$/ }).click();
export const compare = async (page: Page) => {
  await page.getByRole('button', { name: /^Compare \d+ files? with what stands$/ }).click();
  await page.getByRole('heading', { name: 'What the import would do' }).waitFor();
};
export const taken = (page: Page) => page.getByRole('heading', { name: /files? taken$/ }).waitFor();

export const REGISTRY = [
  'code,name,river,lat,lon,area_km2',
  '0001,Aldery at Ford,Aldery,46.1,14.2,120',
  '0002,Brook at Mill,Brook,46.3,14.4,80',
].join('\n');

const isoDay = (day: number): string => new Date(Date.UTC(2001, 0, 1 + day)).toISOString().slice(0, 10);

/** Consecutive days of one station as rows of station, date, flow. */
export function days(code: string, count: number, flow: (day: number) => string, from = 0): string[] {
  return Array.from({ length: count }, (_, day) => `${code},${isoDay(from + day)},${flow(from + day)}`);
}

export const flows = (...rows: string[][]): string => `${['station,date,flow_m3s', ...rows.flat()].join('\n')}\n`;
export const unitless = (...rows: string[][]): string => `${['station,date,flow', ...rows.flat()].join('\n')}\n`;

/** Codes of a region's stations. */
export async function stationCodes(slug: string): Promise<string[]> {
  const { features } = (await fetchJson(`/api/regions/${slug}/stations`)) as {
    features: { properties: { station_code: string } }[];
  };
  return features.map(({ properties }) => properties.station_code).sort();
}
