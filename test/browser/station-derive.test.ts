import { afterAll, beforeAll, expect, test } from 'vitest';
import { deleteRegion, demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';
import { editableRegion } from './station-region.ts';

let slug: string;

beforeAll(async () => {
  slug = await editableRegion('Station derive');
});
afterAll(() => deleteRegion(slug));

const dayOf = async (code: string, day: string): Promise<number> => {
  const path = `/api/regions/${slug}/stations/${code}/days?first=${day}&last=${day}`;
  return ((await fetchJson(path)) as { values: number[] }).values[0];
};

test('the gain between two gauges is derived by form, marked as such, changed, and taken away', async () => {
  const page = await newPage(`/regions/${slug}/stations/08`);
  await hydrated(page);
  await page.getByRole('link', { name: 'Derive from it' }).click();
  await page.getByRole('heading', { level: 1, name: 'Derive a record from others' }).waitFor();
  expect(await page.getByLabel('Station', { exact: true }).first().inputValue()).toBe('08 – Weir at Mill');

  await page.getByRole('button', { name: 'Derive the record' }).click();
  await page.getByText('A station needs a code.').waitFor();
  await page.getByLabel('Code', { exact: true }).fill('GAIN');
  await page.getByLabel('Name', { exact: true }).fill('Gain of the Weir');
  await page.getByLabel('Station', { exact: true }).nth(1).fill('07');
  await page.getByLabel('Sign of term 2').selectOption('-');
  await page.getByLabel('Days before', { exact: true }).nth(1).fill('1');
  await page.getByText('Each day: flow: 08 − 07 (1 day before).').waitFor();
  await page.getByRole('button', { name: 'Derive the record' }).click();

  await page.getByRole('heading', { level: 1, name: 'Gain of the Weir' }).waitFor();
  const [lower, upper] = [await dayOf('08', '2003-03-02'), await dayOf('07', '2003-03-01')];
  expect(await dayOf('GAIN', '2003-03-02')).toBeCloseTo(lower - upper, 9);
  const main = await page.locator('main').textContent();
  expect(main).toContain('Derived, not measured: flow: 08 − 07 (1 day before)');
  await page.getByRole('link', { name: '07 Weir at Ford' }).click();
  await page.getByRole('heading', { level: 1, name: 'Weir at Ford' }).waitFor();
  expect(await page.locator('main').textContent()).toContain('Derived with this record: Gain of the Weir');

  await page.goto(`/regions/${slug}/stations/GAIN/edit`);
  await hydrated(page);
  await page.getByLabel('Factor', { exact: true }).nth(1).fill('0.5');
  await page.getByRole('button', { name: 'Save' }).click();
  await page.getByRole('heading', { level: 1, name: 'Gain of the Weir' }).waitFor();
  expect(await dayOf('GAIN', '2003-03-02')).toBeCloseTo(lower - 0.5 * upper, 9);

  await page.getByRole('link', { name: 'Edit', exact: true }).click();
  await page.getByRole('button', { name: 'Take this station away' }).click();
  await page.getByRole('button', { name: 'Really take GAIN away?' }).click();
  await page.waitForURL(new RegExp(`/regions/${slug}$`));
  const found = (await fetchJson(`/api/regions/${slug}/stations?format=json`)) as { station_code: string }[];
  expect(found.map((station) => station.station_code)).toEqual(['07', '08']);
});

test('the demo region has a naturalised flow whose recipe is printed, and records beside flows', async () => {
  const demo = await demoRegion();
  const stations = (await fetchJson(`/api/regions/${demo}/stations?format=json`)) as {
    station_code: string;
    station_name: string;
  }[];
  const derived = stations.find((station) => station.station_name.endsWith('naturalised'))!;
  const page = await newPage(`/regions/${demo}/stations/${derived.station_code}`);
  await page.getByText('Derived, not measured:').waitFor();
  // the basin's mouth keeps its levels
  await page.goto(`/regions/${demo}/stations/${stations[0].station_code}`);
  const figure = page.getByRole('img', { name: /^Stage: \d{4}-\d\d-\d\d to .* days with a value, .* m\.$/ });
  await figure.waitFor();
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Stage CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  const [header, first, ...rest] = text.trim().split(/\r?\n/);
  expect(header).toBe('station_code,date,value,unit,flags,text');
  expect(first.split(',')[3]).toBe('m');
  expect(rest.length).toBeGreaterThan(10_000);
});

test.each([
  ['light', 1280],
  ['dark', 390],
] as const)(
  'the form of a derived record keeps WCAG 2.2 AA and its width, %s at %i pixels',
  async (colorScheme, width) => {
    const page = await newPage(`/regions/${slug}/derive?from=07`, { colorScheme, width, height: 844 });
    await hydrated(page);
    await page.getByRole('button', { name: 'Derive the record' }).click();
    await page.getByText('A station needs a code.').waitFor();
    expect(await accessibilityProblems(page)).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
  },
);
