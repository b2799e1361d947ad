import { expect, test } from 'vitest';
import { accessibilityProblems } from './harness.ts';
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
} from './import-page.ts';

/** The first row of values as understood. */
const firstRow = (panel: import('playwright-core').Locator) =>
  panel
    .getByRole('region', { name: /^First rows/ })
    .locator('tbody tr')
    .first();

test('a unit that the file does not tell is asked for beside its control, and its effect is seen at once', async () => {
  const { page } = await importPage();
  await send(page, file('0009.csv', unitless(days('0009', 50, () => '12.5'))));
  const panel = await show(page, '0009.csv');
  expect(await standing(page, '0009.csv').textContent()).toContain('asks something');
  const unit = panel.getByLabel('Unit of the values');
  expect(await unit.getAttribute('aria-invalid')).toBe('true');
  const below = await unit.getAttribute('aria-describedby');
  expect(await page.locator(`[id="${below}"]`).textContent()).toMatch(/unit/);
  await unit.selectOption('L/s');
  await panel.getByRole('columnheader', { name: 'Value, L/s' }).waitFor();
  await expect.poll(() => unit.getAttribute('aria-invalid')).toBe('false');
  await start(page);
  await taken(page);
  const report = (await page.getByRole('region', { name: 'Report on 0009.csv' }).textContent()) ?? '';
  expect(report).toContain('Daily flows in L/s');
});

test('01/02/2003 is asked, never guessed: each order shows the dates that it makes', async () => {
  const { page } = await importPage();
  const rows = Array.from({ length: 12 }, (_, at) => `0001,${String(at + 1).padStart(2, '0')}/02/2003,1.5`);
  await send(page, file('flows.csv', flows(rows)));
  const panel = await show(page, 'flows.csv');
  const order = panel.getByLabel('Order of the dates');
  expect(await order.inputValue()).toBe('');
  await order.selectOption('mdy');
  await expect.poll(() => panel.textContent()).toContain('2003-07-02');
  await order.selectOption('dmy');
  await expect.poll(() => panel.textContent()).toContain('2003-02-07');
  await start(page);
  await taken(page);
});

test('what a column holds is changed above it; a date that is not whole says so and changes nothing', async () => {
  const { page } = await importPage();
  const rows = days('0001', 30, (day) => `${(1 + day / 10).toFixed(1)},${(90 + day).toFixed(1)}`);
  await send(page, file('flows.csv', `station,date,flow_m3s,level\n${rows.join('\n')}\n`));
  const panel = await show(page, 'flows.csv');
  expect(await firstRow(panel).textContent()).toContain('0001');
  await panel.getByLabel('Column 4 (level) holds').selectOption('value');
  expect(await panel.getByLabel('Column 3 (flow_m3s) holds').inputValue()).toBe('none');
  await expect.poll(() => firstRow(panel).locator('td').nth(3).textContent()).toBe('90');
  await panel.getByLabel('Column 2 (date) holds').selectOption('year');
  await panel.getByText('A date stands in one column, or in three').waitFor();
  await panel.getByLabel('Column 2 (date) holds').selectOption('date');
  await expect.poll(() => panel.getByText('A date stands in one column').count()).toBe(0);
  await panel.getByRole('button', { name: 'Go back to what was recognised' }).click();
  await expect.poll(() => firstRow(panel).locator('td').nth(3).textContent()).toBe('1');
});

test('columns of fixed width: places are set by number, and the rule shows them', async () => {
  const { page } = await importPage();
  const rows = Array.from({ length: 40 }, (_, day) => {
    const [year, month, date] = new Date(Date.UTC(2003, 0, 1 + day)).toISOString().slice(0, 10).split('-').map(Number);
    const cell = (value: number) => value.toFixed(4).padStart(10);
    return `${year}${String(month).padStart(2)}${String(date).padStart(2)}${cell(3.25)}${cell(1 + day / 10)}${cell(0.5)}`;
  });
  await send(page, file('0007.txt', rows.join('\n')));
  const panel = await show(page, '0007.txt');
  await panel.getByRole('radio', { name: /1\.0000\s+1\.1000/ }).check();
  await expect.poll(() => panel.getByLabel('value, first character').inputValue()).toBe('19');
  await expect.poll(() => panel.locator('mark[data-role=value]').first().textContent()).toBe('    1.0000');
  await panel.getByLabel('value, last character').fill('8');
  await panel.getByText('The first character comes before the last one').waitFor();
  await panel.getByLabel('value, first character').fill('9');
  await panel.getByLabel('value, last character').fill('18');
  await expect.poll(() => panel.locator('mark[data-role=value]').first().textContent()).toBe('    3.2500');
  await panel.getByLabel('Unit of the values').selectOption('m3/s');
  await standing(page, 'ready').waitFor();
  await start(page);
  await taken(page);
  const row = page.getByRole('region', { name: 'Report on 0007.txt' }).getByRole('row', { name: /^0007/ });
  expect(await row.textContent()).toMatch(/3\.25/);
});

