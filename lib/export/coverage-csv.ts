import { type Column, csvTable } from './csv.ts';

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

export const COVERAGE_COLUMNS: readonly Column<CoverageRow>[] = [
  { name: 'station_code', datatype: 'string', description: 'code of the gauging station', value: (row) => row.code },
  {
    name: 'year',
    datatype: 'integer',
    description: 'low-flow year, named by the calendar year in which it begins',
    value: (row) => row.year,
  },
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
