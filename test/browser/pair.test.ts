import { beforeAll, expect, test } from 'vitest';
import { demoRegion, fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';

interface Fact {
  code: string;
  name: string;
}

let slug: string;
let abstracted: Fact;
let natural: Fact[];

beforeAll(async () => {
  slug = await demoRegion();
  const stations = (await fetchJson(`/api/regions/${slug}/stations?format=json`)) as {
    station_code: string;
    station_name: string;
    influence: string;
    drainage_area_km2: number | null;
  }[];
  // a pump's meter has no drainage area
  const found = stations.find((each) => each.influence === 'abstracted' && each.drainage_area_km2 !== null);
  if (!found) throw new Error('the demo region has no abstracted station');
  abstracted = { code: found.station_code, name: found.station_name };
  const { references } = (await fetchJson(`/api/regions/${slug}/stations/${found.station_code}/references`)) as {
    references: { station_code: string; station_name: string }[];
  };
  natural = references.map(({ station_code, station_name }) => ({ code: station_code, name: station_name }));
});

const pairPage = async (query: string, options = {}) => {
  const page = await newPage(`/regions/${slug}/pair${query}`, options);
  await hydrated(page);
  return page;
};

test('a station’s page leads to the comparison with the natural stations that go most with it, basis carried on', async () => {
  const page = await newPage(`/regions/${slug}/stations/${abstracted.code}?days=30`);
  await hydrated(page);
  await page.getByRole('link', { name: 'Against a reference' }).click();
  await page.getByRole('heading', { level: 1, name: /^Against a reference/ }).waitFor();
  await page.waitForFunction(() => document.title.startsWith('Against a reference'));
  expect(new URL(page.url()).searchParams.get('days')).toBe('30');
  await page.getByText(/^Chosen by the program: the natural stations nearby/).waitFor();
  expect(await page.getByRole('checkbox', { checked: true }).count()).toBe(3);
  await page
    .getByText(/30-day minimum of .* per decade \(95 % interval/)
    .first()
    .waitFor();
});

test('ticking references changes the answer and the address, which then shows the same', async () => {
  const page = await pairPage(`?station=${abstracted.code}&with=${natural[0].code}`);
  await page.getByText(new RegExp(`gainst ${natural[0].name}`)).waitFor();
  await page.getByRole('checkbox', { name: natural[1].name }).check();
  const both = new RegExp(`gainst the mean of ${natural[0].name} and ${natural[1].name}`);
  await page.getByText(both).waitFor();
  expect(new URL(page.url()).searchParams.get('with')).toBe(`${natural[0].code},${natural[1].code}`);
  const again = await pairPage(new URL(page.url()).search);
  await again.getByText(both).waitFor();
  await page.getByRole('checkbox', { name: natural[0].name }).uncheck();
  await page.getByRole('checkbox', { name: natural[1].name }).uncheck();
  await page.getByRole('heading', { name: 'Choose a reference' }).waitFor();
});

test('a station that is not natural can be added by name, and is warned of', async () => {
  const page = await pairPage(`?station=${natural[0].code}&with=${natural[1].code}`);
  await page.getByLabel('Another station').selectOption(abstracted.code);
  await page.getByText(`${abstracted.name} is abstracted: what is done there shows in the ratio too.`).waitFor();
  expect(await page.getByRole('checkbox', { name: abstracted.name }).isChecked()).toBe(true);
});

test('another station is chosen by name, and begins with references of its own', async () => {
  const page = await pairPage(`?station=${natural[0].code}&with=${natural[1].code}`);
  await page.getByLabel('Station', { exact: true }).selectOption(abstracted.code);
  await page.getByText(/^Chosen by the program/).waitFor();
  expect(new URL(page.url()).searchParams.get('station')).toBe(abstracted.code);
  expect(new URL(page.url()).searchParams.has('with')).toBe(false);
});

test('the arrow keys read single years of ratio, double-mass curve and weather', async () => {
  const page = await pairPage(`?station=${abstracted.code}`);
  for (const [name, words] of [
    [/^Ratio of /, /times its ordinary share/],
    [/^Double-mass curve of /, /of its ordinary years/],
    [/^Minima of .* over the weather/, /which usually leaves/],
    [/^What the weather leaves/, /(less|more) than such weather usually leaves/],
  ] as const) {
    const figure = page.getByRole('slider', { name });
    await figure.focus();
    await page.keyboard.press('End');
    const last = await figure.getAttribute('aria-valuetext');
    await page.keyboard.press('ArrowLeft');
    const before = await figure.getAttribute('aria-valuetext');
    expect(last).toMatch(words);
    expect(before).toMatch(words);
    expect(before).not.toBe(last);
  }
});

test('the CSV file has the years of the table, of the references shown', async () => {
  const page = await pairPage(`?station=${abstracted.code}&with=${natural[0].code},${natural[1].code}`);
  await page.getByText('The years as a table').first().click();
  const table = page.getByRole('region', { name: 'Station and reference, year by year' });
  const rows = await table.getByRole('row').count();
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Comparison CSV' }).click();
  let text = '';
  for await (const chunk of await (await download).createReadStream()) text += chunk;
  const lines = text.trim().split(/\r?\n/);
  expect(lines.length).toBe(rows);
  expect(lines[1].split(',').slice(0, 2)).toEqual([abstracted.code, `${natural[0].code};${natural[1].code}`]);
});

test('other weather and other days are one click away, and stay in the address', async () => {
  const page = await pairPage(`?station=${abstracted.code}`);
  const days = page.getByRole('navigation', { name: 'Days before the minimum' });
  await days.getByRole('link', { name: /^270 days/ }).click();
  await page.getByText(/^Given the rainfall of the 270 days before/).waitFor();
  const records = page.getByRole('navigation', { name: 'Weather records' });
  await records
    .getByRole('link', { name: /^potential evaporation/ })
    .first()
    .click();
  await page.getByText(/^Given the potential evaporation of the 270 days before/).waitFor();
  const { searchParams } = new URL(page.url());
  expect([searchParams.get('antecedentDays'), searchParams.get('quantity')]).toEqual(['270', 'potential-evaporation']);
});

test('what of an address cannot be followed is said, and the rest shown', async () => {
  const page = await pairPage(`?station=${abstracted.code}&with=${abstracted.code},no-such,${natural[0].code}`);
  const alert = page.getByRole('alert').filter({ hasText: 'Not all of the address' });
  expect(await alert.textContent()).toContain('cannot be its own reference');
  expect(await alert.textContent()).toContain('There is no station “no-such” to compare with.');
  await page.getByText(new RegExp(`gainst ${natural[0].name}`)).waitFor();
  const unknown = await pairPage('?station=no-such');
  await unknown.getByRole('heading', { name: 'Choose a station' }).waitFor();
  expect(await unknown.getByRole('alert').first().textContent()).toContain('no station “no-such”');
});

test('a ratio of dates is refused in words, and the weather still shown', async () => {
  const page = await pairPage(`?station=${abstracted.code}&index=minimum-date`);
  await page.getByText(/^A ratio of dates means nothing/).waitFor();
  await page.getByText(/^Given the rainfall/).waitFor();
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
  ['dark', 390],
] as const)('keeps WCAG 2.2 AA and its width, %s at %i pixels', async (colorScheme, width) => {
  const page = await pairPage(`?station=${abstracted.code}`, { colorScheme, width, height: 844 });
  await page.getByRole('slider', { name: /^What the weather leaves/ }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
});
