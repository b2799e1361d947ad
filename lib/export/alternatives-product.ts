import type { Alternative } from '../region/window-types.ts';
import { type Column, csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';

export const ALTERNATIVE_COLUMNS: readonly Column<Alternative>[] = [
  {
    name: 'term',
    datatype: 'string',
    description: 'the one term of the basis that is chosen otherwise',
    value: (row) => row.term,
  },
  { name: 'choice', datatype: 'string', description: 'the choice in words', value: (row) => row.label },
  {
    name: 'change',
    datatype: 'string',
    description: 'basis keys that differ, as in an address; empty for what the basis says',
    value: (row) => new URLSearchParams(row.change).toString(),
  },
  { name: 'current', datatype: 'boolean', description: 'whether the basis says so', value: (row) => row.current },
  { name: 'ranked', datatype: 'integer', description: 'stations ranked', value: (row) => count(row, row.ranked) },
  { name: 'falling', datatype: 'integer', description: 'of these falling', value: (row) => count(row, row.falling) },
  { name: 'rising', datatype: 'integer', description: 'of these rising', value: (row) => count(row, row.rising) },
  {
    name: 'tau',
    datatype: 'number',
    description: 'Kendall’s tau-b between the places here and under the basis, over the stations ranked in both',
    value: (row) => row.tau,
  },
  {
    name: 'moved_far',
    datatype: 'integer',
    description: 'stations whose place differs by more than a tenth of those ranked in both',
    value: (row) => count(row, row.movedFar),
  },
  {
    name: 'furthest_station',
    datatype: 'string',
    description: 'code of the station that moves furthest',
    value: (row) => row.furthest?.code ?? null,
  },
  {
    name: 'furthest_moved',
    datatype: 'integer',
    description: 'places it moves up (towards the steepest decline)',
    value: (row) => row.furthest?.moved ?? null,
  },
  {
    name: 'problem',
    datatype: 'string',
    description: 'why there is no ranking under this choice',
    value: (row) => row.problem,
  },
];

/** Where there is no ranking there is no count. */
const count = (row: Alternative, value: number): number | null => (row.problem === null ? value : null);

/** The ranking under other choices of each term. */
export function alternativesProduct(
  format: 'csv' | 'json',
  alternatives: readonly Alternative[],
  from: Provenance,
): string {
  if (format === 'csv') return csvTable(ALTERNATIVE_COLUMNS, alternatives);
  return JSON.stringify({ ...provenanceNotes(from), alternatives });
}
