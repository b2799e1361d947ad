import { basisSentence, type ResolvedBasis } from '../basis.ts';
import type { Movement, RankingMovement } from '../region/window-types.ts';
import { type Column, csvTable } from './csv.ts';
import { type Provenance, provenanceNotes } from './provenance.ts';
import { STATION_CODE } from './shared-columns.ts';

export const MOVEMENT_COLUMNS: readonly Column<Movement>[] = [
  STATION_CODE,
  { name: 'station_name', datatype: 'string', description: 'name of the gauging station', value: (row) => row.name },
  {
    name: 'rank_before',
    datatype: 'integer',
    description: 'place on the other terms; empty when not ranked there',
    value: (row) => row.before,
  },
  {
    name: 'rank_after',
    datatype: 'integer',
    description: 'place on the terms at hand; empty when not ranked there',
    value: (row) => row.after,
  },
  {
    name: 'places_moved',
    datatype: 'integer',
    description: 'places moved up (towards the steepest decline) among the stations ranked on both terms',
    value: (row) => row.moved,
  },
  {
    name: 'trend_before',
    datatype: 'string',
    description: 'falling, rising or none on the other terms',
    value: (row) => row.trendBefore,
  },
  {
    name: 'trend_after',
    datatype: 'string',
    description: 'falling, rising or none on the terms at hand',
    value: (row) => row.trendAfter,
  },
];

/** Who moved between two rankings, and how far.
 *  @param against  the terms of the other ranking; those at hand are in `from` */
export function movementProduct(
  format: 'csv' | 'json',
  movement: RankingMovement,
  against: ResolvedBasis,
  from: Provenance,
): string {
  if (format === 'csv') return csvTable(MOVEMENT_COLUMNS, movement.movements);
  return JSON.stringify({ ...provenanceNotes(from), against, againstSentence: basisSentence(against), ...movement });
}
