import { DEAD_AFTER_MS } from '../store/dead-after.ts';
import { recoverStore } from '../store/recover.ts';
import { launchPendingChecks } from './checks.ts';
import { discardRejectedRowsOfJob } from './rejected-rows.ts';
import { discardAbandonedUploads, discardUpload } from './upload-folder.ts';

/** For the start of a server: clears up what processes that died have left, at once and again when the heartbeat of one
 *  that died a moment ago has had the time to grow old. */
export async function recoverJobs(): Promise<void> {
  await clearUp();
  const later = setTimeout(() => void clearUp().catch(report), DEAD_AFTER_MS + 1000);
  later.unref();
}

/** Also for the start of a server: checks what was never checked as it stands, as jobs beside the answering of requests. */
export async function startPendingChecks(): Promise<void> {
  await launchPendingChecks().catch(report);
}

async function clearUp(): Promise<void> {
  const { failedJobs } = await recoverStore();
  for (const id of failedJobs) {
    await discardUpload(id);
    discardRejectedRowsOfJob(id);
  }
  await discardAbandonedUploads();
}

function report(error: unknown): void {
  process.stderr.write(`Taking up what was left unfinished failed: ${String(error)}\n`);
}
