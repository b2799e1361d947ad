import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { formatParameter, tableAnswer } from '@/app/api/_http/table';
import { MINIMA_COLUMNS } from '@/lib/export/minima-csv';
import { minimaProduct } from '@/lib/export/minima-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { minimaOf } from '@/lib/jobs/minima';
import { rankingOf } from '@/lib/jobs/ranking';

/** The annual minima of one station, usable or not. */
export const GET = route<StationParams>(async (request, params) => {
  const { format } = readParameters(request, formatParameter, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const basis = basisOf(request, region);
  const { stations, key } = await minimaOf(region, basis);
  const { ranking } = await rankingOf(region, basis);
  const from = await provenanceOf(region, ranking.basis);
  const narrowing = { codes: [code] };
  const file = `${region.slug}-${code}-minima.csv`;
  return tableAnswer(request, {
    key: `${key} ${from.dataHash}`,
    format,
    narrowing,
    file,
    product: (as) => minimaProduct(as, stations, from, narrowing),
    metadata: () => tableMetadata(file, `${region.name}, ${code}: annual low-flow minima`, MINIMA_COLUMNS, from),
  });
});
