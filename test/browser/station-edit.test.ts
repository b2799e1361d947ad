import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { deleteRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, expectTrouble, hydrated, newPage, serverUrl } from './harness.ts';
import { editableRegion } from './station-region.ts';

let slug: string;
const CLEAN = {
  ...{ name: 'Weir at Ford', river: 'Weir', latitude: 46.1, longitude: 14.1, areaKm2: 120, influence: 'unknown' },
  ...{ changes: [], namedFlows: [], notes: '' },
};

beforeAll(async () => {
  slug = await editableRegion('Station edit');
});
beforeEach(async () => {
  await patch(CLEAN);
});
afterAll(() => deleteRegion(slug));

const patch = async (body: object) => {
  const answer = await fetch(`${serverUrl}/api/regions/${slug}/stations/07`, {
    method: 'PATCH',
    headers: { 'content-type': 'application/json' },
    body: JSON.stringify(body),
  });
  expect(answer.status, await answer.clone().text()).toBe(200);
};
const facts = () => fetchJson(`/api/regions/${slug}/stations/07/facts`);
const editPage = async (options = {}) => {
  const page = await newPage(`/regions/${slug}/stations/07/edit`, options);
  await hydrated(page);
  return page;
};

test('the station’s page leads to the form, and what is saved there is shown and drawn', async () => {
  const page = await newPage(`/regions/${slug}/stations/07`);
  await hydrated(page);
  await page.getByRole('link', { name: 'Edit', exact: true }).click();
  await page.getByRole('heading', { level: 1, name: 'Edit 07' }).waitFor();

  await page.getByLabel('Drainage area', { exact: true }).fill('50');
  await page.getByLabel('Unit of the drainage area').selectOption('mi²');
  await page.getByLabel('Influence').selectOption('regulated');
  await page.getByRole('button', { name: 'Add a change' }).click();
  const changes = page.getByRole('region', { name: 'Dated changes' });
  await changes.getByLabel('Date', { exact: true }).fill('2003-05-01');
  await changes.getByLabel('Note', { exact: true }).fill('Reservoir filled.');
  await page.getByRole('button', { name: 'Add a named flow' }).click();
  const flows = page.getByRole('region', { name: 'Named flows' });
  await flows.getByLabel('Name', { exact: true }).fill('Pumping stops');
  await flows.getByLabel('Kind', { exact: true }).selectOption('abstraction stop');
  await flows.getByLabel('Value', { exact: true }).fill('1500');
  await flows.getByLabel('Unit', { exact: true }).selectOption('L/s');
  for (const month of ['Jan', 'Feb', 'Mar', 'Apr', 'Nov', 'Dec'])
    await flows.getByLabel(month, { exact: true }).uncheck();
  await page.getByLabel('Notes on the station and its record').fill('Seen on a visit.');
  await page.getByRole('button', { name: 'Save' }).click();

  await page.getByRole('heading', { level: 1, name: 'Weir at Ford' }).waitFor();
  expect(await facts()).toMatchObject({
    areaKm2: 50 * 2.589988110336,
    influence: 'regulated',
    changes: [{ date: '2003-05-01', kind: 'dam', note: 'Reservoir filled.' }],
    namedFlows: [
      { name: 'Pumping stops', kind: 'abstraction stop', value: 1500, unit: 'L/s', months: [5, 6, 7, 8, 9, 10] },
    ],
    notes: 'Seen on a visit.',
  });
  const main = page.locator('main');
  expect(await main.textContent()).toContain('1500 L/s, May–Oct (abstraction stop)');
  expect(await main.textContent()).toContain('Seen on a visit.');
  // on the figure of the minima and on the strip of the days, and in words below
  expect(await page.locator('[data-change="a"]').count()).toBe(2);
  expect(await page.getByRole('list', { name: 'Dated changes' }).textContent()).toContain(
    '2003-05-01 dam: Reservoir filled.',
  );
  expect(await page.locator('svg text', { hasText: 'Pumping stops, May–Oct' }).count()).toBeGreaterThanOrEqual(1);
});

test('a value that cannot be is named beside its field, keeps the focus, and nothing is saved', async () => {
  const page = await editPage();
  await page.getByLabel('Latitude').fill('460,1');
  await page.getByRole('button', { name: 'Add a change' }).click();
  await page.getByRole('button', { name: 'Save' }).click();
  const latitude = page.getByLabel('Latitude');
  await page.getByText('2 fields cannot be saved as it stands.').waitFor();
  expect(await latitude.getAttribute('aria-invalid')).toBe('true');
  const described = (await latitude.getAttribute('aria-describedby'))!.split(' ');
  expect(await page.locator(`[id="${described[described.length - 1]}"]`).textContent()).toMatch(/−90 to 90/);
  expect(await latitude.evaluate((element) => element === document.activeElement)).toBe(true);
  expect(await facts()).toMatchObject({ latitude: 46.1, changes: [] });
});

test('what somebody else saved meanwhile is not written over, and one’s own entries stay', async () => {
  const page = await editPage();
  await page.getByLabel('River').fill('Mine');
  await patch({ river: 'Theirs' });
  expectTrouble(page, /412/);
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByText('Somebody else changed this station meanwhile').waitFor();
  expect(await page.getByLabel('River').inputValue()).toBe('Mine');
  expect(await facts()).toMatchObject({ river: 'Theirs' });
  await page.getByRole('link', { name: 'Read the station anew' }).click();
  await page.waitForFunction(() => document.querySelectorAll('input')[1]?.value === 'Theirs');
});

test('rows of changes and flows can be taken away again', async () => {
  await patch({
    changes: [
      { date: '2002-01-01', kind: 'dam', note: 'one' },
      { date: '2003-01-01', kind: 'other', note: 'two' },
    ],
    namedFlows: [{ name: 'Least', kind: 'legal minimum', value: 1, unit: 'm3/s', months: null }],
  });
  const page = await editPage();
  await page.getByRole('button', { name: 'Remove change 1' }).click();
  await page.getByRole('button', { name: 'Remove flow 1' }).click();
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByRole('heading', { level: 1, name: 'Weir at Ford' }).waitFor();
  expect(await facts()).toMatchObject({ changes: [{ note: 'two' }], namedFlows: [] });
});

test.each([
  ['light', 1440],
  ['dark', 1280],
  ['dark', 390],
] as const)('the form keeps WCAG 2.2 AA and its width, %s at %i pixels', async (colorScheme, width) => {
  await patch({
    changes: [{ date: '2002-01-01', kind: 'dam', note: 'one' }],
    namedFlows: [{ name: 'Least', kind: 'legal minimum', value: 1, unit: 'm3/s', months: null }],
  });
  const page = await editPage({ colorScheme, width, height: 844 });
  await page.getByLabel('Latitude').fill('x');
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByText('One field cannot be saved').waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
});

test('on paper a station’s page has no site header and dark ink, whatever the theme', async () => {
  const page = await newPage(`/regions/${slug}/stations/07`, { colorScheme: 'dark' });
  await hydrated(page);
  await page.emulateMedia({ media: 'print' });
  expect(await page.getByRole('navigation', { name: /^Pages of/ }).isVisible()).toBe(false);
  expect(await page.getByRole('link', { name: 'Edit', exact: true }).isVisible()).toBe(false);
  const ink = await page.getByRole('heading', { level: 1 }).evaluate((element) => getComputedStyle(element).color);
  const [red, green, blue] = ink.match(/[\d.]+/g)!.map(Number);
  expect(Math.max(red, green, blue)).toBeLessThan(100);
});
