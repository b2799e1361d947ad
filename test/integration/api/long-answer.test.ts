import { afterAll, afterEach, beforeEach, expect, test } from 'vitest';
import { longAnswer, MOST_AT_ONCE } from '../../../app/api/_http/long-answer.ts';
import { cached, forgetResults } from '../../../lib/jobs/cached.ts';
import type { WorkContext } from '../../../lib/jobs/lanes.ts';
import { cancelJob, viewJob } from '../../../lib/jobs/live-jobs.ts';
import { closePool } from '../../../lib/jobs/pool.ts';
import { createJob } from '../../../lib/store/jobs.ts';
import { recoverStore } from '../../../lib/store/recover.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();
afterAll(closePool);
afterEach(forgetResults);

let regionId: number;
beforeEach(async () => {
  regionId = (await createRegion({ name: 'Upper Wethe' })).id;
});

/** Work that ends when the test says so. */
function heldWork(key: string) {
  let runs = 0;
  let end: (value: number) => void = () => undefined;
  const ended = new Promise<number>((resolve) => {
    end = resolve;
  });
  const compute = ({ signal, onProgress }: WorkContext) =>
    cached('certainty', key, async () => {
      runs += 1;
      onProgress?.({ stage: 'certainty', done: 1, of: 4, share: 0.25 });
      const stopped = new Promise<never>((_, reject) => {
        signal?.addEventListener('abort', () => reject(signal.reason), { once: true });
      });
      return Promise.race([ended, stopped]);
    });
  const order = { kind: 'certainty' as const, regionId, key, compute };
  return { order, end, runs: () => runs };
}

const many = { stations: MOST_AT_ONCE + 1, wait: false };
const asText = (value: number) => new Response(`value ${value}`);

async function jobIn(response: Response): Promise<string> {
  expect(response.status).toBe(202);
  const { job } = (await response.json()) as { job: string };
  expect(response.headers.get('location')).toBe(`/api/jobs/${job}`);
  return job;
}

test('long work is answered with its job, joined by whoever asks meanwhile, and by its answer when it is done', async () => {
  const { order, end, runs } = heldWork('a');
  const job = await jobIn(await longAnswer({ ...order, ...many }, asText));
  await expect.poll(async () => (await viewJob(job))?.progress).toMatchObject({ share: 0.25 });
  expect(await jobIn(await longAnswer({ ...order, ...many }, asText))).toBe(job);
  const waiting = longAnswer({ ...order, ...many, wait: true }, asText);
  end(7);
  expect(await (await waiting).text()).toBe('value 7');
  expect(await (await longAnswer({ ...order, ...many }, asText)).text()).toBe('value 7');
  expect(runs()).toBe(1);
  expect(await viewJob(job)).toMatchObject({ kind: 'certainty', state: 'done', progress: { share: 0.25 } });
});

test('short work is answered at once, without a job', async () => {
  const { order, end } = heldWork('b');
  end(3);
  const answer = await longAnswer({ ...order, stations: MOST_AT_ONCE, wait: false }, asText);
  expect([answer.status, await answer.text()]).toEqual([200, 'value 3']);
});

test('cancelled work ends for all who joined, and the next to ask starts it anew', async () => {
  const { order, end } = heldWork('c');
  const job = await jobIn(await longAnswer({ ...order, ...many }, asText));
  const waiting = longAnswer({ ...order, ...many, wait: true }, asText);
  const refused = expect(waiting).rejects.toThrow('cancelled by someone');
  await cancelJob(job);
  await refused;
  expect((await viewJob(job))?.state).toBe('cancelled');
  const next = await jobIn(await longAnswer({ ...order, ...many }, asText));
  expect(next).not.toBe(job);
  end(1);
  await expect.poll(async () => (await viewJob(next))?.state).toBe('done');
});

test('a job that waits its turn can be cancelled before the one it waits for ends, and the third still waits', async () => {
  const [first, second, third] = ['d', 'e', 'f'].map(heldWork);
  const jobs: string[] = [];
  for (const { order } of [first, second, third])
    jobs.push(await jobIn(await longAnswer({ ...order, ...many }, asText)));
  await cancelJob(jobs[1]);
  expect((await viewJob(jobs[1]))?.state).toBe('cancelled');
  expect((await viewJob(jobs[2]))?.state).toBe('waiting');
  expect([first.runs(), second.runs(), third.runs()]).toEqual([1, 0, 0]);
  first.end(1);
  third.end(1);
  await expect.poll(async () => (await viewJob(jobs[2]))?.state).toBe('done');
});

test('work that fails fails its job in words that hold nothing of the machine, and is started anew', async () => {
  const order = { ...heldWork('g').order, compute: () => Promise.reject(new RangeError('/secret')) };
  const warned: unknown[] = [];
  const printing = process.listeners('warning');
  process.removeAllListeners('warning').on('warning', (warning) => warned.push(warning));
  const job = await jobIn(await longAnswer({ ...order, ...many }, asText));
  await expect.poll(async () => (await viewJob(job))?.state).toBe('failed');
  expect((await viewJob(job))?.error).not.toContain('secret');
  expect(await jobIn(await longAnswer({ ...order, ...many }, asText))).not.toBe(job);
  await expect.poll(() => warned.length).toBe(2);
  process.removeAllListeners('warning');
  for (const print of printing) process.on('warning', print);
});

test('a job whose process ended fails when its heartbeat has stopped, and nothing joins it', async () => {
  await createJob({ id: 'of-before', kind: 'certainty', regionId });
  await recoverStore({ deadAfterMs: -1 });
  expect(await viewJob('of-before')).toMatchObject({
    state: 'failed',
    error: expect.stringContaining('start it again'),
  });
  const { order, end } = heldWork('h');
  const job = await jobIn(await longAnswer({ ...order, ...many }, asText));
  expect(job).not.toBe('of-before');
  end(1);
  await expect.poll(async () => (await viewJob(job))?.state).toBe('done');
});
