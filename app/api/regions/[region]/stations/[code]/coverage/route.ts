import { attachment, taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { coverageCsv } from '@/lib/export/coverage-csv';
import { jsonText } from '@/lib/export/json';
import { coverageOf } from '@/lib/jobs/station';
import { coverageParameters } from './parameters';

/** How complete the record of one station is, low-flow year by low-flow year. */
export const GET = route<StationParams>(async (request, params) => {
  const { format } = readParameters(request, coverageParameters, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const found = await coverageOf(region, basisOf(request, region), code);
  const rows = (found?.coverage ?? []).map((year) => ({ code, ...year }));
  const headers = format === 'csv' ? attachment(`${region.slug}-${code}-coverage.csv`) : undefined;
  return taggedAnswer(request, { tag: `${found?.key}-${format}`, type: format, headers }, () =>
    format === 'csv'
      ? coverageCsv(rows)
      : jsonText({ station_code: code, yearStart: found?.yearStart, years: found?.coverage ?? [] }),
  );
});
