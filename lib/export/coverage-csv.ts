import { type Column, csvTable } from './csv.ts';
import { LOW_FLOW_YEAR, STATION_CODE } from './shared-columns.ts';

/** One low-flow year of a record: how many days it has, and of what kind. */
export interface CoverageRow {
  code: string;
  year: number;
  state: string;
  days: number;
  missingDays: number;
  flagged: Record<'estimated' | 'provisional' | 'ice' | 'belowDetection' | 'suspect' | 'rejected', number>;
  reason: string;
}

const flagged = (name: keyof CoverageRow['flagged'], words: string): Column<CoverageRow> => ({
  name: `${name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`)}_days`,
  datatype: 'integer',
  description: `days flagged as ${words}`,
  value: (row) => row.flagged[name],
});

const COVERAGE_COLUMNS: readonly Column<CoverageRow>[] = [
  STATION_CODE,
  LOW_FLOW_YEAR,
  { name: 'state', datatype: 'string', description: 'usable, partial or missing', value: (row) => row.state },
  { name: 'days', datatype: 'integer', description: 'days of the year or season', value: (row) => row.days },
  {
    name: 'missing_days',
    datatype: 'integer',
    description: 'days without a value, or with a flag that the basis leaves out',
    value: (row) => row.missingDays,
  },
  flagged('estimated', 'estimated'),
  flagged('provisional', 'provisional'),
  flagged('ice', 'affected by ice'),
  flagged('belowDetection', 'below detection'),
  flagged('suspect', 'suspect by the program’s checks'),
  flagged('rejected', 'rejected by a person'),
  { name: 'reason', datatype: 'string', description: 'why the year is not usable', value: (row) => row.reason },
];

/** The completeness of a record as CSV, one row a low-flow year. */
export function coverageCsv(rows: readonly CoverageRow[]): string {
  return csvTable(COVERAGE_COLUMNS, rows);
}
