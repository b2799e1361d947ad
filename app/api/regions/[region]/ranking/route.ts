import { basisOf, narrowingOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { tableAnswer, tableParameters } from '@/app/api/_http/table';
import { rankingMetadata } from '@/lib/export/ranking-metadata';
import { rankingProduct } from '@/lib/export/ranking-product';
import { rankingOf } from '@/lib/jobs/ranking';

/** The stations in order of trend in annual minima. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, ...narrow } = readParameters(request, tableParameters, { withBasis: true });
  const region = await regionOf(params);
  const { ranking, key } = await rankingOf(region, basisOf(request, region));
  const from = await provenanceOf(region, ranking.basis, ranking.warnings);
  const narrowing = narrowingOf(narrow);
  return tableAnswer(request, {
    key,
    format,
    narrowing,
    file: `${region.slug}-ranking.csv`,
    product: (as) => rankingProduct(as, ranking, from, narrowing),
    metadata: () => rankingMetadata(from, `${region.slug}-ranking.csv`),
  });
});
