import { longTableAnswer } from '@/app/api/_http/long-table';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { certaintyMetadata, certaintyProduct } from '@/lib/export/certainty-product';
import { certaintyKey, certaintyOf } from '@/lib/jobs/certainty';
import { rankingOf } from '@/lib/jobs/ranking';
import { certaintyParameters } from './parameters';

/** How sure the places of the ranking are, and which trends its records could have shown. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait, k } = readParameters(request, certaintyParameters, { withBasis: true });
  const region = await regionOf(params);
  const ranked = await rankingOf(region, basisOf(request, region));
  const { basis, warnings, counts } = ranked.ranking;
  const from = await provenanceOf(region, basis, warnings);
  const file = `${region.slug}-certainty.csv`;
  return longTableAnswer(request, {
    kind: 'certainty',
    regionId: region.id,
    key: certaintyKey(ranked.key),
    stations: counts.ranked + counts.drying,
    ...{ format, wait, file },
    compute: (context) => certaintyOf(ranked, context),
    product: (as, certainty) => certaintyProduct(as, certainty, k),
    metadata: () => certaintyMetadata(from, file),
  });
});
