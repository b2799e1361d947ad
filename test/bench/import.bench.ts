/** How fast a long table comes into the database, checks included, beside pandas.read_csv (dates parsed, nothing stored) and
 *  the sqlite3 shell's .import (stored as text, nothing parsed) of the same file; promises nothing.
 *
 *  Usage: npm run bench -- import.bench; HUNGERSTONE_BENCH_MB changes the size of the file (default 100; 1200 takes minutes). */
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, test } from 'vitest';
import { launchImport } from '../../lib/jobs/import-job.ts';
import { closePool } from '../../lib/jobs/pool.ts';
import { migrate } from '../../lib/store/migrate.ts';
import { closeStore } from '../../lib/store/open.ts';
import { writeTable } from './long-table.ts';
import { importBySqlite, readByPandas, say, sayRate } from './peers.ts';

const TARGET_BYTES = Number(process.env.HUNGERSTONE_BENCH_MB ?? 100) * 1e6;
const ROUNDS = TARGET_BYTES > 500e6 ? 1 : 5;
const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
afterAll(() => rmSync(folder, { recursive: true }));

/** Imports the file into a new database. */
async function importOnce(path: string, round: number): Promise<{ rows: number; seconds: number }> {
  process.env.DATABASE_URL = `file:${path}-${round}.db`;
  await migrate();
  const begun = performance.now();
  const { result } = await launchImport({
    region: { name: 'Bench' },
    files: [{ path, name: 'flows.csv', kind: 'flows' }],
    choices: { all: { unit: 'm3/s' } },
  });
  const { taken } = await result;
  const seconds = (performance.now() - begun) / 1000;
  await closeStore();
  return { rows: taken[0].report?.rows ?? 0, seconds };
}

test.each(['by station', 'by day'] as const)('importing a long table %s', async (order) => {
  const path = join(folder, `flows ${order}.csv`);
  writeTable(path, order, TARGET_BYTES);
  say(`\nlong table ${order}, ${Math.round(statSync(path).size / 1e6)} MB, into the database, checks included`);
  let best = { rows: 0, seconds: Number.POSITIVE_INFINITY };
  for (let round = 0; round < ROUNDS; round++) {
    const run = await importOnce(path, round);
    // As pandas is timed when Python and pandas are loaded, so the import counts when its workers are.
    sayRate(round === 0 ? 'import, by workers that just start' : 'import', run.rows, run.seconds, null);
    if (round > 0 || ROUNDS === 1) best = run.seconds < best.seconds ? run : best;
  }
  await closePool();
  const peak = Math.round(process.resourceUsage().maxRSS / 1024);
  say(`peak of the whole process, worker included: ${peak} MB`);
  const pandas = readByPandas(path);
  const sqlite = importBySqlite(path, best.rows);
  if (pandas !== null) say(`import beside pandas: ${(pandas / best.seconds).toFixed(2)} times as fast`);
  if (sqlite !== null) say(`import beside sqlite3: ${(sqlite / best.seconds).toFixed(2)} times as fast`);
});
