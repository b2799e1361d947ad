import type { SureRanking, SureRow } from '../region/sure-rows.ts';
import type { Format } from './format.ts';
import { jsonCell, rankingGeojson } from './geojson.ts';
import { type Narrowing, narrowTo } from './narrow.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { RANKING_COLUMNS, rankingCsv } from './ranking-csv.ts';

/** The ranking as a file, narrowed to some stations or whole; ranks are always those of the whole region.
 *  @param ranking  with how sure it is laid over it (withCertainty), or without */
export function rankingProduct(
  format: Format,
  ranking: SureRanking,
  from: Provenance,
  narrowing: Narrowing = {},
): string {
  const rows = narrowTo(ranking.rows, narrowing, (row) => row);
  if (format === 'csv') return rankingCsv(rows);
  if (format === 'geojson') return JSON.stringify({ ...rankingGeojson(rows), ...provenanceNotes(from) });
  return JSON.stringify({ ...provenanceNotes(from), counts: ranking.counts, stations: rows.map(stationOf) });
}

/** A row under the names that the CSV columns have, with what a table has no room for. */
function stationOf(row: SureRow): Record<string, unknown> {
  const station: Record<string, unknown> = {};
  for (const { name, value } of RANKING_COLUMNS) station[name] = jsonCell(value(row));
  return Object.assign(station, {
    slope_l_s_km2_per_decade: row.specificPerDecade,
    drying: row.drying,
    zero_days_per_decade: row.zeroDaysPerDecade,
    zero_days_ci_low: row.zeroDaysLow,
    zero_days_ci_high: row.zeroDaysHigh,
    lag1_correlation: row.r1,
    variance_factor: row.serialFactor,
    years: row.years,
    minima_m3s: row.minima,
    index_values: row.values,
  });
}
