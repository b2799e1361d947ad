import { type Certainty, chanceAmong } from '../region/certainty-types.ts';
import { type Column, csvTable } from './csv.ts';
import { jsonText } from './json.ts';
import type { Provenance } from './provenance.ts';
import { STATION_CODE } from './shared-columns.ts';
import { tableMetadata } from './table-metadata.ts';

/** How sure one station is; null for a station without a span, or one whose trend cannot be told. */
interface CertaintyRow {
  code: string;
  rankLow: number | null;
  rankHigh: number | null;
  k: number;
  among: number | null;
  perDecade: number | null;
  percentPerDecade: number | null;
}

const COLUMNS: readonly Column<CertaintyRow>[] = [
  STATION_CODE,
  {
    name: 'rank_low',
    datatype: 'integer',
    description: 'lower end of the 90 % interval of the place; empty for a station without one',
    value: (row) => row.rankLow,
  },
  {
    name: 'rank_high',
    datatype: 'integer',
    description: 'upper end of the 90 % interval of the place; the guarantee is an average over stations',
    value: (row) => row.rankHigh,
  },
  { name: 'steepest_k', datatype: 'integer', description: 'k of the next column', value: (row) => row.k },
  {
    name: 'probability_among_steepest',
    datatype: 'number',
    description: 'probability, 0 to 1, that the station is among the k steepest declines',
    value: (row) => row.among,
  },
  {
    name: 'detectable_per_decade',
    datatype: 'number',
    description:
      'trend, either way, that this record would have shown in four cases of five, in the unit of what is compared; days for a station under Drying',
    value: (row) => row.perDecade,
  },
  {
    name: 'detectable_percent_per_decade',
    datatype: 'number',
    unit: '% per decade',
    description: 'the same in percent of the mean; empty where a percentage means nothing',
    value: (row) => row.percentPerDecade,
  },
];

/** How sure each ranked and drying station is: as a table at one k, or whole as JSON. */
export function certaintyProduct(format: 'csv' | 'json', certainty: Certainty, k: number): string {
  if (format === 'json') return jsonText(certainty);
  const spans = new Map(certainty.spans.map((span) => [span.code, span]));
  const rows = certainty.detectable.map(({ code, perDecade, percentPerDecade }): CertaintyRow => {
    const span = spans.get(code);
    const among = span ? chanceAmong(certainty, span, k) : null;
    return {
      ...{ code, k, among, perDecade, percentPerDecade },
      rankLow: span?.rankLow ?? null,
      rankHigh: span?.rankHigh ?? null,
    };
  });
  return csvTable(COLUMNS, rows);
}

/** What lies beside such a table. */
export function certaintyMetadata(from: Provenance, fileName: string): Record<string, unknown> {
  return tableMetadata(fileName, `${from.region.name}: how sure the ranking is`, COLUMNS, from);
}
