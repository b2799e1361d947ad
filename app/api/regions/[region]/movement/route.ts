import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { MOVEMENT_COLUMNS, movementProduct } from '@/lib/export/movement-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { movementOf } from '@/lib/jobs/movement';
import { againstBasis, movementParameters } from './parameters';

/** Who moved in the ranking, and how far, against other terms: the region's own unless said. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, against: other } = readParameters(request, movementParameters, { withBasis: true });
  const region = await regionOf(params);
  const { movement, basis, against, key } = await movementOf(
    region,
    basisOf(request, region),
    againstBasis(other, region),
  );
  const from = await provenanceOf(region, basis);
  const file = `${region.slug}-movement.csv`;
  return plainTableAnswer(request, {
    key,
    format,
    file,
    product: (as) => movementProduct(as, movement, against, from),
    metadata: () => tableMetadata(file, `${region.name}: movement in the ranking`, MOVEMENT_COLUMNS, from),
  });
});
