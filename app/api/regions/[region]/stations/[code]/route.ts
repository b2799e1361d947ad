import { taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readJson, readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import type { StationParams } from '@/app/api/_http/station';
import { jsonText } from '@/lib/export/json';
import { launchPendingChecks } from '@/lib/jobs/checks';
import { stationDetail } from '@/lib/jobs/station';
import { editStation, removeStation } from '@/lib/store/station-edit';
import { stationPatch } from '../bodies';
import { stationAnswer } from '../station-answer';

/** One station against its region: facts, figures, verdict, minima, curve, coverage, neighbours. */
export const GET = route<StationParams>(async (request, params) => {
  readParameters(request, {}, { withBasis: true });
  const region = await regionOf(params);
  const detail = await stationDetail(region, basisOf(request, region), params.code);
  if (!detail) throw new Problem('not-found', `${region.name} has no station "${params.code}".`);
  const { key, ...rest } = detail;
  return taggedAnswer(request, { tag: key, type: 'json' }, () => jsonText(rest));
});

/** Changes what is known of a station. With If-Match, naming the entity tag of its facts, only when nobody changed them
 *  since they were read. */
export const PATCH = route<StationParams>(async (request, params) => {
  const patch = await readJson(request, stationPatch);
  const region = await regionOf(params);
  const edition = editionAsked(request);
  const station = await editStation(region.id, params.code, patch, { edition });
  // What a catchment can give depends on its area.
  await launchPendingChecks([region.id]);
  return stationAnswer(station);
});

/** Takes away a station without imported days, such as a derived one. */
export const DELETE = route<StationParams>(async (_request, params) => {
  const region = await regionOf(params);
  await removeStation(region.id, params.code);
  return new Response(null, { status: 204 });
});

/** If-Match compares strongly (RFC 9110, 13.1.1): one tag, or * for whatever is there. */
function editionAsked(request: Request): string | null {
  const header = request.headers.get('if-match')?.trim();
  if (header === undefined || header === '*') return null;
  const [, tag] = /^"([^"]*)"$/.exec(header) ?? [];
  if (tag === undefined)
    throw new Problem('bad-parameter', `If-Match must be one entity tag in quotes, got ${header}.`);
  return tag;
}
