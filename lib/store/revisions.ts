import type { Unit } from '../series/quantities.ts';

/** What one file does to the days of the records it comes to. Counts are of station days. */
export interface Revisions {
  /** days on which there was no value before: beyond the record's ends, and within them */
  extended: number;
  filled: number;
  /** days whose value is equal to the one that stands */
  equal: number;
  /** days whose value is unlike the one that stands, and how many of these stand as provisional */
  unlike: number;
  unlikeProvisional: number;
  /** of the unlike days, those that take the new value under the import's rule */
  revised: number;
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
