import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import type { RegionBreaks } from '../../lib/region/break-types.ts';
import type { RegionalAnswers } from '../../lib/region/regional-types.ts';
import type { Alternative, RankingMovement } from '../../lib/region/window-types.ts';
import { demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';

let slug: string;
let answers: RegionalAnswers;

const ask = <Value>(table: string): Promise<Value> => fetchJson(`/api/regions/${slug}/${table}`) as Promise<Value>;

beforeAll(async () => {
  slug = await demoRegion();
  answers = await ask<RegionalAnswers>('regional');
});

const section = (page: Page, id: string) => page.locator(`section#${id}`);
const answer = (page: Page, id: string) => page.locator(`[data-answer="${id}"] dd`);

/** The page with every answer there. */
async function evidencePage(query = '', options = {}) {
  const page = await newPage(`/regions/${slug}/evidence${query}`, options);
  await hydrated(page);
  await section(page, 'terms').getByRole('table').waitFor();
  return page;
}

test('the plain sentences stand first: those of all stations, then of the natural ones, each with the way to its figures', async () => {
  const page = await evidencePage();
  const [all] = answers.groups;
  const natural = answers.groups.find(({ id, set }) => id === 'influence:natural' && set === 'all');
  expect(await answer(page, 'chance').locator('p').allTextContents()).toEqual([
    all.sentences.chance,
    natural?.sentences.chance,
  ]);
  expect(await answer(page, 'common').locator('p').first().textContent()).toBe(all.sentences.kendall);
  for (const id of ['years', 'terms', 'breaks'])
    expect((await answer(page, id).textContent())?.length).toBeGreaterThan(40);
  const above = await page.evaluate(() => {
    const [sentences, table] = [document.querySelector('[data-answer] dd'), document.querySelector('main table')];
    return sentences && table && sentences.compareDocumentPosition(table) === Node.DOCUMENT_POSITION_FOLLOWING;
  });
  expect(above).toBe(true);
  await page.getByRole('link', { name: 'By the years chosen' }).first().click();
  await expect.poll(() => new URL(page.url()).hash).toBe('#years');
});

test('beyond chance: the table has every group’s counts as the interface tells them, and the way of imitating chance is in the address', async () => {
  const page = await evidencePage();
  const row = (id: string, set = 'all') => section(page, 'chance').locator(`tr[data-group="${id}"][data-set="${set}"]`);
  const cells = async (id: string) => (await row(id).locator('td').allTextContents()).join(' ');
  const [{ ranked, falling }] = answers.groups;
  expect(await cells('all')).toContain(`${ranked} ${falling?.count} up to ${falling?.bound}`);
  await page.getByRole('radio', { name: 'years drawn anew, with carry-over' }).check();
  await expect.poll(() => new URL(page.url()).searchParams.get('chance')).toBe('sieve');
  const sieved = await ask<RegionalAnswers>('regional?method=sieve');
  const found = sieved.groups[0].falling;
  await expect.poll(() => cells('all')).toContain(`${found?.count} up to ${found?.bound}`);
  expect(sieved.method).toBe('sieve');
});

test('a group is drawn by keyboard alone, or given as text, and stands in the table and the address', async () => {
  const page = await evidencePage();
  await page.getByText('Draw a group of stations').click();
  const map = page.getByRole('button', { name: /^Map of the stations/ });
  for (const moves of [
    ['ArrowLeft', 'ArrowUp'],
    ['ArrowRight', 'ArrowUp'],
    ['ArrowDown', 'ArrowDown'],
  ]) {
    await map.focus();
    await page.keyboard.press('Enter');
    // the new corner has the focus: ten steps of eight pixels each way
    for (const key of moves) for (let step = 0; step < 10; step++) await page.keyboard.press(key);
  }
  const held = page.getByText(/ranked stations lies? inside 3 corners|ranked stations lie inside 3 corners/);
  await held.waitFor();
  await page.getByRole('button', { name: /^Corner 1/ }).focus();
  await page.keyboard.press('Delete');
  await page.getByText('2 corners: an area needs three.').waitFor();

  await page.getByLabel('Corners as longitude,latitude;…').fill('-180,-80;180,-80;180,80;-180,80');
  await page.getByRole('button', { name: 'Draw it' }).click();
  await page.getByRole('button', { name: 'Test this group' }).click();
  await expect.poll(() => new URL(page.url()).searchParams.get('area')).toBe('-180,-80;180,-80;180,80;-180,80');
  const drawn = section(page, 'chance').locator('tr[data-group="drawn"][data-set="all"] td').first();
  await expect.poll(() => drawn.textContent()).toBe(String(answers.groups[0].ranked));
  await page.getByRole('button', { name: 'Take the group away' }).click();
  await expect.poll(() => new URL(page.url()).searchParams.get('area')).toBeNull();
  await expect.poll(() => drawn.count()).toBe(0);
});

test('corners that cannot be drawn are refused in words', async () => {
  const page = await evidencePage();
  await page.getByText('Draw a group of stations').click();
  await page.getByLabel('Corners as longitude,latitude;…').fill('7.5,47;8,91;8,47');
  expect(await page.getByRole('alert').filter({ hasText: 'cannot be drawn' }).textContent()).toContain('"8,91"');
  expect(await page.getByRole('button', { name: 'Draw it' }).isDisabled()).toBe(true);
});

test('by the years: the arrow keys read a window as the interface has it', async () => {
  const chart =
    await ask<Record<'starts' | 'ends' | 'stations' | 'negative' | 'falling' | 'rising', number[]>>('start-end');
  const page = await evidencePage();
  const figure = section(page, 'years').getByRole('application');
  await figure.focus();
  await page.keyboard.press('Home');
  await page.keyboard.press('ArrowDown');
  const at = chart.ends.length + chart.ends.length - 1;
  const said = section(page, 'years').getByRole('status').first();
  await expect
    .poll(() => said.textContent())
    .toContain(`${chart.starts[1]}–${chart.ends.at(-1)}: ${chart.negative[at]} of ${chart.stations[at]} stations`);
  await section(page, 'years').getByText('As a table').click();
  const cell = section(page, 'years').locator('tbody tr').first().locator('td').last();
  const last = chart.ends.length - 1;
  expect(await cell.textContent()).toContain(
    `${chart.falling[last]}, ${chart.rising[last]} of ${chart.stations[last]}`,
  );
});

test('by the terms: every choice as the interface has it, who moved, and a click that makes it the basis', async () => {
  const { alternatives } = await ask<{ alternatives: Alternative[] }>('alternatives');
  const page = await evidencePage();
  const terms = section(page, 'terms');
  const thirty = alternatives.find(({ change }) => change.days === '30');
  const row = terms.getByRole('row', { name: /^30-day minima/ });
  expect((await row.locator('td').allTextContents()).slice(0, 3).map(Number)).toEqual([
    thirty?.ranked,
    thirty?.falling,
    thirty?.rising,
  ]);
  await row.getByRole('button', { name: /^Who moved/ }).click();
  const { movements } = await ask<RankingMovement>('movement?against=days%3D30');
  await expect.poll(() => terms.locator('ol li').first().textContent()).toContain(movements[0].name);
  await row.getByRole('button', { name: /^Use these/ }).click();
  await expect.poll(() => new URL(page.url()).searchParams.get('days')).toBe('30');
  await expect
    .poll(() => page.getByRole('region', { name: 'Terms of comparison' }).textContent())
    .toContain('30-day minima');
  // back to the region's own: nothing is left in the address
  await terms.getByRole('button', { name: 'Use these terms: 7-day minima' }).click();
  await expect.poll(() => new URL(page.url()).search).toBe('');
});

test('before and after: a break is chosen and taken away, and the table is that of the interface', async () => {
  const page = await evidencePage();
  const breaks = section(page, 'breaks');
  await breaks.getByLabel('First low-flow year after a break').fill('2000');
  await page.keyboard.press('Enter');
  await expect.poll(() => new URL(page.url()).searchParams.get('breaks')).toBe('2000');
  const { stations, summary } = await ask<RegionBreaks>('breaks?breaks=2000');
  const rows = stations.flatMap(({ steps }) => steps).length;
  await expect.poll(() => breaks.locator('tbody tr').count()).toBe(rows);
  await expect.poll(() => answer(page, 'breaks').textContent()).toContain(`of ${summary[0].tested} comparisons`);
  await breaks.getByRole('button', { name: /^Remove the break/ }).click();
  await expect.poll(() => new URL(page.url()).search).toBe('');
});

test('every section has its figures as a file', async () => {
  const page = await evidencePage();
  for (const id of ['chance', 'common', 'years', 'terms', 'breaks']) {
    const href = await section(page, id).getByRole('link', { name: /CSV$/ }).first().getAttribute('href');
    const response = await page.request.get(String(href));
    expect(response.status(), id).toBe(200);
    expect(response.headers()['content-type'], id).toContain('text/csv');
  }
});

test.each(['light', 'dark'] as const)('nothing breaks WCAG 2.2 AA, %s', async (colorScheme) => {
  const page = await evidencePage('?area=-180,-80;180,-80;180,80;-180,80&breaks=2000', { colorScheme });
  await page.getByText('Change the drawn group').click();
  await page.getByRole('button', { name: /^Map of the stations/ }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('on a phone nothing but tables and charts is wider than the screen', async () => {
  const page = await evidencePage('', { width: 390, height: 844 });
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390);
});
