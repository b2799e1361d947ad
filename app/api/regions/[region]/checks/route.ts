import { jsonAnswer } from '@/app/api/_http/answer';
import { jobOf } from '@/app/api/_http/job';
import { readOptionalJson } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { launchCheck } from '@/lib/jobs/checks';
import { listStations } from '@/lib/store/stations';
import { checkOrder } from './bodies';

/** Checks records anew: answers the job at once, which does it. */
export const POST = route<{ region: string }>(async (request, params) => {
  const region = await regionOf(params);
  const { stations } = await readOptionalJson(request, checkOrder);
  if (stations) {
    const known = new Set((await listStations(region.id)).map(({ code }) => code));
    const unknown = stations.find((code) => !known.has(code));
    if (unknown !== undefined) throw new Problem('not-found', `${region.name} has no station "${unknown}".`);
  }
  const { id } = await launchCheck(region, stations);
  return jsonAnswer(await jobOf({ job: id }), { status: 202, headers: { location: `/api/jobs/${id}` } });
});
