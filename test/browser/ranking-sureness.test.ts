import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import type { Certainty } from '../../lib/region/certainty-types.ts';
import type { RankingMovement } from '../../lib/region/window-types.ts';
import { demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, expectTrouble, hydrated, newPage, type PageOptions } from './harness.ts';

/** A busy machine may take its time; what never comes about still fails. */
const eventually = <T>(look: () => T | Promise<T>) => expect.poll(look, { timeout: 15_000 });

let slug: string;
let certainty: Certainty;

beforeAll(async () => {
  slug = await demoRegion();
  certainty = (await fetchJson(`/api/regions/${slug}/certainty`)) as Certainty;
});

async function openMap(query = '', options: PageOptions = {}): Promise<Page> {
  const page = await newPage(`/regions/${slug}${query}`, options);
  await hydrated(page);
  return page;
}

const parameter = (page: Page, name: string) => new URL(page.url()).searchParams.get(name);
const row = (page: Page, code: string) => page.locator(`tr[data-code="${code}"]`);
/** Text of a station's cell under a heading. */
async function cell(page: Page, code: string, heading: RegExp): Promise<string> {
  const headings = await page.locator('thead th').allTextContents();
  const column = headings.findIndex((text) => heading.test(text));
  return (await row(page, code).locator('th, td').nth(column).textContent()) ?? '';
}
const spanText = ({ rankLow, rankHigh }: Certainty['spans'][number]) =>
  rankLow === rankHigh ? String(rankLow) : `${rankLow}–${rankHigh}`;

test('every place comes with its span and its probability of being among the five steepest', async () => {
  const page = await openMap();
  for (const span of certainty.spans.slice(0, 8)) {
    await eventually(() => cell(page, span.code, /^Rank span/)).toBe(spanText(span));
    const share = span.amongSteepest[4];
    const text = share > 0.99 && share < 1 ? '>\u00a099\u00a0%' : `${Math.round(share * 100)}\u00a0%`;
    expect(await cell(page, span.code, /^Among the/)).toBe(share > 0 && share < 0.01 ? '<\u00a01\u00a0%' : text);
    expect(await cell(page, span.code, /^Steadiness/)).toMatch(/^([<>]\u00a0)?\d+\u00a0%$/);
  }
});

test('how many of the steepest are asked after is changed by keyboard, stands in the address and goes along', async () => {
  const page = await openMap();
  const [first] = certainty.spans;
  await eventually(() => cell(page, first.code, /^Rank span/)).toBe(spanText(first));
  const field = page.getByLabel('Among the steepest declines');
  await field.focus();
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('ArrowDown');
  await eventually(() => parameter(page, 'k')).toBe('3');
  await page.getByRole('columnheader', { name: 'Among the 3 steepest' }).waitFor();
  expect(await cell(page, first.code, /^Among the/)).toContain(`${Math.round(first.amongSteepest[2] * 100)}`);
  const link = await row(page, first.code).getByRole('link').getAttribute('href');
  expect(new URL(link ?? '', 'http://x').searchParams.get('k')).toBe('3');
});

test('an address with a number of steepest that is none shows five', async () => {
  const page = await openMap('?k=0');
  await page.getByRole('columnheader', { name: 'Among the 5 steepest' }).waitFor();
});

test('what fills the discs is chosen in the legend, drawn, explained and kept in the address', async () => {
  const page = await openMap();
  const picture = () =>
    page
      .locator('.leaflet-needles-pane canvas')
      .first()
      .evaluate((canvas) => (canvas as HTMLCanvasElement).toDataURL());
  await page.locator('.leaflet-needles-pane canvas').first().waitFor({ state: 'attached' });
  await eventually(() => cell(page, certainty.spans[0].code, /^Rank span/)).toBe(spanText(certainty.spans[0]));
  const bySignificance = await picture();
  await page.getByLabel('Filled by').selectOption('span');
  await page.getByText('one place', { exact: true }).waitFor();
  await eventually(picture).not.toBe(bySignificance);
  const bySpan = await picture();
  await page.getByLabel('Filled by').selectOption('steepest');
  await page.getByRole('option', { name: 'chance to be among the 5 steepest' }).waitFor({ state: 'attached' });
  await eventually(picture).not.toBe(bySpan);
  await eventually(() => parameter(page, 'fill')).toBe('steepest');
  await page.reload();
  await hydrated(page);
  expect(await page.getByLabel('Filled by').inputValue()).toBe('steepest');
  await page.getByText('75\u00a0%', { exact: true }).first().waitFor();
});

