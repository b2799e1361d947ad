import type { StationFacts } from '../region/ranking-types.ts';
import type { Format } from './format.ts';
import { stationsGeojson } from './geojson.ts';
import { jsonText } from './json.ts';
import { type Narrowing, narrowTo } from './narrow.ts';
import { STATION_COLUMNS, stationsCsv } from './stations-csv.ts';

/** The stations of a region as a file, whole or narrowed. */
export function stationsProduct(format: Format, all: readonly StationFacts[], narrowing: Narrowing = {}): string {
  const stations = narrowTo(all, narrowing, (station) => station);
  if (format === 'csv') return stationsCsv(stations);
  if (format === 'geojson') return jsonText(stationsGeojson(stations));
  return jsonText(
    stations.map((station) => Object.fromEntries(STATION_COLUMNS.map(({ name, value }) => [name, value(station)]))),
  );
}
