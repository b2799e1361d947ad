/** How long start–end charts take, one station's and a region's, beside a numpy and scipy script of the same work, where
 *  Python has them: prints, promises nothing.
 *
 *  Usage: npm run bench -- windows; HUNGERSTONE_BENCH_STATIONS and HUNGERSTONE_BENCH_YEARS change the region's size
 *  (2000 stations, 60 years). Both run on one thread. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { test } from 'vitest';
import { DEFAULT_BASIS, type ResolvedBasis } from '../../lib/basis.ts';
import { regionStartEnd } from '../../lib/region/region-start-end.ts';
import { type StartEndRow, startEnd } from '../../lib/region/start-end.ts';
import { steadinessOf } from '../../lib/region/steadiness.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import { randomStream } from '../../lib/statistics/random.ts';
import { say } from './peers.ts';

const STATIONS = Number(process.env.HUNGERSTONE_BENCH_STATIONS ?? 2000);
const YEARS = Number(process.env.HUNGERSTONE_BENCH_YEARS ?? 60);
const FIRST = 1961;
/** The script's time grows with the number of stations: it gets some, and is scaled up. */
const PEER_STATIONS = Math.min(STATIONS, 100);
const PYTHON = '/usr/bin/python3';
const ROUNDS = 5;

const PERIOD: [number, number] = [FIRST, FIRST + YEARS - 1];
const BASIS: ResolvedBasis = {
  ...DEFAULT_BASIS,
  period: PERIOD,
  yearStart: 4,
  asked: { period: 'common', yearStart: 4 },
};

function inventedRows(): StartEndRow[] {
  const years = Array.from({ length: YEARS }, (_, i) => FIRST + i);
  return Array.from({ length: STATIONS }, (_, station) => {
    const random = randomStream('windows-bench', station);
    let carried = 0;
    const values = years.map(() => {
      carried = 0.3 * carried + normalQuantile(random.uniform() || 0.5);
      return Math.round(1000 * Math.exp(0.3 * carried)) / 1000;
    });
    return { code: `S${station}`, years, values, trendOf: 'minima', r1: 0.3, serialFactor: 1.8 };
  });
}

/** Milliseconds of processor time: the best of some rounds. */
function best(work: () => unknown): number {
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < ROUNDS; round++) {
    const begun = process.cpuUsage();
    work();
    least = Math.min(least, process.cpuUsage(begun).user / 1000);
  }
  return least;
}

const line = (what: string, milliseconds: number) =>
  say(`${what.padEnd(68)} ${milliseconds.toFixed(2).padStart(10)} ms`);

test('start–end charts', () => {
  const rows = inventedRows();
  const few = rows.slice(0, 100);
  const station = best(() => few.map((row) => startEnd(row, BASIS))) / few.length;
  const region = best(() => regionStartEnd(rows, BASIS, PERIOD));
  say(`${STATIONS} stations, ${YEARS} years; processor time on one thread, best of ${ROUNDS}`);
  line('chart of one station: Z, p, slope, percent in every window', station);
  line('chart of the region: who falls and rises in every window', region);
  line(
    'steadiness of every station, within a ranking',
    best(() => rows.map((row) => steadinessOf(row, PERIOD))),
  );
  line(
    'chart of the region, every window whitened by itself',
    best(() => regionStartEnd(few, { ...BASIS, serialCorrection: 'pre-whitened' }, PERIOD)) * (STATIONS / few.length),
  );
  comparePython(rows.slice(0, PEER_STATIONS), { station, region });
}, 600_000);

function comparePython(rows: readonly StartEndRow[], ours: { station: number; region: number }): void {
  if (spawnSync(PYTHON, ['-c', 'import numpy, scipy']).status !== 0) {
    say('No comparison: there is no Python with numpy and scipy here.');
    return;
  }
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
  try {
    const path = join(folder, 'rows.json');
    writeFileSync(path, JSON.stringify({ years: rows[0].years, values: rows.map(({ values }) => values) }));
    const { status, stdout, stderr } = spawnSync(PYTHON, ['test/bench/windows_peer.py', path], { encoding: 'utf8' });
    if (status !== 0) throw new Error(stderr);
    const peer = JSON.parse(stdout) as { station: number; region: number };
    const region = peer.region * (STATIONS / rows.length);
    line('numpy, scipy: chart of one station', peer.station);
    line(`numpy, scipy: chart of the region (${rows.length} stations, scaled up)`, region);
    say(
      `ratio, script to program: station ${(peer.station / ours.station).toFixed(0)}, region ${(region / ours.region).toFixed(0)}`,
    );
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
