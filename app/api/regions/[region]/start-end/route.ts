import { longTableAnswer, longTableParameters } from '@/app/api/_http/long-table';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { regionStartEndMetadata, regionStartEndProduct } from '@/lib/export/region-start-end-product';
import { rankingOf } from '@/lib/jobs/ranking';
import { regionStartEndKey, regionStartEndOf, WINDOWS } from '@/lib/jobs/region-start-end';

/** How many stations of a region fall, for every start year and end year. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait } = readParameters(request, longTableParameters, { withBasis: true });
  const region = await regionOf(params);
  const ranked = await rankingOf(region, basisOf(request, region));
  const { basis, counts } = ranked.ranking;
  const from = await provenanceOf(region, basis);
  const file = `${region.slug}-start-end.csv`;
  return longTableAnswer(request, {
    kind: WINDOWS,
    regionId: region.id,
    key: regionStartEndKey(ranked.key),
    // only whitening every window takes time; the rest is done before a job would have begun
    stations: basis.serialCorrection === 'pre-whitened' ? counts.ranked : 0,
    ...{ format, wait, file },
    compute: (context) => regionStartEndOf(ranked, context),
    product: (as, chart) => regionStartEndProduct(as, chart, from),
    metadata: () => regionStartEndMetadata(from, file),
  });
});
