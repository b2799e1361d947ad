/** How long it takes to try chance on a region's stations, 10,000 orders of the years and 1,000 replicates of the sieve, beside
 *  a numpy script of the orders, where Python has it: prints, promises nothing.
 *
 *  Usage: npm run bench -- chance; HUNGERSTONE_BENCH_STATIONS and HUNGERSTONE_BENCH_YEARS change the region's size
 *  (2000 stations, 60 years). All run on one thread; the program uses all there are. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { test } from 'vitest';
import { chanceSeries } from '../../lib/region/chance-series.ts';
import { settledTrends } from '../../lib/region/settled-trends.ts';
import { sievedSums } from '../../lib/region/sieved-chance.ts';
import { normalQuantile } from '../../lib/statistics/normal.ts';
import { permutedKendall } from '../../lib/statistics/permuted-kendall.ts';
import { randomStream } from '../../lib/statistics/random.ts';
import { sieveTerms } from '../../lib/statistics/sieve.ts';
import { countsByReplicate, type TrendBits } from '../../lib/statistics/trend-bits.ts';
import { say } from './peers.ts';

const STATIONS = Number(process.env.HUNGERSTONE_BENCH_STATIONS ?? 2000);
const YEARS = Number(process.env.HUNGERSTONE_BENCH_YEARS ?? 60);
const PERMUTATIONS = 10_000;
const SIEVED = 1_000;
/** The script's time grows with the number of orders: it gets some, and is scaled up. */
const PEER_PERMUTATIONS = 100;
const PYTHON = '/usr/bin/python3';
const BASIS = { alpha: 0.1, serialCorrection: 'ar1-regional' } as const;

const years = Array.from({ length: YEARS }, (_, i) => 1961 + i);
const rows = Array.from({ length: STATIONS }, (_, station) => {
  const random = randomStream('chance-bench', station);
  const values = years.map(() => Math.round(1000 * Math.exp(0.3 * normalQuantile(random.uniform() || 0.5))) / 1000);
  return { code: `S${station}`, rank: 1, years, values, trendOf: 'minima' as const, serialFactor: 1.5 };
});

/** Does something and prints its seconds of processor time. */
function timed<Value>(what: string, work: () => Value): { value: Value; seconds: number } {
  const begun = process.cpuUsage();
  const value = work();
  const seconds = process.cpuUsage(begun).user / 1e6;
  say(`${what.padEnd(60)} ${seconds.toFixed(2).padStart(8)} s`);
  return { value, seconds };
}

test('chance on a large region', () => {
  const series = chanceSeries(rows, BASIS);
  const orders = timed(`${PERMUTATIONS} orders, ${STATIONS} stations of ${YEARS} years`, () =>
    permutedKendall({ ...series, replicates: PERMUTATIONS, seed: 'bench' }),
  );
  timed(`${SIEVED} replicates of the sieve`, () => sieved(series));
  timed('counting all of them as one group', () => countsByReplicate(orders.value, [...rows.keys()]));
  comparePython(orders.seconds);
});

function sieved(series: ReturnType<typeof chanceSeries>): TrendBits {
  const stations = rows.map(({ code, values }, i) => ({ code, years, values, slope: series.slopes[i] }));
  const terms = sieveTerms([years], 0.2);
  const sums = sievedSums({ stations, terms, basis: BASIS, replicates: SIEVED, seed: 'bench' });
  return settledTrends({ sums, lengths: rows.map(() => YEARS), critical: series.corrected, basis: BASIS });
}

function comparePython(ours: number): void {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
  try {
    const path = join(folder, 'values.json');
    writeFileSync(path, JSON.stringify(rows.map(({ values }) => values)));
    const argv = ['test/bench/chance_peer.py', path, String(PEER_PERMUTATIONS)];
    const { status, stdout } = spawnSync(PYTHON, argv, { encoding: 'utf8' });
    if (status !== 0) {
      say(`numpy: not at ${PYTHON} here, so nothing to compare with`);
      return;
    }
    const { signs, product, numpy } = JSON.parse(stdout) as { signs: number; product: number; numpy: string };
    const all = PERMUTATIONS / PEER_PERMUTATIONS;
    for (const [way, seconds] of Object.entries({ 'signs of pairs': signs, 'product of matrices': product })) {
      say(
        `numpy ${numpy}, ${way}, scaled up from ${PEER_PERMUTATIONS} orders`.padEnd(60) +
          ` ${(seconds * all).toFixed(2).padStart(8)} s: ${((seconds * all) / ours).toFixed(1)} times as long`,
      );
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
