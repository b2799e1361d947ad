import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { launchPendingChecks } from '@/lib/jobs/checks';
import { removeMark } from '@/lib/store/marks';

/** Takes a mark away: the days count again as they did before it. */
export const DELETE = route<StationParams & { mark: string }>(async (_request, params) => {
  const region = await regionOf(params);
  const { id: stationId, code } = await stationOf(region, params);
  const id = Number(params.mark);
  const removed = Number.isInteger(id) && (await removeMark(id, stationId));
  if (!removed) throw new Problem('not-found', `Station ${code} has no mark ${params.mark}.`);
  await launchPendingChecks([region.id]);
  return new Response(null, { status: 204 });
});
