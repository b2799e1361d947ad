/** How fast flow files are read, and in how much memory: prints rows a second beside pandas.read_csv with dates of the
 *  same file, where Python has it; promises nothing.
 *
 *  Usage: npm run bench -- intake; HUNGERSTONE_BENCH_MB changes the size of the file (default 100; 1200 takes minutes). */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildSync } from 'esbuild';
import { afterAll, beforeAll, test } from 'vitest';
import { writeTable } from './long-table.ts';
import { readByPandas, say, sayRate } from './peers.ts';

const TARGET_BYTES = Number(process.env.HUNGERSTONE_BENCH_MB ?? 100) * 1e6;

const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
const child = join(folder, 'child.mjs');

beforeAll(() => {
  buildSync({
    entryPoints: [join(import.meta.dirname, 'intake-child.ts')],
    ...{ bundle: true, platform: 'node', format: 'esm', outfile: child, logLevel: 'error' },
    // Packages that are not modules yet ask for require.
    banner: { js: "import { createRequire } from 'node:module'; const require = createRequire(import.meta.url);" },
  });
});
afterAll(() => rmSync(folder, { recursive: true }));

test.each(['by station', 'by day'] as const)('reading a long table %s', (order) => {
  const path = join(folder, 'table.csv');
  writeTable(path, order, TARGET_BYTES);
  say(`\nlong table ${order}, ${Math.round(statSync(path).size / 1e6)} MB`);
  for (let round = 0; round < 3; round++) {
    const run = spawnSync(process.execPath, [child, path, 'm3/s'], { encoding: 'utf8' });
    if (run.status !== 0) throw new Error(run.stderr);
    const { rows, seconds, peakMB } = JSON.parse(run.stdout);
    sayRate('readFlows', rows, seconds, peakMB);
  }
  readByPandas(path);
  rmSync(path);
});
