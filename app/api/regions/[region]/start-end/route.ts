import { longAnswer } from '@/app/api/_http/long-answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { REGION_WINDOW_COLUMNS, regionStartEndProduct } from '@/lib/export/region-start-end-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { rankingOf } from '@/lib/jobs/ranking';
import { regionStartEndKey, regionStartEndOf, WINDOWS } from '@/lib/jobs/region-start-end';
import { startEndParameters } from './parameters';

/** How many stations of a region fall, for every start year and end year. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait } = readParameters(request, startEndParameters, { withBasis: true });
  const region = await regionOf(params);
  const ranked = await rankingOf(region, basisOf(request, region));
  const { basis, counts } = ranked.ranking;
  const key = regionStartEndKey(ranked.key);
  const from = await provenanceOf(region, basis);
  const file = `${region.slug}-start-end.csv`;
  return longAnswer(
    {
      kind: WINDOWS,
      regionId: region.id,
      key,
      // only whitening every window takes time; the rest is done before a job would have begun
      stations: basis.serialCorrection === 'pre-whitened' ? counts.ranked : 0,
      wait: wait === 'true' || format !== 'json',
      compute: (context) => regionStartEndOf(ranked, context),
    },
    (chart) =>
      plainTableAnswer(request, {
        key,
        format,
        file,
        product: (as) => regionStartEndProduct(as, chart, from),
        metadata: () =>
          tableMetadata(file, `${region.name}: trends for every start year and end year`, REGION_WINDOW_COLUMNS, from),
      }),
  );
});
