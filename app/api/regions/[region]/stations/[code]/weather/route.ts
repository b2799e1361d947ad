import { basisOf, readParameters } from '@/app/api/_http/parameters';
import { Problem } from '@/app/api/_http/problem';
import { provenanceOf, regionOf } from '@/app/api/_http/region';
import { route } from '@/app/api/_http/route';
import { type StationParams, stationOf } from '@/app/api/_http/station';
import { tableAnswer } from '@/app/api/_http/table';
import { weatherMetadata, weatherProduct } from '@/lib/export/pair-product';
import { WeatherError, weatherOf } from '@/lib/jobs/weather';
import { listStations } from '@/lib/store/stations';
import { weatherParameters } from './parameters';

/** Trend of a station's annual minima given the weather before each of them. */
export const GET = route<StationParams>(async (request, params) => {
  const { format, ...asked } = readParameters(request, weatherParameters, { withBasis: true });
  const region = await regionOf(params);
  const { code } = await stationOf(region, params);
  const answer = await weatherOf(region, basisOf(request, region), code, asked).catch((error: unknown) => {
    throw error instanceof WeatherError ? new Problem('bad-parameter', error.message) : error;
  });
  if (!answer?.trend) throw new Problem('not-found', `${region.name} holds neither rainfall nor evaporation.`);
  const { trend, basis, key } = answer;
  const from = await provenanceOf(region, basis, trend.warnings);
  const part = [trend.station.code, trend.from.code];
  const stations = (await listStations(region.id)).filter((station) => part.includes(station.code));
  const file = `${region.slug}-${code}-given-the-weather.csv`;
  return tableAnswer(request, {
    key: `${key} ${from.dataHash}`,
    format,
    narrowing: {},
    file,
    product: (as) => weatherProduct(as, trend, from, stations),
    metadata: () => weatherMetadata(file, trend, from),
  });
});
