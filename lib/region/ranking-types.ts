import type { AnnualIndexName, ResolvedBasis } from '../basis.ts';
import type { AnnualMinima } from '../lowflow/annual-minima-types.ts';

export const INFLUENCES = [
  'natural',
  'regulated',
  'abstracted',
  'augmented',
  'spring-fed',
  'urban',
  'unknown',
] as const;
export type Influence = (typeof INFLUENCES)[number];

/** The facts of a station that analyses and files carry. */
export interface StationFacts {
  id: number;
  code: string;
  name: string;
  river: string;
  latitude: number | null;
  longitude: number | null;
  areaKm2: number | null;
  influence: Influence;
  /** how the record comes from others, in words; absent where it was measured */
  derivedFrom?: string;
}

/** One station's input to the ranking. */
export interface StationMinima {
  station: StationFacts;
  minima: AnnualMinima;
  /** one a year of the minima: the basis's index, where the minima do not bring it along; NaN where a year has none */
  figures?: Float64Array;
}

export type Trend = 'falling' | 'rising' | 'none';

/** One station's place and figures. Numbers that do not exist are null. The CSV contract prints these. */
export interface RankingRow extends StationFacts {
  rank: number | null;
  rankLow: number | null;
  rankHigh: number | null;
  yearsUsed: number;
  firstYear: number | null;
  lastYear: number | null;
  /** m³/s */
  meanMinimum: number | null;
  /** L/s/km² */
  meanMinimumSpecific: number | null;
  /** m³/s per decade, with its 95 % interval; null where what is compared is no flow */
  slopePerDecade: number | null;
  slopeLow: number | null;
  slopeHigh: number | null;
  /** of the mean value, with the slope's sign; null where that mean is not above 0, for zero-flow days and for dates */
  percentPerDecade: number | null;
  /** L/s/km² per decade; null where what is compared is no flow */
  specificPerDecade: number | null;
  tau: number | null;
  z: number | null;
  p: number | null;
  pAdjusted: number | null;
  trend: Trend | null;
  /** what z, p, tau and trend speak of: of minus the days, or volumes, for zero days and deficits */
  trendOf: 'minima' | 'zero-days' | Exclude<AnnualIndexName, 'minimum'> | null;
  /** usable years with an n-day minimum of 0 */
  zeroFlowYears: number;
  /** for stations under Drying: days per decade, with its 95 % interval */
  zeroDaysPerDecade: number | null;
  zeroDaysLow: number | null;
  zeroDaysHigh: number | null;
  /** in words and figures; null when ranked */
  unrankedReason: string | null;
  /** true when the station is unranked because it stands in the Drying list */
  drying: boolean;
  note: string;
  /** lag-1 correlation and variance factor that the test used */
  r1: number | null;
  serialFactor: number | null;
  /** level of the slope line at t = 0 (calendar year 0), median of x − b·t; in the unit of the values */
  intercept: number | null;
  /** the usable years and their minima in m³/s: what the trend rests on */
  years: number[];
  minima: number[];
  /** what `values` are: the basis's index, or zero-flow days under Drying */
  index: AnnualIndexName;
  /** the annual figures that were tested and ranked: the minima, or those of the basis's other index, or under Drying
   *  the zero-flow days; one a year of `years`, with mean and slope per decade (95 % interval) in their own unit and
   *  sign */
  values: number[];
  meanValue: number | null;
  valueSlope: number | null;
  valueSlopeLow: number | null;
  valueSlopeHigh: number | null;
  /** share of the windows of at least 15 usable years whose sign is that of the whole period; null without either */
  steadiness: number | null;
}

/** The whole ranking of a region under one basis: ranked rows first, then drying, then the other unranked ones. */
export interface Ranking {
  basis: ResolvedBasis;
  rows: RankingRow[];
  counts: { stations: number; ranked: number; drying: number; unranked: number; falling: number; rising: number };
  /** things a reader must know: periods that differ, no common period, … */
  warnings: string[];
}
