import { longAnswer } from '@/app/api/_http/long-answer';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { ALTERNATIVE_COLUMNS, alternativesProduct } from '@/lib/export/alternatives-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { alternativesKey, alternativesOf } from '@/lib/jobs/alternatives';
import { rankingOf } from '@/lib/jobs/ranking';
import { alternativesParameters } from './parameters';

/** The ranking under other choices of each term. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait } = readParameters(request, alternativesParameters, { withBasis: true });
  const region = await regionOf(params);
  const basis = basisOf(request, region);
  const { ranking, key: rankingKey } = await rankingOf(region, basis);
  const key = alternativesKey(rankingKey);
  const from = await provenanceOf(region, ranking.basis);
  const file = `${region.slug}-alternatives.csv`;
  return longAnswer(
    {
      kind: 'alternatives',
      regionId: region.id,
      key,
      stations: ranking.counts.ranked,
      wait: wait === 'true' || format !== 'json',
      compute: (context) => alternativesOf(region, basis, context),
    },
    (alternatives) =>
      plainTableAnswer(request, {
        key,
        format,
        file,
        product: (as) => alternativesProduct(as, alternatives, from),
        metadata: () => tableMetadata(file, `${region.name}: other choices of each term`, ALTERNATIVE_COLUMNS, from),
      }),
  );
});
