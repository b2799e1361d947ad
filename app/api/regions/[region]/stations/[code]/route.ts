import { taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import type { StationParams } from '@/app/api/_http/station';
import { jsonText } from '@/lib/export/json';
import { stationDetail } from '@/lib/jobs/station';

/** One station against its region: facts, figures, verdict, minima, curve, coverage, neighbours. */
export const GET = route<StationParams>(async (request, params) => {
  readParameters(request, {}, { withBasis: true });
  const region = await regionOf(params);
  const detail = await stationDetail(region, basisOf(request, region), params.code);
  if (!detail) throw new Problem('not-found', `${region.name} has no station "${params.code}".`);
  const { key, ...rest } = detail;
  return taggedAnswer(request, { tag: key, type: 'json' }, () => jsonText(rest));
});