test('files laid out alike are answered together, or one by one', async () => {
  const { page, slug } = await importPage();
  const names = ['0001', '0002', '0003'];
  await send(page, ...names.map((code) => file(`${code}.csv`, unitless(days(code, 30, () => '2')))));
  const panel = await show(page, '0001.csv');
  await panel.getByLabel(/holds for the 2 other files laid out like this one/).waitFor();
  await panel.getByLabel('Unit of the values').selectOption('ML/d');
  for (const code of names) await expect.poll(() => standing(page, `${code}.csv`).textContent()).toContain('ready');
  await panel.getByLabel(/holds for the 2 other files/).uncheck();
  await panel.getByLabel('Unit of the values').selectOption('L/s');
  await settled(page);
  expect(await standing(page, '0001.csv').textContent()).toContain('L/s');
  expect(await standing(page, '0002.csv').textContent()).toContain('ML/d');
  await start(page);
  await taken(page);
  expect(await stationCodes(slug)).toEqual(names);
});

test('a mapping is saved, used again for another file, and removed', async () => {
  const { page } = await importPage();
  const odd = (code: string) =>
    `when;amount;quelle\n${days(code, 30, () => '1,5')
      .map((row) => row.replace(/^\w+,/, '').replace(',', ';'))
      .join(';x\n')};x\n`;
  await send(page, file('0001.csv', odd('0001')));
  const panel = await show(page, '0001.csv');
  await panel.getByLabel('Unit of the values').selectOption('L/s');
  await settled(page);
  await panel.getByLabel('Save this mapping as').fill('Our archive');
  await panel.getByRole('button', { name: 'Save', exact: true }).click();
  await panel.getByText('Saved as “Our archive”.').waitFor();
  await page.getByRole('button', { name: 'Give up' }).click();
  await send(page, file('0002.csv', odd('0002')));
  const other = await show(page, '0002.csv');
  expect(await other.getByLabel('Unit of the values').inputValue()).toBe('');
  await other.getByLabel('A mapping saved before').selectOption({ label: 'Our archive' });
  await expect.poll(() => other.getByLabel('Unit of the values').inputValue()).toBe('L/s');
  await standing(page, 'ready').waitFor();
  await other.getByText('As JSON').click();
  expect(JSON.parse((await other.locator('details pre').textContent()) ?? '')).toMatchObject({ unit: 'L/s' });
  await other.getByRole('button', { name: 'remove “Our archive”' }).click();
  await other.getByText('“Our archive” is removed.').waitFor();
  expect(await other.getByLabel('A mapping saved before').count()).toBe(0);
});

test('a choice that cannot be is said beside the control, and what was seen stays', async () => {
  const { page } = await importPage();
  await send(page, file('flows.csv', flows(days('0001', 30, () => '1.5'))));
  const panel = await show(page, 'flows.csv');
  await panel.getByText('Signs, missing values and other terms').click();
  const thousands = panel.getByLabel('Sign between thousands');
  await thousands.selectOption('.');
  await expect.poll(() => thousands.getAttribute('aria-invalid')).toBe('true');
  expect(await firstRow(panel).textContent()).toContain('2001-01-01');
  await thousands.selectOption('');
  await expect.poll(() => thousands.getAttribute('aria-invalid')).toBe('false');
});

test('codes that differ by leading zeros are shown beside the list’s, and taken by one click', async () => {
  const { page, slug } = await importPage();
  await send(page, file('stations.csv', REGISTRY), file('flows.csv', flows(days('1', 30, () => '1.5'))));
  const panel = await show(page, 'flows.csv');
  const pair = panel.getByRole('row', { name: '1 0001', exact: true });
  await pair.waitFor();
  await panel.getByRole('button', { name: 'Take them for the stations of the list' }).click();
  await expect.poll(() => standing(page, 'flows.csv').textContent()).toContain('ready');
  await start(page);
  await taken(page);
  expect(await stationCodes(slug)).toEqual(['0001', '0002']);
});

test('longitudes from 0 to 360 are offered as a correction, and its effect is seen', async () => {
  const { page } = await importPage();
  const registry = ['code,name,lat,lon', 'A,Ford,46.1,345.5', 'B,Mill,46.2,346.25'].join('\n');
  await send(page, file('stations.csv', registry));
  const panel = await show(page, 'stations.csv');
  await panel.getByRole('button', { name: /Read longitudes from 0 to 360/ }).click();
  await panel.getByRole('row', { name: /^A / }).waitFor();
  expect(await panel.getByRole('row', { name: /^A / }).textContent()).toContain('−14.5000');
  await expect.poll(() => standing(page, 'stations.csv').textContent()).toContain('ready');
});

test('the keyboard alone sends an answer and imports', async () => {
  const { page } = await importPage();
  await send(page, file('0009.csv', unitless(days('0009', 50, () => '12.5'))));
  await page.getByLabel('Unit of the values').focus();
  await page.keyboard.press('m');
  await standing(page, 'ready').waitFor();
  await page.getByLabel('Imported by').focus();
  await page.keyboard.press('Enter');
  await taken(page);
});

test('the mapping step keeps WCAG 2.2 AA with a fixed-width file and a station list', async () => {
  const { page } = await importPage({ colorScheme: 'dark' });
  const rows = Array.from({ length: 20 }, (_, day) => `200301${String(day + 1).padStart(2, '0')}    1.2500    0.5000`);
  await send(page, file('stations.csv', REGISTRY), file('0007.txt', rows.join('\n')));
  for (const name of ['stations.csv', '0007.txt']) {
    await show(page, name);
    expect(await accessibilityProblems(page)).toEqual([]);
  }
});
