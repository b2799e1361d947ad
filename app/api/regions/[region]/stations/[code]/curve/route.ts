import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { tableAnswer } from '@/app/api/_http/table';
import { CURVE_COLUMNS } from '@/lib/export/curves-csv';
import { curvesProduct } from '@/lib/export/curves-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { curvesOf } from '@/lib/jobs/curves';
import { stationCurveParameters } from './parameters';

/** The duration curve of one station; in JSON beside the region's band, and with the reason where there is none. */
export const GET = route<StationParams>(async (request, params) => {
  const { format, kind } = readParameters(request, stationCurveParameters, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const { key, ...curves } = await curvesOf(region, basisOf(request, region), kind);
  const from = await provenanceOf(region, curves.basis);
  const narrowing = { codes: [code] };
  const file = `${region.slug}-${code}-curve.csv`;
  return tableAnswer(request, {
    key,
    format,
    narrowing,
    file,
    product: (as) => curvesProduct(as, curves, from, narrowing),
    metadata: () => tableMetadata(file, `${region.name}, ${code}: flow-duration curve`, CURVE_COLUMNS, from),
  });
});
