import { DEAD_AFTER_MS, failDeadJobs } from '../store/jobs.ts';
import { discardStaging } from '../store/staging.ts';
import { discardAbandonedUploads, discardUpload } from './upload-folder.ts';

/** Clears up after a process that died: its jobs become failed and their staging files go. Looks once at once and once
 *  more when the heartbeat of a job that died a moment ago has had the time to grow old. */
export async function recoverJobs(): Promise<void> {
  await clearUp();
  setTimeout(() => void clearUp().catch(report), DEAD_AFTER_MS + 1000).unref();
}

async function clearUp(): Promise<void> {
  for (const id of await failDeadJobs()) {
    discardStaging(id);
    await discardUpload(id);
  }
  await discardAbandonedUploads();
}

function report(error: unknown): void {
  process.stderr.write(`Clearing up after unfinished jobs failed: ${String(error)}\n`);
}
