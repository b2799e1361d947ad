import { type JobView, viewJob } from '@/lib/jobs/live-jobs';
import { Problem } from './problem';

/** The job that an address names.
 *  @throws Problem 'not-found' */
export async function jobOf({ job: id }: { job: string }): Promise<JobView> {
  const view = await viewJob(id);
  if (!view) throw new Problem('not-found', `There is no job "${id}".`);
  return view;
}
