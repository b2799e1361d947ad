import { attachment, taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { basisHash } from '@/lib/basis';
import { commonPeriodsCsv } from '@/lib/export/records-csv';
import { commonPeriodsOf } from '@/lib/jobs/common-periods';
import { recordParameters } from '../records/parameters';

/** How many stations would stay for every start and end year. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format } = readParameters(request, recordParameters, { withBasis: true });
  const region = await regionOf(params);
  const basis = basisOf(request, region);
  const { periods, key } = await commonPeriodsOf(region, basis);
  const headers = format === 'csv' ? attachment(`${region.slug}-common-periods.csv`) : undefined;
  return taggedAnswer(request, { tag: `${key}-${basisHash(basis)}-${format}`, type: format, headers }, () =>
    format === 'csv' ? commonPeriodsCsv(periods) : JSON.stringify(periods),
  );
});