test('the ranking can be used while the spans are worked out, and a station says its place when they are', async () => {
  const page = await newPage();
  let answer = () => {};
  const asked = new Promise<void>((resolve) => {
    answer = resolve;
  });
  await page.route('**/certainty*', async (route) => {
    await asked;
    await route.continue();
  });
  await page.goto(`/regions/${slug}`);
  await hydrated(page);
  const [first] = certainty.spans;
  await page.getByText('Working out the rank spans').waitFor();
  expect(await cell(page, first.code, /^Rank span/)).toBe('…');
  await row(page, first.code).locator('td').first().click();
  await eventually(() => parameter(page, 'station')).toBe(first.code);
  answer();
  await page
    .getByRole('region', { name: 'Map' })
    .getByText(new RegExp(`Place ${spanText(first)} of ${certainty.spans.length} with 90`))
    .last()
    .waitFor();
});

test('why there are no spans is said with a way to try again, and the ranking stands', async () => {
  const page = await newPage();
  let fail = true;
  await page.route('**/certainty*', (route) =>
    fail ? route.fulfill({ status: 409, json: { detail: 'It was cancelled elsewhere.' } }) : route.continue(),
  );
  expectTrouble(page, /409/);
  await page.goto(`/regions/${slug}`);
  await hydrated(page);
  await page.getByText('The rank spans could not be worked out: It was cancelled elsewhere.').waitFor();
  const [first] = certainty.spans;
  expect(await cell(page, first.code, /^Rank span/)).toBe('–');
  fail = false;
  await page.getByRole('button', { name: 'Try again' }).click();
  await eventually(() => cell(page, first.code, /^Rank span/)).toBe(spanText(first));
});

test('stations that cannot be told apart are said to be so', async () => {
  const page = await newPage();
  const places = certainty.spans.length;
  const level = { ...certainty, toldApart: false };
  level.spans = certainty.spans.map((span) => ({ ...span, rankLow: 1, rankHigh: places }));
  await page.route('**/certainty*', (route) => route.fulfill({ json: level }));
  await page.goto(`/regions/${slug}`);
  await page.getByText(/^These stations cannot be told apart/).waitFor();
  await eventually(() => cell(page, certainty.spans[0].code, /^Rank span/)).toBe(`1–${places}`);
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('on other terms the ranking says who moved against the region’s own, and how far', async () => {
  const movement = (await fetchJson(`/api/regions/${slug}/movement?days=30`)) as RankingMovement;
  const page = await openMap('?days=30');
  const [furthest] = movement.movements;
  const keep = movement.rankedBoth - movement.movedFar;
  await page
    .getByText(`${keep} of ${movement.rankedBoth} stations ranked in both keep within a tenth of the places`)
    .waitFor();
  await page.getByText(`${furthest.name} moved furthest`).waitFor();
  const mover = movement.movements.find(({ moved }) => (moved ?? 0) > 0);
  if (!mover) throw new Error('nobody moved up in the demo region under 30-day minima');
  await row(page, mover.code)
    .getByText(`${mover.moved} up from ${mover.before} on the region’s own terms`)
    .waitFor({ state: 'attached' });
  await page.getByRole('button', { name: 'go back to those' }).click();
  await page.getByText('moved furthest').waitFor({ state: 'detached' });
});

test('what a record could have shown stands beside what may be chance, and not beside what is significant', async () => {
  const page = await openMap();
  const rows = await page.locator('tbody tr[data-code]').allTextContents();
  await eventually(async () => (await page.locator('tbody').textContent()) ?? '').toMatch(/detectable ±/);
  const texts = await page.locator('tbody tr[data-code]').allTextContents();
  expect(rows.length).toBeGreaterThan(5);
  for (const text of texts) expect(/detectable ±[\d.]+/.test(text), text).toBe(/may be chance/.test(text));
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)('what is said of the places breaks no rule and no width (%s, %i wide)', async (colorScheme, width) => {
  const page = await openMap('?days=30&fill=steepest&k=3', { colorScheme, width, height: 844 });
  await page.getByText('moved furthest').waitFor();
  await page.getByRole('button', { name: 'What these say' }).click();
  await page.getByRole('heading', { name: 'How sure is a place?' }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(width);
});
