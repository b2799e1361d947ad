import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { importedRegion } from '../api/imported-region.ts';
import { runCommand } from './run-command.ts';

const place = importedRegion();

const REGION = ['--region', 'Upper Wethe'];
const rowsOf = (csv: string) => parse(csv, { columns: true }) as Record<string, string>[];

function basisFile(basis: unknown): string {
  const path = `${place.folder}/basis.json`;
  writeFileSync(path, typeof basis === 'string' ? basis : JSON.stringify(basis));
  return path;
}

test('rank writes the ranking as CSV to stdout and nothing else', async () => {
  const { code, stdout, stderr } = await runCommand('rank', ...REGION);
  expect(code).toBe(0);
  expect(
    rowsOf(stdout)
      .map(({ station_code }) => station_code)
      .sort(),
  ).toEqual(['A1', 'B2', 'C3', 'D4']);
  expect(rowsOf(stdout)[0]).toMatchObject({ rank: '1', station_code: 'A1', trend: 'falling' });
  expect(stderr).not.toContain('Not ranked');
});

test('rank says how sure each place is, and --no-spans leaves that out', async () => {
  const sure = await runCommand('rank', ...REGION, '--steepest', '1');
  const [first] = rowsOf(sure.stdout);
  expect(first).toMatchObject({ rank: '1', rank_low: '1', steepest_k: '1' });
  expect(Number(first.probability_among_steepest)).toBeGreaterThan(0);
  const plain = await runCommand('rank', ...REGION, '--no-spans');
  expect(rowsOf(plain.stdout)[0]).toMatchObject({ rank: '1', rank_low: '', probability_among_steepest: '' });
  expect(plain.stderr).not.toContain('Simulating');
  const wrong = await runCommand('rank', ...REGION, '--steepest', '51');
  expect([wrong.code, wrong.stderr]).toEqual([2, expect.stringContaining('--steepest takes a whole number 1–50')]);
});

test('rank names on stderr who has no place, with the reason', async () => {
  const { code, stdout, stderr } = await runCommand('rank', ...REGION, '--basis', basisFile({ minYears: 40 }));
  expect(code).toBe(0);
  expect(rowsOf(stdout).map(({ rank }) => rank)).toEqual(['', '', '', '']);
  expect(stderr).toMatch(/Not ranked: A1 Alder Mill: .*40 needed/);
});

test('rank --out writes the file and its metadata beside, and nothing to stdout', async () => {
  const out = `${place.folder}/ranking.csv`;
  const { code, stdout } = await runCommand('rank', ...REGION, '--out', out);
  expect([code, stdout]).toEqual([0, '']);
  expect(readFileSync(out, 'utf8')).toBe((await runCommand('rank', ...REGION)).stdout);
  const metadata = JSON.parse(readFileSync(`${out}-metadata.json`, 'utf8'));
  expect(metadata.url).toBe('ranking.csv');
  expect(metadata.notes[0].basisSentence).toMatch(/^Comparing 7-day minima/);
  expect(readdirSync(place.folder).filter((name) => name.endsWith('.part'))).toEqual([]);
});

test('rank --format json and geojson answer JSON; --station narrows without changing a figure', async () => {
  const json = JSON.parse((await runCommand('rank', ...REGION, '--format', 'json')).stdout);
  expect(json.counts.stations).toBe(4);
  const geojson = JSON.parse((await runCommand('rank', ...REGION, '--format', 'geojson', '--station', 'B2')).stdout);
  expect(geojson.features).toHaveLength(1);
  const ofB2 = json.stations.find((one: { station_code: string }) => one.station_code === 'B2');
  expect(geojson.features[0].properties).toMatchObject({ rank: ofB2.rank, p_adjusted: ofB2.p_adjusted });
});

test('minima writes one row a station and year', async () => {
  const { code, stdout } = await runCommand(
    'minima',
    ...REGION,
    '--basis',
    basisFile({ yearStart: 1 }),
    '--station',
    'C3',
  );
  expect(code).toBe(0);
  expect(rowsOf(stdout)).toHaveLength(30);
  expect(new Set(rowsOf(stdout).map(({ station_code }) => station_code))).toEqual(new Set(['C3']));
});

test('curves --normalise area leaves out a station without an area, by name and with the reason', async () => {
  const byArea = await runCommand('curves', ...REGION, '--normalise', 'area');
  expect(byArea.code).toBe(0);
  expect(new Set(rowsOf(byArea.stdout).map(({ unit }) => unit))).toEqual(new Set(['L/s/km²']));
  expect(byArea.stderr).toMatch(/No curve: D4 Dell Spring: no drainage area/);
  const asMeasured = await runCommand('curves', ...REGION, '--normalise', 'none', '--kind', 'median-annual');
  expect(new Set(rowsOf(asMeasured.stdout).map(({ station_code }) => station_code)).size).toBe(4);
  expect(asMeasured.stderr).toBe('');
});

test.each([
  ['an unknown basis key', { day: 30 }, '"day"'],
  ['a bad value', { days: 0 }, '"days"'],
  ['text that is no JSON', '{days: 30', 'JSON'],
  ['a list', [1], 'JSON object'],
])('--basis with %s is refused by name with exit code 2', async (_what, basis, said) => {
  const { code, stdout, stderr } = await runCommand('rank', ...REGION, '--basis', basisFile(basis));
  expect([code, stdout]).toEqual([2, '']);
  expect(stderr).toContain(said);
});

test.each([
  ['no region', [], 'region'],
  ['an unknown option', ['--region', 'Upper Wethe', '--fast'], '--fast'],
  ['an unknown format', ['--region', 'Upper Wethe', '--format', 'xls'], 'xls'],
  ['a word too many', ['--region', 'Upper Wethe', 'now'], 'now'],
  ['a basis file that is not there', ['--region', 'Upper Wethe', '--basis', '/nowhere.json'], '/nowhere.json'],
])('rank with %s ends with exit code 2', async (_what, argv, said) => {
  const { code, stdout, stderr } = await runCommand('rank', ...argv);
  expect([code, stdout]).toEqual([2, '']);
  expect(stderr).toContain(said);
});

test('a region or station that is not there ends with exit code 1, and what is there is named', async () => {
  const nowhere = await runCommand('rank', '--region', 'Nowhere');
  expect([nowhere.code, nowhere.stdout]).toEqual([1, '']);
  expect(nowhere.stderr).toContain('Upper Wethe');
  expect(await runCommand('minima', ...REGION, '--station', 'Z9')).toMatchObject({ code: 1, stdout: '' });
});

test('--out into a folder that is not there ends with exit code 1 and leaves no half file', async () => {
  const { code } = await runCommand('rank', ...REGION, '--out', `${place.folder}/none/ranking.csv`);
  expect(code).toBe(1);
  expect(existsSync(`${place.folder}/none`)).toBe(false);
});
