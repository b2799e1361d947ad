import type { SureRow } from '../region/sure-rows.ts';
import type { Column } from './csv.ts';

/** How sure a row of the ranking is; empty while not computed. */
export const SURENESS_COLUMNS: readonly Column<SureRow>[] = [
  {
    name: 'steadiness',
    datatype: 'number',
    description:
      'share of the windows of at least 15 usable years whose trend has the sign of the whole period; windows overlap',
    value: (row) => row.steadiness,
  },
  {
    name: 'detectable_percent_per_decade',
    datatype: 'number',
    unit: '% per decade',
    description:
      'trend, either way, that this record would have shown in four cases of five; no trend found below it says little',
    value: (row) => row.detectablePercent ?? null,
  },
  {
    name: 'steepest_k',
    datatype: 'integer',
    description: 'k of the next column',
    value: (row) => row.steepestK ?? null,
  },
  {
    name: 'probability_among_steepest',
    datatype: 'number',
    description: 'probability, 0 to 1, that the station is among the k steepest declines',
    value: (row) => row.amongSteepest ?? null,
  },
];
