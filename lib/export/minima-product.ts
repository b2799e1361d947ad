import type { StationMinima } from '../region/ranking-types.ts';
import type { Format } from './format.ts';
import { jsonCell, stationFeature } from './geojson.ts';
import { MINIMA_COLUMNS, minimaCsv, minimaRows } from './minima-csv.ts';
import { type Narrowing, narrowTo } from './narrow.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';

/** Annual minima as a file: every year of every record, also those that are not usable, with the reason. */
export function minimaProduct(
  format: Format,
  stations: readonly StationMinima[],
  from: Provenance,
  narrowing: Narrowing = {},
): string {
  const shown = narrowTo(stations, narrowing, ({ station }) => station);
  if (format === 'csv') return minimaCsv(shown);
  if (format === 'json') {
    const list = shown.map((one) => ({ station_code: one.station.code, years: yearsOf(one) }));
    return JSON.stringify({ ...provenanceNotes(from), stations: list });
  }
  const features = shown.map((one) =>
    stationFeature(one.station, {
      station_code: one.station.code,
      station_name: one.station.name,
      years: yearsOf(one),
    }),
  );
  return JSON.stringify({ type: 'FeatureCollection', features, ...provenanceNotes(from) });
}

/** A station's years under the names that the CSV columns have. */
function yearsOf(station: StationMinima): Record<string, unknown>[] {
  const columns = MINIMA_COLUMNS.filter(({ name }) => name !== 'station_code');
  return Array.from(minimaRows([station]), (row) =>
    Object.fromEntries(columns.map(({ name, value }) => [name, jsonCell(value(row))])),
  );
}
