/** How long a region's ranking takes from nothing, from memory and from the store, and in how much memory: prints it beside
 *  a numpy, pandas and scipy script of the same work, where Python has them; promises nothing.
 *
 *  Usage: npm run bench -- ranking; HUNGERSTONE_BENCH_STATIONS and HUNGERSTONE_BENCH_YEARS change the region's size
 *  (2000 stations, 60 years). */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buildSync } from 'esbuild';
import { test } from 'vitest';
import { migrate } from '../../lib/store/migrate.ts';
import { closeStore } from '../../lib/store/open.ts';
import { generateRegion } from '../../seed/generate.ts';
import { storeRegion } from '../../seed/store-region.ts';

const STATIONS = Number(process.env.HUNGERSTONE_BENCH_STATIONS ?? 2000);
const YEARS = Number(process.env.HUNGERSTONE_BENCH_YEARS ?? 60);
const PYTHON = '/usr/bin/python3';
const ROUNDS = 3;

const say = (text: string): void => void process.stdout.write(`${text}\n`);

interface Figures {
  cold: number;
  pause: number;
  warm: number;
  page: number;
  pageMB: number;
  csv: number;
  otherTest: number;
  otherDays: number;
  stored: number;
  peakMB: number;
  counts: { ranked: number };
  basis: { yearStart: number };
}

/** Bundled beside the workers' bundle, so that its packages are found. */
function bundleChild(): string {
  const outfile = join(process.cwd(), '.build', 'ranking-bench.mjs');
  const entryPoints = ['test/bench/ranking-child.ts'];
  const shape = { bundle: true, platform: 'node', format: 'esm', target: 'node20', packages: 'external' } as const;
  buildSync({ entryPoints, outfile, ...shape, logLevel: 'error' });
  return outfile;
}

function output(command: string, argv: string[]): string {
  const { status, stdout, stderr } = spawnSync(command, argv, { encoding: 'utf8', maxBuffer: 2 ** 26 });
  if (status !== 0) throw new Error(stderr);
  return stdout;
}

const canImport = (...modules: string[]): boolean =>
  spawnSync(PYTHON, ['-c', `import ${modules.join(', ')}`]).status === 0;

test('the ranking of a large region', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
  const path = join(folder, 'hungerstone.db');
  process.env.DATABASE_URL = `file:${path}`;
  try {
    say(`Making ${STATIONS} invented stations of ${YEARS} years …`);
    await migrate();
    const slug = await storeRegion(generateRegion({ seed: 7, stations: STATIONS, years: YEARS }), { name: 'Bench' });
    await closeStore();
    const child = bundleChild();
    let best: Figures | null = null;
    for (let round = 0; round < ROUNDS; round++) {
      const figures = JSON.parse(output(process.execPath, [child, slug])) as Figures;
      if (best === null || figures.cold < best.cold) best = figures;
    }
    rmSync(child, { force: true });
    tell(best!);
    comparePython(path, slug, best!);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
});

function tell(figures: Figures): void {
  const line = (what: string, value: number, unit: string, digits = 0) =>
    say(`${what.padEnd(60)} ${value.toFixed(digits).padStart(8)} ${unit}`);
  say(`${figures.counts.ranked} of ${STATIONS} stations ranked; best of ${ROUNDS}`);
  line('cold: read, minima, trend, significance', figures.cold / 1000, 's', 2);
  line('longest time in which the server would answer nobody', figures.pause, 'ms');
  line('warm, from memory', figures.warm, 'ms');
  line(`the same as JSON for a page (${figures.pageMB.toFixed(1)} MB)`, figures.page, 'ms');
  line('the same as CSV', figures.csv, 'ms');
  line('from the store, after a restart', figures.stored, 'ms');
  line('another significance (minima kept)', figures.otherTest, 'ms');
  line('another n-day length (start month kept)', figures.otherDays, 'ms');
  line('peak memory', figures.peakMB, 'MB');
}

function comparePython(path: string, slug: string, figures: Figures): void {
  if (!canImport('numpy', 'pandas', 'scipy')) {
    say('No comparison: there is no Python with numpy, pandas and scipy here.');
    return;
  }
  const peer = output(PYTHON, ['test/bench/ranking_peer.py', path, slug, String(figures.basis.yearStart)]);
  const { seconds, stations, peakMB } = JSON.parse(peer) as { seconds: number; stations: number; peakMB: number };
  say(`numpy, pandas, scipy, on all cores: ${seconds.toFixed(2)} s for ${stations} stations, ${peakMB.toFixed(0)} MB`);
  say(`ratio, script to program: ${((seconds * 1000) / figures.cold).toFixed(1)}`);
}
