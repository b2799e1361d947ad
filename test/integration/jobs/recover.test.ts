import { existsSync, mkdirSync, readdirSync, utimesSync, writeFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { recoverJobs } from '../../../lib/jobs/recover.ts';
import { rejectedFolder, rejectedRowsFile } from '../../../lib/jobs/rejected-rows.ts';
import { uploadFolder } from '../../../lib/jobs/upload-folder.ts';
import { createJob, getJob } from '../../../lib/store/jobs.ts';
import { openStore } from '../../../lib/store/open.ts';
import { temporaryDatabase } from '../store/temporary-database.ts';

temporaryDatabase();

async function jobWithFiles(id: string, secondsOld: number): Promise<void> {
  await createJob({ id, kind: 'import' });
  const heartbeat = new Date(Date.now() - secondsOld * 1000);
  await openStore().prisma.job.update({ where: { id }, data: { heartbeat } });
  mkdirSync(uploadFolder(id));
  writeFileSync(`${uploadFolder(id)}/0`, 'date,flow');
  const rejected = rejectedRowsFile(id, 1);
  rejected.write({ row: 2, text: 'x', reason: 'y' });
  rejected.close();
}

test('recoverJobs fails a job whose heart stopped and takes its files away, and leaves a living one alone', async () => {
  await jobWithFiles('dead', 40);
  await jobWithFiles('alive', 5);
  await recoverJobs();
  expect([(await getJob('dead'))!.state, (await getJob('alive'))!.state]).toEqual(['failed', 'waiting']);
  expect([existsSync(uploadFolder('dead')), existsSync(uploadFolder('alive'))]).toEqual([false, true]);
  expect(readdirSync(rejectedFolder())).toEqual(['alive-1.csv']);
});

test('recoverJobs removes an upload that nobody knows after a day, not before', async () => {
  for (const [id, hours] of [
    ['old', 25],
    ['new', 23],
  ] as const) {
    mkdirSync(uploadFolder(id));
    const then = Date.now() / 1000 - hours * 3600;
    utimesSync(uploadFolder(id), then, then);
  }
  await recoverJobs();
  expect([existsSync(uploadFolder('old')), existsSync(uploadFolder('new'))]).toEqual([false, true]);
});
