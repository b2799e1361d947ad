import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { plainFormatParameter, plainTableAnswer } from '@/app/api/_http/plain-table';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { START_END_COLUMNS } from '@/lib/export/start-end-csv';
import { stationStartEndProduct } from '@/lib/export/start-end-product';
import { tableMetadata } from '@/lib/export/table-metadata';
import { startEndOf } from '@/lib/jobs/start-end';

/** The trend of one station for every start year and end year. */
export const GET = route<StationParams>(async (request, params) => {
  const { format } = readParameters(request, plainFormatParameter, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const station = await startEndOf(region, basisOf(request, region), code);
  const from = await provenanceOf(region, station.basis);
  const file = `${region.slug}-${code}-start-end.csv`;
  return plainTableAnswer(request, {
    key: `${station.key} start-end`,
    format,
    file,
    product: (as) => stationStartEndProduct(as, station, from),
    metadata: () =>
      tableMetadata(file, `${region.name}, ${code}: trend for every start year and end year`, START_END_COLUMNS, from),
  });
});
