import type { ResolvedBasis } from '../basis.ts';
import type { FindingKind } from '../checks/finding.ts';
import type { Influence } from '../region/ranking-types.ts';
import type { Quantity } from '../series/quantities.ts';
import type { StationChange } from '../series/station-history.ts';
import type { MarkKind } from '../store/marks-on-flags.ts';

/** Flags that are counted by year, in the order in which they are told. */
export const COUNTED_FLAGS = ['provisional', 'estimated', 'ice', 'belowDetection', 'suspect', 'rejected'] as const;
export type CountedFlag = (typeof COUNTED_FLAGS)[number];

/** All stations of a region by all low-flow years (or their season), in columns: 2,000 stations of 60 years are 120,000
 *  cells. */
export interface RegionRecords {
  basis: ResolvedBasis;
  /** of the region's records; null when none has a value */
  firstYear: number | null;
  lastYear: number | null;
  /** days of each year (or of its season) from firstYear to lastYear */
  yearDays: number[];
  /** why years are not usable, each said once */
  reasons: string[];
  /** by code; a station without a record has no years */
  stations: StationYears[];
}

export interface StationYears {
  code: string;
  name: string;
  river: string;
  areaKm2: number | null;
  influence: Influence;
  /** what was done to the river or the gauge, and when */
  changes: StationChange[];
  /** quantities of which the station has a record */
  quantities: Quantity[];
  /** ISO dates of the first and the last day with a flow; null without one */
  first: string | null;
  last: string | null;
  /** days with a flow */
  valueCount: number;
  /** low-flow year of each column's first entry; null without a record */
  firstYear: number | null;
  /** days with a value, whatever its flag */
  values: number[];
  /** days that count as missing under the basis: without a value, rejected, or with a flag that it leaves out */
  missing: number[];
  /** days with a value that carry each flag; a flag that no day carries is left out */
  flagged: Partial<Record<CountedFlag, number[]>>;
  /** 1 where the year counts under the basis, else 0 */
  usable: number[];
  /** index into `reasons` of why it does not; -1 where it does */
  reason: number[];
}

/** How many stations would stay for every start and end year, at the basis's completeness. */
export interface CommonPeriods {
  basis: ResolvedBasis;
  /** stations of the region, with or without a record */
  stations: number;
  /** years between the first and the last usable year of any station; null when there is none */
  firstYear: number | null;
  lastYear: number | null;
  /** stations that would be ranked over [firstYear + from, firstYear + to], at from × years + to; 0 where the period is
   *  shorter than the basis's minYears */
  ranked: number[];
  /** the same, whatever their share of zero minima */
  complete: number[];
  /** the one that the basis's "common" comes to; null when there is none */
  common: [number, number] | null;
}

/** A finding with the marks that answer it. */
export interface FindingRow {
  /** kind and first day: the same after every check that finds it, and the only such one on its record */
  id: string;
  code: string;
  quantity: Quantity;
  kind: FindingKind;
  /** ISO dates, both included */
  first: string;
  last: string;
  days: number;
  detail: Record<string, number | string | null>;
  /** by the marks over its days, whether one or several; open while a day of it has none */
  state: 'open' | 'rejected' | 'accepted' | 'noted';
}

/** A person's mark, as listed. */
export interface MarkView {
  id: number;
  code: string;
  quantity: Quantity;
  kind: MarkKind;
  /** ISO dates, both included */
  first: string;
  last: string;
  reason: string;
  by: string;
  /** ISO instant */
  createdAt: string;
}
