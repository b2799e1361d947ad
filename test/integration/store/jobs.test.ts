import { expect, test } from 'vitest';
import { beatJob, createJob, failDeadJobs, finishJob, getJob, listJobs, startJob } from '../../../lib/store/jobs.ts';
import { openStore } from '../../../lib/store/open.ts';
import { createRegion } from '../../../lib/store/regions.ts';
import { temporaryDatabase } from './temporary-database.ts';

temporaryDatabase();

test('a job’s row goes from waiting over running to its end, and stays as it ended', async () => {
  const region = await createRegion({ name: 'Wethe' });
  expect(await createJob({ id: 'j', kind: 'import' })).toMatchObject({
    state: 'waiting',
    regionId: null,
    result: null,
  });
  expect(await startJob('j')).toBe(true);
  expect(await beatJob('j', { share: 0.5 })).toBe(true);
  expect(await getJob('j')).toMatchObject({ state: 'running', progress: { share: 0.5 } });
  expect(await beatJob('j')).toBe(true);
  expect(await finishJob('j', { state: 'done', result: [1], regionId: region.id })).toBe(true);
  expect(await finishJob('j', { state: 'failed', error: 'late' })).toBe(false);
  expect(await beatJob('j', { share: 0 })).toBe(false);
  expect(await getJob('j')).toMatchObject({ state: 'done', progress: { share: 0.5 }, result: [1], error: null });
  expect(await listJobs({ regionId: region.id })).toHaveLength(1);
  expect(await getJob('none')).toBeNull();
});

test('a job that was cancelled while it waited does not start', async () => {
  await createJob({ id: 'j', kind: 'import' });
  await finishJob('j', { state: 'cancelled' });
  expect(await startJob('j')).toBe(false);
});

test('failDeadJobs() fails those whose heartbeat is over 30 s old, and no other', async () => {
  for (const id of ['dead', 'alive', 'done']) await createJob({ id, kind: 'import' });
  await finishJob('done', { state: 'done' });
  const age = (id: string, seconds: number) =>
    openStore().prisma.job.update({ where: { id }, data: { heartbeat: new Date(Date.now() - seconds * 1000) } });
  await age('dead', 31);
  await age('alive', 25);
  await age('done', 99);
  expect(await failDeadJobs()).toEqual(['dead']);
  expect(await getJob('dead')).toMatchObject({ state: 'failed', error: expect.stringContaining('start it again') });
  expect(await getJob('alive')).toMatchObject({ state: 'waiting' });
  expect(await getJob('done')).toMatchObject({ state: 'done' });
  expect(await failDeadJobs()).toEqual([]);
});
