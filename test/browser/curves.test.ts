import { beforeAll, expect, test } from 'vitest';
import { type DemoStation, demoRegion, demoStations } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage } from './harness.ts';

let slug: string;
let stations: DemoStation[];
let withoutArea: DemoStation;

beforeAll(async () => {
  slug = await demoRegion();
  stations = await demoStations(slug);
  const found = stations.find((station) => station.areaKm2 === null);
  if (!found) throw new Error('the demo region has no station without a drainage area');
  withoutArea = found;
});

const curvesPage = async (query = '', options = {}) => {
  const page = await newPage(`/regions/${slug}/curves${query}`, options);
  await hydrated(page);
  await page.waitForSelector('.recharts-line-curve');
  return page;
};

const tickTexts = (page: Awaited<ReturnType<typeof newPage>>, axis: 'x' | 'y') =>
  page.$$eval(
    `.recharts-${axis}Axis-tick-labels text, .recharts-${axis}Axis .recharts-cartesian-axis-tick-value`,
    (all) => all.map((text) => text.textContent ?? '').filter(Boolean),
  );

test('without a choice it shows the six steepest declines, each named at the end of its line', async () => {
  const page = await curvesPage();
  const links = page.getByRole('list', { name: 'Stations in the figure' }).getByRole('link');
  await links.first().waitFor();
  const names = await links.allTextContents();
  const known = new Set(stations.map((station) => station.name));
  expect(names.length).toBeGreaterThan(3);
  expect(names.every((name) => known.has(name))).toBe(true);
  expect(await page.locator('.recharts-line-curve').count()).toBe(names.length + 1); // and the region's median
});

test('labels at the ends of twelve lines do not cover one another', async () => {
  const page = await curvesPage('?stations=all');
  const boxes = await page
    .getByRole('list', { name: 'Stations in the figure' })
    .getByRole('listitem')
    .evaluateAll((items) =>
      items.map((item) => item.getBoundingClientRect()).map(({ top, bottom }) => ({ top, bottom })),
    );
  expect(boxes.length).toBe(12);
  boxes.sort((a, b) => a.top - b.top);
  for (let index = 1; index < boxes.length; index++) {
    expect(boxes[index].top).toBeGreaterThanOrEqual(boxes[index - 1].bottom - 0.5);
  }
  await page.getByText(/more stations? drawn thin/).waitFor();
});

test('ticking a station puts its curve into figure, table and address; unticking takes it out', async () => {
  const page = await curvesPage();
  const other = stations.slice(8).find((station) => station.areaKm2 !== null) as DemoStation;
  await page.getByPlaceholder('Name, code or river').fill(other.name);
  await page.getByRole('checkbox', { name: new RegExp(`^${literally(other.name)}`) }).check();
  await page.getByRole('row', { name: new RegExp(literally(other.name)) }).waitFor();
  expect(new URL(page.url()).searchParams.get('stations')?.split(',')).toContain(other.code);
  await page.getByRole('checkbox', { name: new RegExp(`^${literally(other.name)}`) }).uncheck();
  await page.getByRole('row', { name: new RegExp(literally(other.name)) }).waitFor({ state: 'detached' });
});

test('the axes switch between probability and even, logarithmic and linear, and the address keeps it', async () => {
  const page = await curvesPage();
  expect(await tickTexts(page, 'x')).toContain('99.9');
  await page.getByRole('radio', { name: 'even' }).check();
  await expect.poll(() => tickTexts(page, 'x')).toContain('40');
  expect(await tickTexts(page, 'x')).not.toContain('99.9');
  await page.getByRole('radio', { name: 'linear', exact: true }).check();
  await expect.poll(() => new URL(page.url()).search).toMatch(/x=linear/);
  await expect.poll(() => new URL(page.url()).search).toMatch(/y=linear/);
  await page.reload();
  await hydrated(page);
  expect(await page.getByRole('radio', { name: 'even' }).isChecked()).toBe(true);
  expect(await page.getByRole('radio', { name: 'linear', exact: true }).isChecked()).toBe(true);
});

test('a station without a drainage area is named with the reason, and another way to compare brings its curve', async () => {
  const page = await curvesPage(`?stations=${withoutArea.code},${stations[0].code}`);
  const note = page.getByRole('note');
  await note.getByRole('link', { name: withoutArea.name }).waitFor();
  expect(await note.textContent()).toMatch(/no drainage area/);
  await page.getByRole('button', { name: 'compare as a ratio to the mean flow' }).click();
  await page.getByRole('row', { name: new RegExp(literally(withoutArea.name)) }).waitFor();
  expect(new URL(page.url()).searchParams.get('normalise')).toBe('mean');
  await page.getByText('Flow as a ratio to the station’s own mean flow', { exact: true }).waitFor();
  expect(await page.getByRole('region', { name: 'Terms of comparison' }).textContent()).toMatch(/mean flow/);
});

test('the pointer reads every curve at one exceedance, and a click on a label opens the station', async () => {
  const page = await curvesPage();
  const box = await page.locator('.recharts-wrapper').boundingBox();
  if (!box) throw new Error('no figure');
  await page.mouse.move(box.x + box.width * 0.4, box.y + box.height * 0.5);
  await page.getByText(/% of the time$/).waitFor();
  const rows = await page.locator('.recharts-tooltip-wrapper tr').count();
  expect(rows).toBeGreaterThan(4);
  const label = page.getByRole('list', { name: 'Stations in the figure' }).getByRole('link').first();
  const name = await label.textContent();
  await label.click();
  await page.getByRole('heading', { level: 1, name: name ?? '' }).waitFor();
});

test('the median year has a curve of its own, and the CSV file is of the curves shown', async () => {
  const page = await curvesPage();
  const first = await page.getByRole('row').nth(1).textContent();
  await page.getByRole('radio', { name: 'median year' }).check();
  await expect.poll(() => page.getByRole('row').nth(1).textContent()).not.toBe(first);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Curves CSV' }).click();
  const stream = await (await download).createReadStream();
  let text = '';
  for await (const chunk of stream) text += chunk;
  const lines = text.trim().split(/\r?\n/);
  expect(lines[0]).toBe('station_code,exceedance,flow,unit');
  const codes = new Set(lines.slice(1).map((line) => line.split(',')[0]));
  const shown = await page.getByRole('list', { name: 'Stations in the figure' }).getByRole('link').count();
  expect(codes.size).toBe(shown);
});

test('keyboard alone: from the search to a tick to the figure', async () => {
  const page = await curvesPage();
  await page.getByPlaceholder('Name, code or river').focus();
  await page.keyboard.press('Tab');
  const focused = page.locator(':focus');
  expect(await focused.getAttribute('type')).toBe('checkbox');
  const was = await focused.isChecked();
  await page.keyboard.press('Space');
  await expect.poll(() => new URL(page.url()).searchParams.get('stations')).not.toBeNull();
  await expect.poll(() => page.getByRole('checkbox').first().isChecked()).toBe(!was);
});

test.each([
  ['light', 1440],
  ['dark', 1440],
  ['light', 390],
] as const)('keeps WCAG 2.2 AA and its width, %s at %i pixels', async (colorScheme, width) => {
  const page = await curvesPage('', { colorScheme, width, height: 844 });
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
});

function literally(text: string): string {
  return text.replace(/[.*+?^${}()|[\]\\]/g, '\\$&');
}
