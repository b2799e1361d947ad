import { jsonAnswer } from '@/app/api/_http/answer';
import { jobOf } from '@/app/api/_http/job';
import { Problem } from '@/app/api/_http/problem';
import { route } from '@/app/api/_http/route';
import { cancelJob } from '@/lib/jobs/live-jobs';

type Params = { job: string };

/** Where a job stands; for clients that cannot follow its events. */
export const GET = route<Params>(async (_request, params) => jsonAnswer(await jobOf(params)));

/** Cancels a job; it leaves nothing behind. Answers when it has cleaned up. */
export const DELETE = route<Params>(async (_request, params) => {
  const { state } = await jobOf(params);
  const running = state === 'waiting' || state === 'running';
  if (!(await cancelJob(params.job)) && running) {
    throw new Problem('conflict', 'This job runs in another program: stop it there.');
  }
  return jsonAnswer(await jobOf(params));
});
