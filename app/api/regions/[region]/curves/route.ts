import { basisOf, narrowingOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { tableAnswer } from '@/app/api/_http/table';
import { CURVE_COLUMNS } from '@/lib/export/curves-csv';
import { curvesProduct } from '@/lib/export/curves-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { curvesOf } from '@/lib/jobs/curves';
import { curveParameters } from './parameters';

/** The duration curves of every station that has one on this scale; JSON also names the others, with the reason. */
export const GET = route<{ region: string }>(async (request, params) => {
  const { format, kind, ...narrow } = readParameters(request, curveParameters, { withBasis: true });
  const region = await regionOf(params);
  const { key, ...curves } = await curvesOf(region, basisOf(request, region), kind);
  const from = await provenanceOf(
    region,
    curves.basis,
    curves.leftOut.map(({ station, reason }) => `${station.code} is left out: ${reason}`),
  );
  const narrowing = narrowingOf(narrow);
  const file = `${region.slug}-curves.csv`;
  return tableAnswer(request, {
    key,
    format,
    narrowing,
    file,
    product: (as) => curvesProduct(as, curves, from, narrowing),
    metadata: () => tableMetadata(file, `${region.name}: flow-duration curves`, CURVE_COLUMNS, from),
  });
});
