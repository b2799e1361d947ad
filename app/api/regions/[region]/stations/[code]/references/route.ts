import { taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { jsonText } from '@/lib/export/json';
import { candidatesOf } from '@/lib/jobs/pair';

/** Natural stations that may serve a station as references, best first. */
export const GET = route<StationParams>(async (request, params) => {
  readParameters(request, {}, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const { candidates, key } = await candidatesOf(region, basisOf(request, region), code);
  const rows = candidates.map(({ code, name, km, commonYears, correlation }) => ({
    ...{ station_code: code, station_name: name, distance_km: km, common_years: commonYears },
    rank_correlation: correlation,
  }));
  return taggedAnswer(request, { tag: `${key}-references-${code}`, type: 'json' }, () =>
    jsonText({ station_code: code, references: rows }),
  );
});
