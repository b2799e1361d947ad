/** How long it takes to say how sure every place of a ranking is, 500 replicates of the sieve for each station, in a large
 *  region and in a small one, beside a numpy script of the same work, where Python has it: prints, promises nothing.
 *
 *  Usage: npm run bench -- certainty; HUNGERSTONE_BENCH_STATIONS and HUNGERSTONE_BENCH_YEARS change the large region's size
 *  (2000 stations, 60 years). */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { test } from 'vitest';
import { DEFAULT_BASIS } from '../../lib/basis.ts';
import { forgetResults } from '../../lib/jobs/cached.ts';
import { certaintyOf } from '../../lib/jobs/certainty.ts';
import { closePool, keepWorkersReady, THREADS } from '../../lib/jobs/pool.ts';
import { rankRegion } from '../../lib/region/rank-stations.ts';
import type { Ranking } from '../../lib/region/ranking-types.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import { randomStream } from '../../lib/statistics/random.ts';
import { migrate } from '../../lib/store/migrate.ts';
import { closeStore } from '../../lib/store/open.ts';
import { station } from '../unit/region/region-fixtures.ts';
import { say } from './peers.ts';

const STATIONS = Number(process.env.HUNGERSTONE_BENCH_STATIONS ?? 2000);
const YEARS = Number(process.env.HUNGERSTONE_BENCH_YEARS ?? 60);
const FEW_STATIONS = 40;
const FIRST = 1961;
/** The script's time grows with the number of stations: it gets some, and is scaled up. */
const PEER_STATIONS = Math.min(STATIONS, 100);
const PYTHON = '/usr/bin/python3';

/** Minima that scatter by 30 % and carry over by 0.3, a twentieth of the years missing. */
function inventedRanking(stations: number): Ranking {
  const minima = Array.from({ length: stations }, (_, i) => {
    const random = randomStream('certainty-bench', i);
    const normal = () => normalQuantile(random.uniform() || 0.5);
    const trend = 0.06 * normal();
    let carried = 0;
    const values = Array.from({ length: YEARS }, (_, year) => {
      carried = 0.3 * carried + normal();
      const value = Math.round(1000 * Math.exp(0.3 * carried + (trend * (year - YEARS / 2)) / 10)) / 1000;
      return random.uniform() < 0.05 ? Number.NaN : value;
    });
    return station(`S${String(i).padStart(4, '0')}`, { first: FIRST, values });
  });
  return rankRegion(minima, { ...DEFAULT_BASIS, period: [FIRST, FIRST + YEARS - 1] }, 5);
}

/** Prints and answers the seconds that a region takes from nothing, by the clock and by all processors together. */
async function timed(what: string, ranking: Ranking): Promise<{ clock: number; processors: number }> {
  await forgetResults();
  const [begun, used] = [performance.now(), process.cpuUsage()];
  let told = 0;
  await certaintyOf({ ranking, key: `${what} ${begun}` }, { onProgress: () => told++ });
  const clock = (performance.now() - begun) / 1000;
  const processors = process.cpuUsage(used).user / 1e6;
  say(
    `${what.padEnd(48)} ${clock.toFixed(2).padStart(7)} s, ${processors.toFixed(2)} s of processor time on ${THREADS} threads, progress told ${told} times`,
  );
  return { clock, processors };
}

test('how sure a large ranking is', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
  process.env.DATABASE_URL = `file:${folder}/hungerstone.db`;
  try {
    await migrate();
    keepWorkersReady();
    const few = inventedRanking(FEW_STATIONS);
    const many = inventedRanking(STATIONS);
    await timed('to warm up', few);
    await timed(`${few.counts.ranked} ranked stations of ${YEARS} years`, few);
    const ours = await timed(`${many.counts.ranked} ranked stations of ${YEARS} years`, many);
    comparePython(folder, many, ours);
  } finally {
    await forgetResults();
    await closePool();
    await closeStore();
    rmSync(folder, { recursive: true, force: true });
  }
});

function comparePython(folder: string, { rows }: Ranking, ours: { clock: number; processors: number }): void {
  const path = join(folder, 'rows.json');
  const ranked = rows.filter(({ rank }) => rank !== null);
  const given = ranked.slice(0, PEER_STATIONS).map(({ years, values, serialFactor }) => {
    return { years, values, factor: serialFactor };
  });
  writeFileSync(path, JSON.stringify(given));
  const { status, stdout } = spawnSync(PYTHON, ['test/bench/certainty_peer.py', path], { encoding: 'utf8' });
  if (status !== 0) {
    say(`numpy: not at ${PYTHON} here, so nothing to compare with`);
    return;
  }
  const { arrays, loop, versions } = JSON.parse(stdout) as Peer;
  const ways: [string, number | null][] = [
    [`numpy ${versions.numpy}, 500 replicates at a time`, arrays],
    [`scipy ${versions.scipy}, theilslopes replicate by replicate`, loop],
  ];
  for (const [way, ofStation] of ways) {
    if (ofStation === null) continue;
    const all = ofStation * ranked.length;
    say(
      `${way}, on one thread, scaled up: ${all.toFixed(1)} s of processor time: ${(all / ours.clock).toFixed(1)} times as ` +
        `long by the clock, ${(all / ours.processors).toFixed(1)} times the processor time`,
    );
  }
}

/** Seconds of a station by either way. */
interface Peer {
  arrays: number;
  loop: number | null;
  versions: { numpy: string; scipy: string | null };
}
