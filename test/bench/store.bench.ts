/** How fast records go into the database and come out again: prints times and sizes, promises nothing.
 *
 *  Usage: npm run bench -- store; HUNGERSTONE_BENCH_STATIONS and HUNGERSTONE_BENCH_YEARS change its size. */
import { mkdtempSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { performance } from 'node:perf_hooks';
import { test } from 'vitest';
import { applyStaging } from '../../lib/store/apply-staging.ts';
import { migrate } from '../../lib/store/migrate.ts';
import { closeStore } from '../../lib/store/open.ts';
import { readSeries, regionDataHash } from '../../lib/store/records.ts';
import { createStaging, discardStaging } from '../../lib/store/staging.ts';
import { listStations, stationRecords } from '../../lib/store/stations.ts';
import { undoImport } from '../../lib/store/undo-import.ts';

const STATIONS = Number(process.env.HUNGERSTONE_BENCH_STATIONS ?? 2000);
const DAYS = Math.round(Number(process.env.HUNGERSTONE_BENCH_YEARS ?? 60) * 365.25);
/** one slice at most so long, as in a worker */
const SLICE_MS = 300;

/** A year of flows to two decimals. */
const WAVE = Float64Array.from({ length: 365 }, (_, day) => Math.round(1000 + 900 * Math.sin(day / 58)) / 100);

const say = (text: string): void => void process.stdout.write(`${text}\n`);
const memory = (): string => `${Math.round(process.memoryUsage().rss / 1e6)} MB resident`;

async function timed<T>(what: string, work: () => T | Promise<T>, count = STATIONS): Promise<T> {
  const start = performance.now();
  const result = await work();
  const ms = performance.now() - start;
  say(
    `${what.padEnd(52)} ${(ms / 1000).toFixed(2).padStart(7)} s  ${(ms / count).toFixed(3).padStart(7)} ms each  ${memory()}`,
  );
  return result;
}

function stage(jobId: string, firstDay: number, days: number): void {
  const staging = createStaging(jobId);
  const file = staging.addFile({ kind: 'flows', fileName: `${jobId}.csv` });
  const values = new Float64Array(days);
  const codes = new Uint8Array(days);
  for (let station = 0; station < STATIONS; station++) {
    for (let day = 0; day < days; day++) values[day] = WAVE[(firstDay + day + station) % WAVE.length];
    staging.stagePart(file, {
      ...{ code: `B${station}`, unit: 'm3/s', firstDay, values, codes },
      codeList: [{ text: '', bits: 0 }],
    });
  }
  staging.describeFile(file, { sha256: '' });
  staging.seal();
}

/** The longest time that another writer would have waited: between two turns of the thread. */
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

test('the store, with records of many years', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'hungerstone-bench-'));
  const path = join(folder, 'hungerstone.db');
  process.env.DATABASE_URL = `file:${path}`;
  try {
    say(`${STATIONS} stations, ${DAYS} days each: ${Math.round((STATIONS * DAYS * 9) / 1e6)} MB of days and codes`);
    await migrate();
    const region = { name: 'Bench' };
    await timed('stage', () => stage('first', 0, DAYS));
    let hold = 0;
    const { regionId, imports } = await timed('apply, new records', async () => {
      const results: Awaited<ReturnType<typeof applyStaging>>[] = [];
      hold = await longestPause(async () => results.push(await applyStaging('first', { region, sliceMs: SLICE_MS })));
      return results[0];
    });
    discardStaging('first');
    say(`  longest hold of the lock and the thread: ${Math.round(hold)} ms`);
    const ids = (await listStations(regionId)).map(({ id }) => id);
    for (const round of ['first', 'second']) {
      await timed(`read all records, ${round} time`, () => {
        let days = 0;
        readSeries(ids, (_, { values }) => {
          days += values.length;
        });
        return days;
      });
    }
    await timed('stationRecords', () => stationRecords(regionId));
    await timed('regionDataHash', () => regionDataHash(regionId));
    await timed('stage a year more', () => stage('second', DAYS - 30, 365));
    await timed('apply, laid over the records', async () => {
      hold = await longestPause(() => applyStaging('second', { region, sliceMs: SLICE_MS }));
    });
    discardStaging('second');
    say(`  longest hold of the lock and the thread: ${Math.round(hold)} ms`);
    await timed('read all records, laid', () => readSeries(ids, () => undefined));
    await timed('undo the first import', () => undoImport(imports[0].id, { sliceMs: SLICE_MS }));
    say(`database file: ${Math.round(statSync(path).size / 1e6)} MB`);
  } finally {
    await closeStore();
    rmSync(folder, { recursive: true, force: true });
  }
});
