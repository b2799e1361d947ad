import { attachment, taggedAnswer } from '@/app/api/_http/answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { recordsCsv } from '@/lib/export/records-csv';
import { recordsOf } from '@/lib/jobs/records';
import { recordParameters } from './parameters';

/** What the records hold: all stations by all low-flow years. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format } = readParameters(request, recordParameters, { withBasis: true });
  const region = await regionOf(params);
  const { records, key } = await recordsOf(region, basisOf(request, region));
  const headers = format === 'csv' ? attachment(`${region.slug}-records.csv`) : undefined;
  // Plain lists throughout: looking into each of 100,000 cells for typed arrays would take as long as answering them.
  return taggedAnswer(request, { tag: `${key}-${format}`, type: format, headers }, () =>
    format === 'csv' ? recordsCsv(records) : JSON.stringify(records),
  );
});
