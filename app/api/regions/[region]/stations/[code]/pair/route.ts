import { basisOf, narrowingOf, readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { tableAnswer } from '@/app/api/_http/table';
import { pairMetadata, pairProduct } from '@/lib/export/pair-product';
import { PairError, pairOf } from '@/lib/jobs/pair';
import { listStations } from '@/lib/store/stations';
import { pairParameters } from './parameters';

/** A station against reference stations: ratios, sums of the double-mass curve, trends. */
export const GET = route<StationParams>(async (request, params) => {
  const { format, with: named } = readParameters(request, pairParameters, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const references = named === undefined ? null : (narrowingOf({ stations: named }).codes ?? []).filter(Boolean);
  const answer = await pairOf(region, basisOf(request, region), code, references).catch((error: unknown) => {
    throw error instanceof PairError ? new Problem('bad-parameter', error.message) : error;
  });
  if (!answer) throw new Problem('not-found', `${region.name} has no station "${code}".`);
  const { comparison, basis, key } = answer;
  const from = await provenanceOf(region, basis, comparison.warnings);
  const part = new Set([comparison.station, ...comparison.references].map((each) => each.code));
  const stations = (await listStations(region.id)).filter((station) => part.has(station.code));
  const file = `${region.slug}-${code}-against-a-reference.csv`;
  return tableAnswer(request, {
    key: `${key} ${from.dataHash}`,
    format,
    narrowing: {},
    file,
    product: (as) => pairProduct(as, comparison, from, stations),
    metadata: () => pairMetadata(file, comparison, from),
  });
});
