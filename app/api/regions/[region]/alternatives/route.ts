import { longTableAnswer, longTableParameters } from '@/app/api/_http/long-table';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { ALTERNATIVE_COLUMNS, alternativesProduct } from '@/lib/export/alternatives-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { alternativesKey, alternativesOf } from '@/lib/jobs/alternatives';
import { rankingOf } from '@/lib/jobs/ranking';

/** The ranking under other choices of each term. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait } = readParameters(request, longTableParameters, { withBasis: true });
  const region = await regionOf(params);
  const basis = basisOf(request, region);
  const { ranking, key: rankingKey } = await rankingOf(region, basis);
  const from = await provenanceOf(region, ranking.basis);
  const file = `${region.slug}-alternatives.csv`;
  return longTableAnswer(request, {
    kind: 'alternatives',
    regionId: region.id,
    key: alternativesKey(rankingKey),
    stations: ranking.counts.ranked,
    ...{ format, wait, file },
    compute: (context) => alternativesOf(region, basis, context),
    product: (as, alternatives) => alternativesProduct(as, alternatives, from),
    metadata: () => tableMetadata(file, `${region.name}: other choices of each term`, ALTERNATIVE_COLUMNS, from),
  });
});
