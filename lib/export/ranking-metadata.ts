import type { Provenance } from './provenance.ts';
import { RANKING_COLUMNS } from './ranking-csv.ts';
import { tableMetadata } from './table-metadata.ts';

/** What lies beside a ranking file: `ranking.csv` has its metadata in `ranking.csv-metadata.json`. */
export function rankingMetadata(from: Provenance, fileName = 'ranking.csv'): Record<string, unknown> {
  const title = `${from.region.name}: stations ranked by trend in annual low flows`;
  return tableMetadata(fileName, title, RANKING_COLUMNS, from);
}
