import { describe, expect, test } from 'vitest';
import { fetchJson } from './demo-region.ts';
import { accessibilityProblems } from './harness.ts';
import { compare, days, file, importPage, send, start, taken } from './import-page.ts';

/** Two hundred days; the first ten of them provisional. */
const standingRows = days('0001', 200, (day) => `1.5,${day < 10 ? 'P' : 'A'}`);
/** Days 5–14 are unlike (five of them provisional before), 15–199 equal, 200–229 new. */
const laterRows = days('0001', 225, (day) => `${day < 15 ? '2.5' : '1.5'},A`, 5);
const text = (rows: string[]): string => `station,date,flow_m3s,quality\n${rows.join('\n')}\n`;

const withRecord = async (options = {}) => {
  const { page, slug } = await importPage(options);
  await send(page, file('first.csv', text(standingRows)));
  await start(page);
  await taken(page);
  await send(page, file('later.csv', text(laterRows)));
  return { page, slug };
};

interface Listed {
  fileName: string;
  rule: string;
  revisions: { extended: number; equal: number; unlike: number; revised: number };
}
const imports = async (slug: string) => (await fetchJson(`/api/regions/${slug}/imports`)) as Listed[];

test('an import is tried first: what it adds and changes is shown, and nothing has been changed', async () => {
  const { page, slug } = await withRecord();
  await compare(page);
  const table = page.getByRole('region', { name: 'Days that each file adds, fills and changes' });
  expect(
    await table
      .getByRole('row', { name: /^later\.csv/ })
      .getByRole('cell')
      .allTextContents(),
  ).toEqual([...['30', '0', '185', '10', '5']]);
  const station = page.getByRole('region', { name: 'Unlike values in later.csv' });
  expect(await station.getByRole('row', { name: /^0001/ }).textContent()).toMatch(/1\.500 m³\/s2\.500 m³\/s/);
  expect(await page.getByRole('button', { name: 'Import 1 file' }).isDisabled()).toBe(true);
  expect((await imports(slug)).map(({ fileName }) => fileName)).toEqual(['first.csv']);
  expect(await accessibilityProblems(page)).toEqual([]);
  await page.getByRole('button', { name: 'Back to the files' }).click();
  await page.getByRole('heading', { name: '1 file to import' }).waitFor();
});

describe('each rule changes as many values as it said', () => {
  test.each([
    [/^Keep what stands \(no value changes\)/, 'keep', 0],
    [/^Take the new values \(10 values would change\)/, 'take-new', 10],
    [
      /^Take the new values where the old ones were provisional \(5 values would change, 5 would stay\)/,
      'take-where-provisional',
      5,
    ],
  ] as const)('%s', async (label, rule, revised) => {
    const { page, slug } = await withRecord();
    await compare(page);
    await page.getByLabel(label).check();
    await start(page);
    await taken(page);
    const report = (await page.getByRole('region', { name: 'Report on later.csv' }).textContent()) ?? '';
    expect(report).toContain(`30 days added, 185 equal, ${revised} of 10 unlike days took the new value`);
    const [newest] = await imports(slug);
    expect([newest.rule, newest.revisions.revised]).toEqual([rule, revised]);
  });
});

test('undo of the later import says what goes back, and brings back what stood', async () => {
  const { page, slug } = await withRecord();
  await compare(page);
  await page.getByLabel(/^Take the new values \(/).check();
  await start(page);
  await taken(page);
  await page.getByRole('button', { name: 'Undo the import of later.csv' }).click();
  const dialog = page.getByRole('alertdialog');
  const words = (await dialog.textContent()) ?? '';
  expect(words).toContain('30 days had no value before it.');
  expect(words).toContain('10 values that it changed go back to what stood.');
  await dialog.getByRole('button', { name: 'Undo the import' }).click();
  await dialog.waitFor({ state: 'detached' });
  expect((await imports(slug)).map(({ fileName }) => fileName)).toEqual(['first.csv']);
  await send(page, file('again.csv', text(standingRows)));
  await compare(page);
  await page.getByText('No day would be added. No value that stands would change.').waitFor();
});

test('the comparison fits a phone', async () => {
  const { page } = await withRecord({ width: 390, height: 844 });
  await compare(page);
  expect(await accessibilityProblems(page)).toEqual([]);
  expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0);
});
