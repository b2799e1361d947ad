import { Buffer } from 'node:buffer';
import type { Locator, Page } from 'playwright-core';
import { expect, test } from 'vitest';
import { fetchJson } from './demo-region.ts';
import { accessibilityProblems, hydrated, newPage, serverUrl } from './harness.ts';
import {
  days,
  file,
  flows,
  importPage,
  REGISTRY,
  send,
  settled,
  show,
  standing,
  start,
  stationCodes,
  taken,
  unitless,
  willBeMade,
} from './import-page.ts';

const byRule = (page: Page) => page.getByRole('heading', { name: 'What the import would do' }).waitFor();

/** Two files of one upload that say unlike values of ten days, and one that stands by itself. */
const unlikeFiles = [
  file('first.csv', flows(days('0001', 100, () => '1.5'))),
  file('later.csv', flows(days('0001', 100, (day) => (day < 10 ? '2.5' : '1.5')))),
  file('other.csv', flows(days('0002', 50, () => '3'))),
];

test('files of one upload that are unlike wait for a rule; on the way back to the files nothing holds them up', async () => {
  const { page, slug } = await importPage();
  await send(page, ...unlikeFiles);
  await start(page);
  await byRule(page);
  await page.getByText('Nothing stands against the 2 other files').waitFor();
  expect(await page.getByRole('button', { name: 'Import 3 files' }).isDisabled()).toBe(true);
  await page.getByRole('button', { name: 'Back to the files' }).click();
  await settled(page);
  expect(await standing(page, 'later.csv').textContent()).toContain('ready');
  await start(page);
  await byRule(page);
  await page.getByLabel(/^Take the new values \(/).check();
  await start(page);
  await taken(page);
  const listed = (await fetchJson(`/api/regions/${slug}/imports`)) as { fileName: string }[];
  expect(listed.map(({ fileName }) => fileName).sort()).toEqual(['first.csv', 'later.csv', 'other.csv']);
});

test('a page opened anew at the choice of a rule still knows the region’s name and what was left out', async () => {
  const name = `Opened anew ${Date.now()}`;
  const page = await newPage('/');
  await hydrated(page);
  await send(page, ...unlikeFiles, file('unlike.csv', unitless(days('0003', 30, () => '1'))));
  await page.getByLabel('Take unlike.csv').uncheck();
  await page.getByLabel('Name of the new region').fill(name);
  await start(page);
  await byRule(page);
  await page.reload();
  await byRule(page);
  await page.getByLabel(/^Keep what stands/).check();
  await start(page);
  await taken(page);
  const regions = (await fetchJson('/api/regions')) as { name: string; slug: string }[];
  const slug = regions.find((region) => region.name === name)?.slug ?? '';
  willBeMade(slug);
  expect(await stationCodes(slug)).toEqual(['0001', '0002']);
});

test('a station list that is left out no longer says which stations there are', async () => {
  const { page, slug } = await importPage();
  await send(page, file('stations.csv', REGISTRY), file('flows.csv', flows(days('7777', 30, () => '1'))));
  expect(await standing(page, 'flows.csv').textContent()).not.toContain('ready');
  await page.getByLabel('Take stations.csv').uncheck();
  await expect.poll(() => standing(page, 'flows.csv').textContent()).toContain('ready');
  await page.getByLabel('Take stations.csv').check();
  await expect.poll(() => standing(page, 'flows.csv').textContent()).not.toContain('ready');
  await page.getByLabel('Take stations.csv').uncheck();
  await expect.poll(() => standing(page, 'flows.csv').textContent()).toContain('ready');
  await start(page);
  await taken(page);
  expect(await stationCodes(slug)).toEqual(['7777']);
});

/** WaterML 2.0 (OGC 10-126r4) of one daily series. */
const waterml = (property: string, unit: string): string => `<?xml version="1.0"?>
<wml2:Collection xmlns:wml2="http://www.opengis.net/waterml/2.0" xmlns:gml="http://www.opengis.net/gml/3.2"
 xmlns:om="http://www.opengis.net/om/2.0" xmlns:xlink="http://www.w3.org/1999/xlink" gml:id="c">
<wml2:observationMember><om:OM_Observation gml:id="o">
<om:observedProperty ${property}/><om:featureOfInterest xlink:title="0005"/>
<om:result><wml2:MeasurementTimeseries gml:id="t"><wml2:defaultPointMetadata><wml2:DefaultTVPMeasurementMetadata>
<wml2:uom code="${unit}"/></wml2:DefaultTVPMeasurementMetadata></wml2:defaultPointMetadata>
${Array.from({ length: 20 }, (_, at) => `<wml2:point><wml2:MeasurementTVP><wml2:time>2001-01-${String(at + 1).padStart(2, '0')}</wml2:time><wml2:value>${1 + at / 10}</wml2:value></wml2:MeasurementTVP></wml2:point>`).join('\n')}
</wml2:MeasurementTimeseries></om:result></om:OM_Observation></wml2:observationMember></wml2:Collection>`;

test('a document without discharge: its series is taken as what it is, said by the document or by the person', async () => {
  const { page } = await importPage();
  await send(
    page,
    file('level.xml', waterml('xlink:title="Water level"', 'm')),
    file('unsaid.xml', waterml('', 'm')),
    file('warmth.xml', waterml('xlink:title="Temperature"', 'Cel')),
  );
  const level = await show(page, 'level.xml');
  await level.getByRole('button', { name: 'Take it as stage in m' }).click();
  await expect.poll(() => standing(page, 'level.xml').textContent()).toContain('ready');
  const unsaid = await show(page, 'unsaid.xml');
  await unsaid.getByLabel('series in m is').selectOption('stage');
  await unsaid.getByRole('button', { name: 'Take it as stage in m' }).click();
  await expect.poll(() => standing(page, 'unsaid.xml').textContent()).toContain('ready');
  const warmth = await show(page, 'warmth.xml');
  expect(await standing(page, 'warmth.xml').textContent()).toContain('cannot be read');
  expect(await warmth.textContent()).toContain('none of another quantity that is kept here');
  expect(await warmth.getByLabel('Layout').count()).toBe(0);
  await page.getByLabel('Take warmth.xml').uncheck();
  await page.getByLabel('Take unsaid.xml').uncheck();
  await start(page);
  await taken(page);
  const report = page.getByRole('region', { name: 'Report on level.xml' });
  expect(await report.getByRole('row', { name: /^0005, stage/ }).textContent()).toContain('20');
});

test('a code is given to a file whose name stood for the station, and holds for it alone', async () => {
  const { page, slug } = await importPage();
  await send(
    page,
    file('a-1.csv', 'date,flow_m3s\n2001-01-01,1\n2001-01-02,1\n'),
    file('b-1.csv', 'date,flow_m3s\n2001-01-01,1\n2001-01-02,1\n'),
  );
  const panel = await show(page, 'b-1.csv');
  await panel.getByLabel('Station comes from').selectOption('given');
  await panel.getByLabel('Code of the station').fill('0042');
  await settled(page);
  expect(await standing(page, 'b-1.csv').textContent()).toContain('station 0042');
  expect(await standing(page, 'a-1.csv').textContent()).toContain('station a-1');
  await page.getByLabel('Take a-1.csv').uncheck();
  await start(page);
  await taken(page);
  expect(await stationCodes(slug)).toEqual(['0042']);
});

test('twenty rows stand as they are in the file beside what they were understood as', async () => {
  const { page } = await importPage();
  await send(page, file('flows.csv', flows(days('0001', 60, (day) => `${day}.5`))));
  const rows = page.getByRole('region', { name: 'First rows of flows.csv' }).locator('tbody tr');
  expect(await rows.count()).toBe(20);
  expect(await rows.nth(19).locator('td').allTextContents()).toEqual([
    ...['21', '0001', '2001-01-20', '19.5', '', '0001', '2001-01-20', '19.5'],
  ]);
});

test('many files stand in one table, each with its numbers and a folded report', async () => {
  const { page } = await importPage();
  const codes = ['0001', '0002', '0003', '0004'];
  await send(page, ...codes.map((code, at) => file(`${code}.csv`, flows(days(code, 30 + at, () => '1')))));
  await start(page);
  await taken(page);
  const table = page.getByRole('region', { name: 'Files taken' });
  const cells = await table
    .getByRole('row', { name: /^0003\.csv/ })
    .getByRole('cell')
    .allTextContents();
  expect(cells.slice(1, 8)).toEqual(['1', '32', '0', '32', '0', '2001-01-01', '2001-02-01']);
  await page.getByText('Report on 0003.csv').click();
  await page.getByRole('region', { name: 'Report on 0003.csv' }).waitFor();
  expect(await accessibilityProblems(page)).toEqual([]);
});

test('a region is taken along as an archive, and dropping it where regions are made gives the same region', async () => {
  const { page, slug } = await importPage();
  await send(page, file('stations.csv', REGISTRY), file('flows.csv', flows(days('0001', 90, (day) => `${day}.25`))));
  await start(page);
  await taken(page);
  await page.reload();
  const section = page.getByRole('region', { name: 'Take the region along' });
  const address = await section.getByRole('link', { name: 'Archive with WaterML' }).getAttribute('href');
  expect(await section.getByRole('link', { name: 'Archive', exact: true }).getAttribute('href')).toBe(
    `/api/regions/${slug}/archive?waterml=no`,
  );
  const archive = Buffer.from(await (await fetch(serverUrl + address)).arrayBuffer());
  const name = `Taken along ${Date.now()}`;
  const other = await newPage('/');
  await hydrated(other);
  await other.setInputFiles('input[type=file]:not([data-folder])', [
    { name: 'region.zip', mimeType: 'application/zip', buffer: archive },
  ]);
  const note = other.getByRole('region', { name: /^Archive of the region Import test/ });
  await note.getByText('the days of 1 import').waitFor();
  await other
    .getByText(/passed over/)
    .first()
    .waitFor();
  expect(await other.getByLabel('Name of the new region').inputValue()).toMatch(/^Import test/);
  expect(await accessibilityProblems(other)).toEqual([]);
  await other.getByLabel('Name of the new region').fill(name);
  await start(other);
  await taken(other);
  const regions = (await fetchJson('/api/regions')) as { name: string; slug: string }[];
  const twin = regions.find((region) => region.name === name)?.slug ?? '';
  willBeMade(twin);
  const daysOf = async (of: string) => {
    const address = `/api/regions/${of}/stations/0001/days?first=2001-01-01&last=2001-12-31`;
    return (await fetchJson(address)) as { dates: string[]; values: number[] };
  };
  expect(await stationCodes(twin)).toEqual(await stationCodes(slug));
  const came = await daysOf(twin);
  expect(came.values.slice(0, 3)).toEqual([0.25, 1.25, 2.25]);
  expect(came).toEqual(await daysOf(slug));
});

/** Presses Tab until a control has the focus. */
async function tabTo(page: Page, control: Locator): Promise<void> {
  for (let pressed = 0; pressed < 60; pressed++) {
    if (await control.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press('Tab');
  }
  throw new Error(`no way by Tab to ${control}`);
}

test('the whole mapping step goes by the keyboard: another file, its columns, rare terms, a place by character', async () => {
  const { page, slug } = await importPage();
  const fixed = Array.from({ length: 20 }, (_, day) => `200301${String(day + 1).padStart(2, '0')}    1.2500    0.5000`);
  await send(page, file('0009.csv', unitless(days('0009', 30, () => '1.5'))), file('0007.txt', fixed.join('\n')));
  await tabTo(page, page.getByRole('navigation', { name: 'Files' }).getByRole('button', { name: '0009.csv' }));
  await page.keyboard.press('Enter');
  await settled(page);
  await tabTo(page, page.getByLabel('Unit of the values'));
  await page.keyboard.press('L');
  await settled(page);
  await tabTo(page, page.getByText('Signs, missing values and other terms'));
  await page.keyboard.press('Enter');
  await tabTo(page, page.getByLabel('Also means missing'));
  await page.keyboard.type('-999');
  await settled(page);
  await tabTo(page, page.getByLabel('Column 3 (flow) holds'));
  expect(await page.getByLabel('Column 3 (flow) holds').inputValue()).toBe('value');
  await page.getByRole('navigation', { name: 'Files' }).getByRole('button', { name: '0007.txt' }).focus();
  await page.keyboard.press('Enter');
  await settled(page);
  await tabTo(page, page.getByLabel('Unit of the values'));
  await page.keyboard.press('m');
  await settled(page);
  await tabTo(page, page.getByRole('radio').first());
  await page.keyboard.press('ArrowRight');
  await settled(page);
  expect(await page.getByRole('radio').nth(1).isChecked()).toBe(true);
  await tabTo(page, page.getByLabel('value, first character'));
  await tabTo(page, page.getByRole('button', { name: 'Import 2 files' }));
  await page.keyboard.press('Enter');
  await taken(page);
  expect(await stationCodes(slug)).toEqual(['0007', '0009']);
});
