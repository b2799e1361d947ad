import * as z from 'zod';
import { keptResult } from '@/lib/jobs/cached';
import { CancelledError } from '@/lib/jobs/live-jobs';
import { type LongWork, startOrJoin } from '@/lib/jobs/long-work';
import { jsonAnswer } from './answer';
import { jobOf } from './job';
import { Problem } from './problem';

/** Up to so many ranked stations are answered at once: that takes about as long as a page. */
export const MOST_AT_ONCE = 200;

/** Parameter of every route that answers by `longAnswer`. */
export const waitParameter = {
  wait: z
    .enum(['true', 'false'])
    .default('false')
    .describe('true: answer when it is done, however long that takes, in place of the job that does it'),
};

interface LongOrder<Value> extends LongWork<Value> {
  /** ranked stations that the work goes over */
  stations: number;
  /** the asker waits for the answer itself: a file is wanted, or `wait=true` */
  wait: boolean;
}

/** Answers work that may take long. With 200 and the answer when it is kept, when it is short, or when the asker waits; else
 *  with 202 and the job that does it, new or joined: `{"job", "state", "progress"}`, its address in Location. When the job
 *  is done the same request is answered with 200. A job that a restart ended fails in half a minute, and the same request
 *  starts another.
 *  @param answer  makes the answer of the value
 *  @throws Problem 'conflict' when someone cancelled what the asker waits for */
export async function longAnswer<Value>(
  { stations, wait, ...work }: LongOrder<Value>,
  answer: (value: Value) => Response | Promise<Response>,
): Promise<Response> {
  const kept = keptResult<Value>(work.kind, work.key);
  if (kept) return answer(kept.value);
  if (stations <= MOST_AT_ONCE) return answer(await work.compute({}));
  const { id, result } = await startOrJoin(work);
  if (wait) return answer(await result.catch(cancelledByOther));
  // The job's row tells how it ended; nobody here waits for it.
  result.catch(() => undefined);
  const { state, progress } = await jobOf({ job: id });
  return jsonAnswer({ job: id, state, progress }, { status: 202, headers: { location: `/api/jobs/${id}` } });
}

function cancelledByOther(error: unknown): never {
  if (!(error instanceof CancelledError)) throw error;
  throw new Problem('conflict', 'This was cancelled by someone who had asked for it too. Ask again.');
}
