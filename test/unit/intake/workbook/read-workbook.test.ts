import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import writeXlsxFile, { type SheetData } from 'write-excel-file/node';
import { inspectFile } from '../../../../lib/intake/inspect-file.ts';
import { readFlows } from '../../../../lib/intake/read-flows.ts';
import { readRegistry } from '../../../../lib/intake/read-registry.ts';
import type { ReadFlowsOptions, StagedPart } from '../../../../lib/intake/types.ts';
import { daysOf } from '../reading.ts';

async function withWorkbook<T>(sheets: Record<string, SheetData>, use: (path: string) => Promise<T>): Promise<T> {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-workbook-'));
  const path = join(folder, 'a.xlsx');
  const named = Object.entries(sheets).map(([sheet, data]) => ({ sheet, data }));
  await writeXlsxFile(named).toFile(path);
  try {
    return await use(path);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

const text = (...values: string[]) => values.map((value) => ({ type: String, value }));
const day = (date: string, value: number, flag: string) => [
  ...text('007'),
  { type: Date, value: new Date(`${date}T00:00:00Z`), format: 'yyyy-mm-dd' },
  { type: Number, value },
  ...text(flag),
];
const FLOWS = [text('station', 'date', 'flow_m3s', 'flag'), day('2001-03-09', 1.5, 'A:e'), day('2001-03-10', 0.1, 'A')];
const STATIONS = [
  text('station_no', 'station_name', 'lat', 'lon', 'area_km2'),
  [...text('007', 'Mill', '47,25', '8,5'), { type: Number, value: 12.5 }],
];

async function flowsOf(path: string, options: Partial<ReadFlowsOptions> = {}) {
  const parts: StagedPart[] = [];
  const report = await readFlows(path, { fileName: 'a.xlsx', ...options, emit: (part) => parts.push(part) });
  return { report, parts };
}

test('readFlows and inspectFile read the sheet of a workbook that holds flows, and name it', async () => {
  await withWorkbook({ Stations: STATIONS, 'Daily flows': FLOWS }, async (path) => {
    const { report, parts } = await flowsOf(path);
    expect(daysOf(parts[0])).toEqual({ '2001-03-09': [1.5, 'A:e'], '2001-03-10': [0.1, 'A'] });
    expect(report).toMatchObject({ rows: 2, accepted: 2, mapping: { sheet: 'Daily flows', layout: 'long' } });
    expect(report.sha256).toBe(createHash('sha256').update(readFileSync(path)).digest('hex'));
    const seen = await inspectFile(path, { fileName: 'a.xlsx' });
    expect(seen.sheets).toEqual(['Stations', 'Daily flows']);
    expect(seen.problems).toEqual([]);
    expect(
      seen.understood.map(({ row, station, date, value, flag, bits }) => [row, station, date, value, flag, bits]),
    ).toEqual([
      [2, '007', '2001-03-09', 1.5, 'A:e', 1],
      [3, '007', '2001-03-10', 0.1, 'A', 0],
    ]);
  });
});

test('readFlows asks which of two sheets of flows is meant, and takes the one that is named', async () => {
  await withWorkbook({ Upper: FLOWS, Lower: [FLOWS[0], day('2001-03-09', 7, '')] }, async (path) => {
    await expect(flowsOf(path)).rejects.toMatchObject({ problem: { needs: 'sheet' } });
    const seen = await inspectFile(path, { fileName: 'a.xlsx' });
    expect(seen).toMatchObject({ mapping: null, sheets: ['Upper', 'Lower'] });
    expect((await flowsOf(path, { mapping: { sheet: 'Lower' } })).parts[0].values).toEqual(new Float64Array([7]));
  });
});

test('readRegistry reads the sheet of a workbook that lists stations', async () => {
  await withWorkbook({ 'Daily flows': FLOWS, Stations: STATIONS }, async (path) => {
    const { stations } = await readRegistry(path, 'a.xlsx');
    expect(stations).toEqual([
      { code: '007', name: 'Mill', river: '', latitude: 47.25, longitude: 8.5, areaKm2: 12.5, influence: 'unknown' },
    ]);
  });
});
