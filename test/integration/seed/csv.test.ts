import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { NO_ROW } from '../../../lib/series/day-codes.ts';
import { registryCsv, writeFlowsCsv } from '../../../seed/csv.ts';
import { generateRegion } from '../../../seed/generate.ts';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'hungerstone-seed-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

test('writeFlowsCsv() writes a row a day: empty flow where the value is missing, no row where there is none', async () => {
  const path = join(folder, 'flows.csv');
  const codeList = [
    { text: '', bits: 0 },
    { text: 'prov', bits: 2 },
  ];
  const record = {
    ...{ code: 'A1', unit: 'm3/s' as const, firstDay: 11015, codeList },
    values: Float64Array.of(1.5, Number.NaN, Number.NaN, 0),
    codes: Uint8Array.of(0, 0, NO_ROW, 1),
  };
  expect(await writeFlowsCsv(path, [record])).toBe(3);
  expect(readFileSync(path, 'utf8')).toBe(
    'station,date,flow,flag\nA1,2000-02-28,1.5,\nA1,2000-02-29,,\nA1,2000-03-02,0,prov\n',
  );
});

test('writeFlowsCsv() and registryCsv() hold every station and day of a region', async () => {
  const region = generateRegion({ seed: 4, stations: 3, years: 30 });
  const path = join(folder, 'flows.csv');
  const rows = await writeFlowsCsv(path, region.records());
  expect(rows).toBe(3 * 10_958);
  const lines = readFileSync(path, 'utf8').trimEnd().split('\n');
  expect(lines).toHaveLength(rows + 1);
  const registry = registryCsv(region.stations).trimEnd().split('\n');
  expect(registry).toHaveLength(4);
  expect(new Set(lines.slice(1).map((line) => line.split(',')[0]))).toEqual(
    new Set(registry.slice(1).map((line) => line.split(',')[0])),
  );
});

test('writeFlowsCsv() rejects when the file cannot be written', async () => {
  await expect(writeFlowsCsv(join(folder, 'absent', 'flows.csv'), [])).rejects.toThrow('ENOENT');
});
