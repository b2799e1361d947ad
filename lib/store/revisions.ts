import type { Unit } from '../series/quantities.ts';
import type { LaidCounts } from './lay-parts.ts';

/** What one file does to the days of the records it comes to. Counts are of station days. */
export interface Revisions extends LaidCounts {
  /** the stations with unlike days, the most strongly changed first; at most 100 */
  stations: StationRevisions[];
}

export interface StationRevisions {
  code: string;
  unlike: number;
  /** ISO dates of the first and last unlike day */
  first: string;
  last: string;
  /** the largest change, new against standing, in the record's unit */
  largest: { date: string; standing: number; other: number; unit: Unit };
}
