import { whenFree } from './busy.ts';
import { DEAD_AFTER_MS } from './dead-after.ts';
import { openStore } from './open.ts';

export const JOB_STATES = ['waiting', 'running', 'done', 'failed', 'cancelled'] as const;
export type JobState = (typeof JOB_STATES)[number];

/** Long work; its row is the truth about it. */
export interface JobRow {
  id: string;
  regionId: number | null;
  kind: string;
  state: JobState;
  progress: unknown;
  result: unknown;
  error: string | null;
  heartbeat: Date;
  createdAt: Date;
  finishedAt: Date | null;
}

/** Notes a job that waits. */
export async function createJob(job: { id: string; kind: string; regionId?: number | null }): Promise<JobRow> {
  const data = { id: job.id, kind: job.kind, regionId: job.regionId ?? null, state: 'waiting' };
  return toJob(await whenFree(() => openStore().prisma.job.create({ data })));
}

/** A job by its id, or null. */
export async function getJob(id: string): Promise<JobRow | null> {
  const row = await openStore().prisma.job.findUnique({ where: { id } });
  return row && toJob(row);
}

/** Jobs, newest first; of one region where it is given. */
export async function listJobs({
  regionId,
  limit = 50,
}: {
  regionId?: number;
  limit?: number;
} = {}): Promise<JobRow[]> {
  const where = regionId === undefined ? {} : { regionId };
  return (await openStore().prisma.job.findMany({ where, orderBy: { createdAt: 'desc' }, take: limit })).map(toJob);
}

/** Marks a waiting job as running. @returns false when it no longer waits, because it was cancelled */
export const startJob = (id: string): Promise<boolean> => change(id, ['waiting'], { state: 'running' });

/** Notes that a job lives, with its progress where there is news. @returns false when the job is over */
export const beatJob = (id: string, progress?: unknown): Promise<boolean> =>
  change(id, ['waiting', 'running'], progress === undefined ? {} : { progress: JSON.stringify(progress) });

/** Ends a job. A job that is over stays as it ended. @returns false when it was over already */
export const finishJob = (
  id: string,
  end: { state: 'done' | 'failed' | 'cancelled'; result?: unknown; error?: string; regionId?: number },
): Promise<boolean> =>
  change(id, ['waiting', 'running'], {
    state: end.state,
    result: JSON.stringify(end.result ?? null),
    error: end.error ?? null,
    finishedAt: new Date(),
    ...(end.regionId === undefined ? {} : { regionId: end.regionId }),
  });

/** Fails the jobs whose heartbeat stopped: their process is gone. @returns their ids */
export async function failDeadJobs({ deadAfterMs = DEAD_AFTER_MS } = {}): Promise<string[]> {
  const { job } = openStore().prisma;
  const where = { state: { in: ['waiting', 'running'] }, heartbeat: { lt: new Date(Date.now() - deadAfterMs) } };
  const dead = (await job.findMany({ where, select: { id: true } })).map(({ id }) => id);
  const error = 'The program ended before this was done; start it again.';
  if (dead.length > 0) {
    await whenFree(() =>
      job.updateMany({
        where: { ...where, id: { in: dead } },
        data: { state: 'failed', error, finishedAt: new Date() },
      }),
    );
  }
  return dead;
}

type JobChange = Partial<Pick<JobRow, 'state' | 'error' | 'finishedAt' | 'regionId'>> & {
  progress?: string;
  result?: string;
};

async function change(id: string, from: JobState[], data: JobChange): Promise<boolean> {
  const { job } = openStore().prisma;
  const where = { id, state: { in: from as string[] } };
  const { count } = await whenFree(() => job.updateMany({ where, data: { ...data, heartbeat: new Date() } }));
  return count > 0;
}

type StoredJob = Omit<JobRow, 'state' | 'progress' | 'result'> & { state: string; progress: string; result: string };

const toJob = (row: StoredJob): JobRow => ({
  ...row,
  state: row.state as JobState,
  progress: JSON.parse(row.progress),
  result: JSON.parse(row.result),
});
