import { eventStream } from '@/app/api/_http/event-stream';
import { jobOf } from '@/app/api/_http/job';
import { route } from '@/app/api/_http/route';
import { followJob } from '@/lib/jobs/live-jobs';

/** A job's states as they come, each whole; the stream ends with the job. A client that comes back with Last-Event-ID
 *  gets the present state with the next number. */
export const GET = route<{ job: string }>(async (request, params) => {
  await jobOf(params);
  const lastSeen = Number(request.headers.get('last-event-id') ?? 0);
  return eventStream(request, async function* (signal) {
    let id = Number.isInteger(lastSeen) && lastSeen > 0 ? lastSeen : 0;
    for await (const view of followJob(params.job, signal)) {
      id += 1;
      yield { id, event: 'job', data: view };
    }
  });
});
