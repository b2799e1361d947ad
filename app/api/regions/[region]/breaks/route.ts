import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { breaksMetadata, regionBreaksProduct } from '@/lib/export/breaks-product';
import { regionBreaksOf } from '@/lib/jobs/breaks';
import { breaksParameters } from './parameters';

/** Levels before and after at every ranked station with a break. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, breaks: choice } = readParameters(request, breaksParameters, { withBasis: true });
  const region = await regionOf(params);
  const { breaks, basis, key } = await regionBreaksOf(region, basisOf(request, region), choice);
  const from = await provenanceOf(region, basis);
  const file = `${region.slug}-breaks.csv`;
  return plainTableAnswer(request, {
    key,
    format,
    file,
    product: (as) => regionBreaksProduct(as, breaks, from),
    metadata: () => breaksMetadata(from, file),
  });
});
