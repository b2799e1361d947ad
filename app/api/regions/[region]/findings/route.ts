import { attachment, csvAnswer, jsonAnswer } from '@/app/api/_http/answer';
import { readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { stationOf } from '@/app/api/_http/station';
import { findingsCsv } from '@/lib/export/findings-csv';
import { findingRow } from '@/lib/jobs/finding-rows';
import { listFindings } from '@/lib/store/findings';
import { findingParameters } from './parameters';

/** What the checks found on the region's records, by station and day, and how people answered. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, station, kind, state } = readParameters(request, findingParameters);
  const region = await regionOf(params);
  const stationId = station === undefined ? undefined : (await stationOf(region, { code: station })).id;
  const findings = listFindings(region.id, { stationId, kind, state });
  return format === 'csv'
    ? csvAnswer(findingsCsv(findings), attachment(`${region.slug}-findings.csv`))
    : jsonAnswer({ findings: findings.map(findingRow) });
});
