import type { Ranking } from '../region/ranking-types.ts';
import type { Format } from './format.ts';
import { rankingGeojson } from './geojson.ts';
import { jsonText } from './json.ts';
import { type Narrowing, narrowTo } from './narrow.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { rankingCsv } from './ranking-csv.ts';

/** The ranking as a file, narrowed to some stations or whole; ranks are always those of the whole region. */
export function rankingProduct(format: Format, ranking: Ranking, from: Provenance, narrowing: Narrowing = {}): string {
  const rows = narrowTo(ranking.rows, narrowing, (row) => row);
  if (format === 'csv') return rankingCsv(rows);
  if (format === 'geojson') return jsonText({ ...rankingGeojson(rows), ...provenanceNotes(from) });
  return jsonText({ ...provenanceNotes(from), counts: ranking.counts, rows });
}
