import { longAnswer } from '@/app/api/_http/long-answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
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
  const key = certaintyKey(ranked.key);
  const file = `${region.slug}-certainty.csv`;
  return longAnswer(
    {
      kind: 'certainty',
      regionId: region.id,
      key,
      stations: counts.ranked + counts.drying,
      wait: wait === 'true' || format !== 'json',
      compute: (context) => certaintyOf(ranked, context),
    },
    (certainty) =>
      plainTableAnswer(request, {
        key,
        format,
        file,
        product: (as) => certaintyProduct(as, certainty, k),
        metadata: () => certaintyMetadata(from, file),
      }),
  );
});
