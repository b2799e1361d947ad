import { basisOf, narrowingOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { tableAnswer, tableParameters } from '@/app/api/_http/table';
import { MINIMA_COLUMNS } from '@/lib/export/minima-csv';
import { minimaProduct } from '@/lib/export/minima-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { minimaOf } from '@/lib/jobs/minima';
import { rankingOf } from '@/lib/jobs/ranking';

/** The annual minima of every station, usable or not. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, ...narrow } = readParameters(request, tableParameters, { withBasis: true });
  const region = await regionOf(params);
  const basis = basisOf(request, region);
  const { stations, key } = await minimaOf(region, basis);
  const { ranking } = await rankingOf(region, basis);
  const from = await provenanceOf(region, ranking.basis);
  const narrowing = narrowingOf(narrow);
  const file = `${region.slug}-minima.csv`;
  return tableAnswer(request, {
    key: `${key} ${from.dataHash}`,
    format,
    narrowing,
    file,
    product: (as) => minimaProduct(as, stations, from, narrowing),
    metadata: () => tableMetadata(file, `${region.name}: annual low-flow minima`, MINIMA_COLUMNS, from),
  });
});
