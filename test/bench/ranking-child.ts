/** Ranks one region in a process of its own, from nothing kept: so the times and the peak memory are the ranking's alone.
 *  Argument: slug. The database comes from DATABASE_URL. Prints JSON, times in milliseconds. */
import { performance } from 'node:perf_hooks';
import { rankingProduct } from '../../lib/export/ranking-product.ts';
import { forgetResults } from '../../lib/jobs/cached.ts';
import { closePool, keepWorkersReady } from '../../lib/jobs/pool.ts';
import { rankingOf } from '../../lib/jobs/ranking.ts';
import { openConnection } from '../../lib/store/connection.ts';
import { closeStore } from '../../lib/store/open.ts';
import { getRegion } from '../../lib/store/regions.ts';

async function timed<T>(work: () => T | Promise<T>): Promise<[T, number]> {
  const begun = performance.now();
  const result = await work();
  return [result, performance.now() - begun];
}

/** The longest stretch in which this thread answers nobody, while `work` goes on. */
async function longestPause(work: () => Promise<unknown>): Promise<number> {
  let longest = 0;
  let last = performance.now();
  const timer = setInterval(() => {
    longest = Math.max(longest, performance.now() - last);
    last = performance.now();
  }, 5);
  await work();
  clearInterval(timer);
  return Math.max(longest, performance.now() - last);
}

const connection = openConnection();
connection.exec('DELETE FROM Result');
connection.close();
const region = (await getRegion(process.argv[2]))!;
// As in a server: the workers have started, and nothing of the region is at hand.
keepWorkersReady();
await new Promise((resolve) => setTimeout(resolve, 3000));
let cold = 0;
const pause = await longestPause(async () => {
  [, cold] = await timed(() => rankingOf(region, region.basis));
});
const [{ ranking }, warm] = await timed(() => rankingOf(region, region.basis));
const [json, page] = await timed(() => JSON.stringify(ranking));
const from = { region, basis: ranking.basis, dataHash: '', warnings: [] };
const [, csv] = await timed(() => rankingProduct('csv', ranking, from));
const [, otherTest] = await timed(() => rankingOf(region, { ...region.basis, alpha: 0.05 }));
const [, otherDays] = await timed(() => rankingOf(region, { ...region.basis, days: 30 }));
await forgetResults();
const [, stored] = await timed(() => rankingOf(region, region.basis));
await closePool();
await closeStore();
const { counts, basis } = ranking;
const peakMB = process.resourceUsage().maxRSS / 1024;
process.stdout.write(
  JSON.stringify({
    cold,
    pause,
    warm,
    page,
    pageMB: json.length / 1e6,
    csv,
    otherTest,
    otherDays,
    stored,
    peakMB,
    counts,
    basis,
  }),
);
