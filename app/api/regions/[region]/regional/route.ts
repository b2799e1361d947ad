import { longTableAnswer } from '@/app/api/_http/long-table';
import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { regionalMetadata, regionalProduct } from '@/lib/export/regional-product';
import { rankingOf } from '@/lib/jobs/ranking';
import { chanceIsKept, regionalKey, regionalOf } from '@/lib/jobs/regional';
import { regionalParameters } from './parameters';

/** What the ranked stations say together: how many fall and rise beyond chance, and whether they share one trend. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, wait, method, area } = readParameters(request, regionalParameters, { withBasis: true });
  const region = await regionOf(params);
  const basis = basisOf(request, region);
  const { ranking, key: rankingKey } = await rankingOf(region, basis);
  const question = { method, area };
  const from = await provenanceOf(region, ranking.basis, ranking.warnings);
  const file = `${region.slug}-regional.csv`;
  return longTableAnswer(request, {
    kind: 'regional',
    regionId: region.id,
    key: regionalKey(rankingKey, question),
    // another area is only counted anew
    stations: chanceIsKept(rankingKey, method) ? 0 : ranking.counts.ranked,
    ...{ format, wait, file },
    compute: (context) => regionalOf(region, basis, question, context),
    product: (as, answers) => regionalProduct(as, answers, from),
    metadata: () => regionalMetadata(from, file),
  });
});
