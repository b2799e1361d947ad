import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { breaksParameters } from '@/app/api/regions/[region]/breaks/parameters';
import { breaksMetadata, stationBreaksProduct } from '@/lib/export/breaks-product';
import { stationBreaksOf } from '@/lib/jobs/breaks';

/** Levels before and after at one station, and the change that its figures suggest. */
export const GET = route<StationParams>(async (request, params) => {
  const { format, breaks: choice } = readParameters(request, breaksParameters, { withBasis: true });
  const region = await regionOf(params);
  const station = await stationOf(region, params);
  const { breaks, basis, key } = await stationBreaksOf(region, basisOf(request, region), station, choice);
  const from = await provenanceOf(region, basis);
  const file = `${region.slug}-${station.code}-breaks.csv`;
  return plainTableAnswer(request, {
    key,
    format,
    file,
    product: (as) => stationBreaksProduct(as, breaks, from),
    metadata: () => breaksMetadata(from, file, station.code),
  });
});
