import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { expect, test } from 'vitest';
import { importedRegion } from '../api/imported-region.ts';
import { runCommand } from './run-command.ts';

const place = importedRegion();
const REGION = ['--region', 'Upper Wethe'];

test('regional writes a row a group and set, and says it in words on stderr', async () => {
  const { code, stdout, stderr } = await runCommand('regional', ...REGION);
  expect(code).toBe(0);
  const rows = parse(stdout, { columns: true }) as Record<string, string>[];
  expect(rows.slice(0, 2).map(({ group, set }) => [group, set])).toEqual([
    ['all', 'all'],
    ['all', 'independent'],
  ]);
  expect(stderr).toContain(rows[0].sentence_chance);
  expect(stderr).toContain(rows[0].sentence_kendall);
});

test('regional --area, --chance and --out answer another group, by the sieve, into a file with its metadata', async () => {
  const out = `${place.folder}/regional.csv`;
  const area = '--area=7.05,50.05;7.25,50.05;7.25,50.25;7.05,50.25';
  const { code, stdout } = await runCommand('regional', ...REGION, area, '--chance', 'sieve', '--out', out);
  expect([code, stdout]).toEqual([0, '']);
  const rows = parse(readFileSync(out, 'utf8'), { columns: true }) as Record<string, string>[];
  expect(rows.find(({ group, set }) => group === 'drawn' && set === 'all')).toMatchObject({
    ranked: '2',
    chance_method: 'sieve',
  });
  expect(JSON.parse(readFileSync(`${out}-metadata.json`, 'utf8')).url).toBe('regional.csv');
});

test.each([
  [['--area', '1,2;3,4'], '--area: an area has 3 to 60 corners, this one has 2.'],
  [['--chance', 'guess'], '--chance takes permutation or sieve, not "guess".'],
  [['--station', 'A1'], 'take --area in place of --station'],
  [['--format', 'geojson'], '--format takes csv or json here, not "geojson".'],
])('regional %j is wrong usage', async (given, message) => {
  const { code, stdout, stderr } = await runCommand('regional', ...REGION, ...given);
  expect([code, stdout]).toEqual([2, '']);
  expect(stderr).toContain(message);
});
