import { RANKING_COLUMNS } from './ranking-csv.ts';
import { type Provenance, tableMetadata } from './table-metadata.ts';

/** What lies beside a ranking file: `ranking.csv` has its metadata in `ranking.csv-metadata.json`. */
export function rankingMetadata(from: Provenance, fileName = 'ranking.csv'): Record<string, unknown> {
  return tableMetadata(fileName, `${from.region}: stations ranked by trend in annual low flows`, RANKING_COLUMNS, from);
}

/** The name that the metadata of a CSV file has, so that programs find it beside the file. */
export function metadataName(fileName: string): string {
  return `${fileName}-metadata.json`;
}
