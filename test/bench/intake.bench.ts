/** How fast flow files are read, and in how much memory: prints rows a second beside pandas.read_csv with dates of the
 *  same file, where Python has it; promises nothing.
 *
 *  Usage: npm run bench -- intake; HUNGERSTONE_BENCH_MB changes the size of the file (default 100; 1200 takes minutes). */
import { spawnSync } from 'node:child_process';
import { closeSync, existsSync, mkdtempSync, openSync, rmSync, statSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildSync } from 'esbuild';
import { afterAll, beforeAll, test } from 'vitest';
import { dayNumber, isoDate } from '../../lib/calendar/day.ts';

const TARGET_BYTES = Number(process.env.HUNGERSTONE_BENCH_MB ?? 100) * 1e6;
const YEARS = 60;
const FIRST_DAY = dayNumber(1960, 1, 1);
const DAYS = Math.round(YEARS * 365.25);
const PYTHON = '/usr/bin/python3';

const say = (text: string): void => void process.stdout.write(`${text}\n`);
const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
const child = join(folder, 'child.mjs');

beforeAll(() => {
  buildSync({
    entryPoints: [join(import.meta.dirname, 'intake-child.ts')],
    ...{ bundle: true, platform: 'node', format: 'esm', outfile: child, logLevel: 'error' },
  });
});
afterAll(() => rmSync(folder, { recursive: true }));

/** Seeded numbers from 0 to 1 (a linear congruence: evenness hardly matters here). */
function seeded(): () => number {
  let state = 20;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

/** Writes a long table: whole stations one after another, or all stations day by day. */
function writeTable(path: string, order: 'by station' | 'by day'): void {
  const dates = Array.from({ length: DAYS }, (_, at) => isoDate(FIRST_DAY + at));
  const stations = Math.max(1, Math.round(TARGET_BYTES / (DAYS * 28)));
  const random = seeded();
  const file = openSync(path, 'w');
  let block = 'station,date,flow,flag\n';
  const row = (station: number, day: number): void => {
    const flow = Math.exp(random() * 6).toFixed(2);
    block += `${10_000_000 + station},${dates[day]},${flow},${random() < 0.05 ? 'A:e' : 'A'}\n`;
    if (block.length > 1 << 20) {
      writeSync(file, block);
      block = '';
    }
  };
  if (order === 'by station') for (let s = 0; s < stations; s++) for (let d = 0; d < DAYS; d++) row(s, d);
  else for (let d = 0; d < DAYS; d++) for (let s = 0; s < stations; s++) row(s, d);
  writeSync(file, block);
  closeSync(file);
}

function line(what: string, rows: number, seconds: number, peakMB: number): void {
  const rate = `${(rows / seconds / 1e6).toFixed(2)} M rows/s`;
  say(`${what.padEnd(34)} ${seconds.toFixed(2).padStart(7)} s  ${rate.padStart(14)}  peak ${peakMB} MB`);
}

const PANDAS = `
import json, resource, sys, time
import pandas
start = time.perf_counter()
table = pandas.read_csv(sys.argv[1], parse_dates=['date'], dtype={'station': str})
seconds = time.perf_counter() - start
peak = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss // 1024
print(json.dumps({'rows': len(table), 'seconds': seconds, 'peakMB': peak, 'version': pandas.__version__}))
`;

function alongside(path: string): void {
  const run = existsSync(PYTHON) ? spawnSync(PYTHON, ['-c', PANDAS, path], { encoding: 'utf8' }) : null;
  if (run === null || run.status !== 0) {
    say(`pandas: ${run === null ? 'no Python' : 'not installed'} at ${PYTHON} here, so nothing to compare with`);
    return;
  }
  const { rows, seconds, peakMB, version } = JSON.parse(run.stdout);
  line(`pandas ${version} read_csv, parse_dates`, rows, seconds, peakMB);
}

test.each(['by station', 'by day'] as const)('reading a long table %s', (order) => {
  const path = join(folder, 'table.csv');
  writeTable(path, order);
  say(`\nlong table ${order}, ${Math.round(statSync(path).size / 1e6)} MB`);
  for (let round = 0; round < 3; round++) {
    const run = spawnSync(process.execPath, [child, path, 'm3/s'], { encoding: 'utf8' });
    if (run.status !== 0) throw new Error(run.stderr);
    const { rows, seconds, peakMB } = JSON.parse(run.stdout);
    line('readFlows', rows, seconds, peakMB);
  }
  alongside(path);
  rmSync(path);
});
