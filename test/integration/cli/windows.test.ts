import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { rankingOf } from '../../../lib/jobs/ranking.ts';
import { editStation } from '../../../lib/store/station-edit.ts';
import { importedRegion } from '../api/imported-region.ts';
import { runCommand } from './run-command.ts';

const place = importedRegion();

const REGION = ['--region', 'Upper Wethe'];
const rowsOf = (csv: string) => parse(csv, { columns: true }) as Record<string, string>[];
const rows = async () => (await rankingOf(place.region, place.region.basis)).ranking.rows;

test('windows writes a row a window of the region, the whole period over all ranked stations', async () => {
  const { code, stdout } = await runCommand('windows', ...REGION);
  const ranked = (await rows()).filter(({ rank }) => rank !== null);
  expect(code).toBe(0);
  const table = rowsOf(stdout);
  expect(Math.max(...table.map(({ stations }) => Number(stations)))).toBe(ranked.length);
  for (const row of table) expect(Number(row.last_year) - Number(row.first_year)).toBeGreaterThanOrEqual(14);
});

test('windows --station writes its windows; JSON has a list of charts; metadata lies beside the file', async () => {
  const out = `${place.folder}/windows.csv`;
  expect((await runCommand('windows', ...REGION, '--station', 'B2', '--out', out)).code).toBe(0);
  const row = (await rows()).find(({ code }) => code === 'B2')!;
  const whole = rowsOf(readFileSync(out, 'utf8')).find(({ years_used }) => Number(years_used) === row.yearsUsed)!;
  expect(Number(whole.z)).toBeCloseTo(row.z!, 5);
  expect(JSON.parse(readFileSync(`${out}-metadata.json`, 'utf8')).url).toBe('windows.csv');
  const json = await runCommand('windows', ...REGION, '--station', 'B2', '--station', 'A1', '--format', 'json');
  const { stations } = JSON.parse(json.stdout);
  expect(stations.map((each: { station_code: string }) => each.station_code)).toEqual(['B2', 'A1']);
});

test('breaks --breaks writes before and after of every ranked station, and the counts to stderr', async () => {
  const ranked = (await rows()).filter(({ rank }) => rank !== null);
  const year = ranked[0].years[15];
  const { code, stdout, stderr } = await runCommand('breaks', ...REGION, '--breaks', String(year));
  expect([code, rowsOf(stdout).length]).toEqual([0, ranked.length]);
  expect(stderr).toContain(`of ${ranked.length} steps tested`);
  const narrowed = await runCommand('breaks', ...REGION, '--breaks', String(year), '--station', 'B2');
  expect(rowsOf(narrowed.stdout)).toEqual(rowsOf(stdout).filter(({ station_code }) => station_code === 'B2'));
});

test('breaks takes the stations’ dated changes by default, and says when there are none', async () => {
  const none = await runCommand('breaks', ...REGION);
  expect([none.code, rowsOf(none.stdout)]).toEqual([0, []]);
  expect(none.stderr).toContain('No ranked station has such a break.');
  await editStation(place.region.id, 'B2', { changes: [{ date: '1850-01-01', kind: 'weir changed', note: '' }] });
  const old = rowsOf((await runCommand('breaks', ...REGION)).stdout);
  expect(old).toMatchObject([{ station_code: 'B2', break_from: 'change', p_value: '' }]);
  expect(old[0].warning).toContain('no usable year before it');
});

test.each([
  [['windows', ...REGION, '--format', 'geojson'], '--format takes csv or json here'],
  [['breaks', ...REGION, '--format', 'geojson'], '--format takes csv or json here'],
  [['breaks', ...REGION, '--breaks', 'dam'], '--breaks takes changes'],
  [['breaks', '--breaks', '1990'], 'Name the region with --region'],
])('%j is refused as wrong usage', async ([name, ...rest], words) => {
  const { code, stdout, stderr } = await runCommand(name, ...rest);
  expect([code, stdout]).toEqual([2, '']);
  expect(stderr).toContain(words);
});

test('windows of a station that the region has not fails by name', async () => {
  const { code, stderr } = await runCommand('windows', ...REGION, '--station', 'Q9');
  expect(code).toBe(1);
  expect(stderr).toContain('Upper Wethe has no station "Q9"');
});
