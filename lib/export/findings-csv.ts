import type { StoredFinding } from '../store/findings.ts';
import type { MarkRow } from '../store/marks.ts';
import { type Column, csvTable } from './csv.ts';
import { QUANTITY, STATION_CODE, STRETCH } from './shared-columns.ts';

const FINDING_COLUMNS: readonly Column<StoredFinding>[] = [
  STATION_CODE,
  QUANTITY,
  { name: 'kind', datatype: 'string', description: 'which check found it', value: (row) => row.kind },
  ...STRETCH,
  { name: 'days', datatype: 'integer', description: 'days of the stretch that are at fault', value: (row) => row.days },
  {
    name: 'state',
    datatype: 'string',
    description: 'open, or how a person answered: rejected, accepted, noted',
    value: (row) => row.state,
  },
  {
    name: 'detail',
    datatype: 'string',
    description: 'the figures behind it as JSON, flows in m³/s',
    value: (row) => JSON.stringify(row.detail),
  },
];

/** Findings as CSV. */
export const findingsCsv = (findings: readonly StoredFinding[]): string => csvTable(FINDING_COLUMNS, findings);

const MARK_COLUMNS: readonly Column<MarkRow>[] = [
  STATION_CODE,
  QUANTITY,
  { name: 'kind', datatype: 'string', description: 'reject, accept or note', value: (row) => row.kind },
  ...STRETCH,
  { name: 'reason', datatype: 'string', description: 'why', value: (row) => row.reason },
  { name: 'by', datatype: 'string', description: 'who', value: (row) => row.by },
  { name: 'at', datatype: 'string', description: 'when, UTC', value: (row) => row.createdAt.toISOString() },
];

/** Marks as CSV, in the order in which they are laid. */
export const marksCsv = (marks: readonly MarkRow[]): string => csvTable(MARK_COLUMNS, marks);
