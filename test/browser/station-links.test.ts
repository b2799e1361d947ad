import { afterAll, beforeAll, expect, test } from 'vitest';
import { deleteRegion, demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, expectTrouble, hydrated, newPage } from './harness.ts';
import { editableRegion } from './station-region.ts';

let slug: string;

beforeAll(async () => {
  slug = await editableRegion('Station links');
});
afterAll(() => deleteRegion(slug));

const linksPage = async (options = {}) => {
  const page = await newPage(`/regions/${slug}/links`, options);
  await hydrated(page);
  return page;
};
const links = () => fetchJson(`/api/regions/${slug}/links`);

test('a suggestion says why, can be rejected, suggested again and confirmed; the station’s page then shows it', async () => {
  const page = await linksPage();
  const suggested = page.getByRole('list', { name: 'Suggested links' });
  expect(await suggested.textContent()).toMatch(/Next larger drainage area on Weir, 2\.2 times as large, 15 km away/);
  await page.getByRole('button', { name: 'Reject 07 to 08' }).click();
  await page.getByText('Nothing is suggested.').waitFor();
  expect(await links()).toEqual([]);
  await page.getByText('Rejected (1)').click();
  await page.getByRole('button', { name: 'Suggest again 07 to 08' }).click();
  await page.getByRole('button', { name: 'Confirm 07 to 08' }).click();
  await page.getByRole('button', { name: 'Take away 07 to 08' }).waitFor();
  expect(await links()).toMatchObject([{ upstream: '07', downstream: '08', source: 'area-and-position' }]);

  await page.goto(`/regions/${slug}/stations/07`);
  const river = page.getByRole('region', { name: 'Along the river' });
  await river.getByRole('link', { name: 'Weir at Mill' }).click();
  await page.getByRole('heading', { level: 1, name: 'Weir at Mill' }).waitFor();
  expect(await page.getByRole('region', { name: 'Along the river' }).textContent()).toMatch(/upstreamWeir at Ford/);
});

test('a link is given by hand and taken away; one that would run in a circle is refused with the way', async () => {
  const page = await linksPage();
  const give = async (upper: string, lower: string) => {
    await page.getByLabel('Upper station').fill(upper);
    await page.getByLabel('Station below it').fill(lower);
    await page.getByRole('button', { name: 'Add this link' }).click();
  };
  await give('07', '08');
  await page.getByRole('button', { name: 'Take away 07 to 08' }).waitFor();
  const confirmed = page.getByRole('list', { name: 'Confirmed links' });
  await confirmed.getByText('given by hand').waitFor();
  expectTrouble(page, /400/);
  await give('08', '07');
  await page.getByText(/Water would run in a circle: 08 → 07 → 08/).waitFor();
  await page.getByRole('button', { name: 'Take away 07 to 08' }).click();
  await page.getByText('No link yet.').waitFor();
  expect(await links()).toEqual([]);
});

test.each([
  ['light', 1280],
  ['dark', 390],
] as const)(
  'the links of the demo region keep WCAG 2.2 AA and their width, %s at %i pixels',
  async (colorScheme, width) => {
    const page = await newPage(`/regions/${await demoRegion()}/links`, { colorScheme, width, height: 844 });
    await hydrated(page);
    // More than ten are suggested; they come when the worker has them.
    await page.getByRole('list', { name: 'Suggested links' }).getByRole('listitem').nth(10).waitFor();
    expect(await accessibilityProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
  },
);
