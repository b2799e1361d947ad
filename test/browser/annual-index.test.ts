import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import { demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage, type PageOptions } from './harness.ts';

let slug: string;
let steepest: string;

beforeAll(async () => {
  slug = await demoRegion();
  const { stations } = (await fetchJson(`/api/regions/${slug}/ranking?index=minimum-date`)) as {
    stations: { station_code: string }[];
  };
  steepest = stations[0].station_code;
});

async function open(path: string, options: PageOptions = {}): Promise<Page> {
  const page = await newPage(`/regions/${slug}${path}`, options);
  await hydrated(page);
  return page;
}

const parameter = (page: Page, name: string) => new URL(page.url()).searchParams.get(name);
const headline = (page: Page) => page.getByRole('region', { name: 'Terms of comparison' }).locator('strong');

test('another index is chosen in the sentence by keyboard: sentence, headline, list and marks speak of it', async () => {
  const page = await open('');
  await page.getByRole('button', { name: '7-day minima' }).focus();
  await page.keyboard.press('Enter');
  await page.getByRole('radio', { name: /^The lowest flow/ }).focus();
  // past Q95, mean flow, zero-flow days
  for (let step = 0; step < 4; step++) await page.keyboard.press('ArrowDown');
  expect(await page.getByRole('radio', { name: /^Date of the lowest flow/ }).isChecked()).toBe(true);
  expect(await accessibilityProblems(page)).toEqual([]);
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: 'dates of the 7-day minimum' }).waitFor();
  expect(parameter(page, 'index')).toBe('minimum-date');
  await page.getByRole('button', { name: 'days per decade' }).waitFor();
  expect(await headline(page).textContent()).toMatch(
    /ranked stations (has|have) .* earlier and .* later, with at most 10/,
  );
  await page.getByRole('columnheader', { name: /Dates of lows/ }).waitFor();
  expect(await page.getByRole('cell', { name: /^[−+]\d.*(earlier|later|may be chance)/ }).count()).toBeGreaterThan(5);
  await page.getByText(/10 days a decade stands at 45°/).waitFor();
});

test('each serial correction says what it lets through where it is chosen', async () => {
  const page = await open('');
  await page.getByRole('button', { name: /^Mann–Kendall/ }).click();
  await page.getByRole('radio', { name: /^Not corrected/ }).waitFor();
  const rates = await page.getByText(/^False alarms [\d.]+ \/ [\d.]+ \/ [\d.]+ %\.$/).allTextContents();
  expect(rates).toHaveLength(6);
  await page.getByRole('radio', { name: /^Every significant lag/ }).check();
  await page.getByRole('button', { name: 'Apply' }).click();
  await page.getByRole('button', { name: /corrected for all significant lags/ }).waitFor();
  expect(parameter(page, 'serialCorrection')).toBe('all-lags');
});

test('a station’s page draws dates as dates and says earlier or later', async () => {
  const page = await open(`/stations/${steepest}?index=minimum-date`);
  await page.getByRole('heading', { name: 'Dates of lows' }).waitFor();
  await page.getByText(/^Earlier: the date of the 7-day minimum came \d+ days earlier per decade/).waitFor();
  await page.getByText('Date of the lowest 7-day mean of each year', { exact: true }).first().waitFor();
  const slider = page.getByRole('slider', { name: /^Date of the lowest 7-day mean of each year, at/ });
  await slider.focus();
  await page.keyboard.press('End');
  await page.keyboard.press('ArrowLeft');
  expect(await slider.getAttribute('aria-valuetext')).toMatch(
    /^\d{4}\/\d\d: (\d{1,2} [A-Z][a-z]+, in the 7 days to|no figure used)/,
  );
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('on a phone the form of the index is whole and nothing runs over the edge', async () => {
  const page = await open('?index=deficit', { width: 390, height: 700 });
  await page.getByRole('button', { name: 'deficit volumes below Q90' }).click();
  await page.getByRole('radio', { name: /^Deficit volume/ }).waitFor();
  // the buttons are in sight though the form scrolls
  const box = (await page.getByRole('button', { name: 'Apply' }).boundingBox())!;
  expect(box.y + box.height).toBeLessThanOrEqual(700);
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
});
