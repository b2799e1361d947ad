import type { AnnualIndexName } from '../basis.ts';
import { INDEX_FACTS } from '../region/index-facts.ts';
import type { PairComparison, PairYear } from '../region/pair-types.ts';
import { type Column, csvTable } from './csv.ts';
import { LOW_FLOW_YEAR, STATION_CODE } from './shared-columns.ts';

/** One common year of a station and its references. */
export interface PairRow extends PairYear {
  code: string;
  /** codes of the references */
  references: readonly string[];
  index: AnnualIndexName;
}

export const PAIR_COLUMNS: readonly Column<PairRow>[] = [
  STATION_CODE,
  {
    name: 'reference_codes',
    datatype: 'string',
    description: 'codes of the reference stations, parted by semicolons',
    value: ({ references }) => references.join(';'),
  },
  LOW_FLOW_YEAR,
  { name: 'index', datatype: 'string', description: 'annual figure that is compared', value: ({ index }) => index },
  {
    name: 'index_unit',
    datatype: 'string',
    description: 'unit of index_value; empty for a number without unit',
    value: ({ index }) => INDEX_FACTS[index].unit,
  },
  {
    name: 'index_value',
    datatype: 'number',
    description: 'annual figure of the station, in index_unit',
    value: ({ station }) => station,
  },
  {
    name: 'reference',
    datatype: 'number',
    description: 'mean over the references of their annual figures, each over its own mean of the common years',
    value: ({ reference }) => reference,
  },
  {
    name: 'ratio',
    datatype: 'number',
    description: 'figure of the station over its mean of the common years, over the reference; empty where that is 0',
    value: ({ ratio }) => ratio,
  },
  {
    name: 'station_sum',
    datatype: 'number',
    description: 'sum from the first common year on of the station’s figures over their mean',
    value: ({ stationSum }) => stationSum,
  },
  {
    name: 'reference_sum',
    datatype: 'number',
    description: 'sum from the first common year on of the reference',
    value: ({ referenceSum }) => referenceSum,
  },
];

/** One row a common year, with what they share. */
export function pairRows({ station, references, years }: PairComparison, index: AnnualIndexName): PairRow[] {
  const codes = references.map(({ code }) => code);
  return years.map((year) => ({ ...year, code: station.code, references: codes, index }));
}

/** A comparison as CSV, one row a common year. */
export function pairCsv(comparison: PairComparison, index: AnnualIndexName): string {
  return csvTable(PAIR_COLUMNS, pairRows(comparison, index));
}
