import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import {
  layOutPeriods,
  periodCount,
  periodsByWorth,
  periodXY,
} from '../../app/regions/[region]/records/_periods/period-grid.ts';
import type { CommonPeriods } from '../../lib/jobs/records-types.ts';
import { demoRegion, fetchJson } from './demo-region.ts';
import { hydrated, newPage } from './harness.ts';

let slug: string;
let periods: CommonPeriods;

beforeAll(async () => {
  slug = await demoRegion();
  periods = (await fetchJson(`/api/regions/${slug}/common-periods`)) as CommonPeriods;
});

const chart = (page: Page) => page.getByRole('application', { name: /^Chart of start years/ });
const sentence = (page: Page) => page.getByRole('region', { name: 'Terms of comparison' });

async function periodsPage(query = '', options = {}) {
  const page = await newPage(`/regions/${slug}/records?show=periods${query}`, options);
  await hydrated(page);
  await chart(page).waitFor();
  return page;
}

async function placeOf(page: Page, first: number, last: number) {
  const width = await chart(page).evaluate((element) => element.parentElement!.clientWidth);
  const layout = layOutPeriods(periods, width)!;
  const [x, y] = periodXY(layout, first, last);
  return { x: x + layout.cellWidth / 2, y: y + layout.cellHeight / 2 };
}

test('the common period is the one with the most station-years, by the list as by the ranking', async () => {
  const [best] = periodsByWorth(periods);
  const { basis } = (await fetchJson(`/api/regions/${slug}/ranking`)) as { basis: { period: [number, number] } };
  expect([best.first, best.last]).toEqual(basis.period);
  expect(periods.common).toEqual(basis.period);
});

test('the pointer reads what a period keeps, as the ranking over it says; a click makes it the basis’s', async () => {
  const page = await periodsPage();
  const [first, last] = [periods.common![0] + 3, periods.common![1] - 2];
  const position = await placeOf(page, first, last);
  await chart(page).hover({ position });
  const { ranked } = periodCount(periods, first, last)!;
  const { counts } = (await fetchJson(`/api/regions/${slug}/ranking?period=${first}-${last}`)) as {
    counts: { ranked: number };
  };
  expect(ranked).toBe(counts.ranked);
  await expect
    .poll(() => page.getByTestId('period-readout').textContent())
    .toContain(`${first}–${last}: ${ranked} of ${periods.stations} stations`);
  await chart(page).click({ position });
  await expect.poll(() => new URL(page.url()).searchParams.get('period')).toBe(`${first}-${last}`);
  await expect.poll(() => sentence(page).textContent()).toContain(`${first}–${last},`);
  await page.getByText(`The basis’s period is now ${first}–${last}`).waitFor();
  await page.getByRole('button', { name: /^Use the common period/ }).click();
  await expect.poll(() => sentence(page).textContent()).toContain('(the common period)');
  expect(new URL(page.url()).searchParams.has('period')).toBe(false);
});

test('by keyboard: arrows move both ends, Enter makes the period the basis’s', async () => {
  const page = await periodsPage();
  await chart(page).focus();
  await page.keyboard.press('ArrowLeft');
  await page.keyboard.press('ArrowUp');
  const [first, last] = [periods.common![0] - 1, periods.common![1] - 1];
  await expect.poll(() => page.getByTestId('period-readout').textContent()).toContain(`${first}–${last}`);
  await page.keyboard.press('Enter');
  await expect.poll(() => new URL(page.url()).searchParams.get('period')).toBe(`${first}-${last}`);
});

test('completeness is the basis’s: fewer years asked for, more periods to choose from', async () => {
  const page = await periodsPage();
  const form = page.getByRole('form', { name: 'Completeness' });
  await form.getByLabel('Usable years at least').fill('15');
  await form.getByLabel('and of the period, %').fill('90');
  await form.getByRole('button', { name: 'Count anew' }).click();
  await expect.poll(() => sentence(page).textContent()).toContain('at least 15 usable years');
  await expect.poll(() => sentence(page).textContent()).toContain('90 % of the period');
  const { searchParams } = new URL(page.url());
  expect([searchParams.get('minYears'), searchParams.get('minCoverage')]).toEqual(['15', '0.9']);
  const fewer = (await fetchJson(`/api/regions/${slug}/common-periods?minYears=15&minCoverage=0.9`)) as CommonPeriods;
  expect(periodsByWorth(fewer).length).toBeGreaterThan(0);
  await page.getByText('As a table: stations by start and end year').click();
  const table = page.getByRole('region', { name: 'Stations by start and end year' });
  await expect.poll(() => table.getByRole('row').count()).toBe(layOutPeriods(fewer, 900)!.count + 1);
});

test('the list of the best periods needs no chart', async () => {
  const page = await periodsPage();
  const [, second] = periodsByWorth(periods);
  await page.getByRole('button', { name: `Use it: ${second.first}–${second.last}` }).click();
  await expect.poll(() => new URL(page.url()).searchParams.get('period')).toBe(`${second.first}-${second.last}`);
});
