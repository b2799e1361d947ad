import type { ResolvedBasis } from '../basis.ts';
import type { RankingRow, StationFacts, StationMinima, Trend } from '../region/ranking-types.ts';

export const CURVE_KINDS = ['period', 'median-annual'] as const;
export type CurveKind = (typeof CURVE_KINDS)[number];

/** One station's duration curve, normalised as the basis says. */
export interface StationCurveRow {
  station: StationFacts;
  /** flows at `RegionCurves.exceedances`, in `RegionCurves.unit`; NaN outside the record's plotting positions */
  flows: Float64Array;
  /** days of usable years that the curve rests on, and those years */
  days: number;
  years: number;
  /** m³/s, over those days */
  mean: number;
  median: number;
}

/** The curves of a region under one basis. */
export interface RegionCurves {
  basis: ResolvedBasis;
  kind: CurveKind;
  unit: 'L/s/km²' | '1' | 'm³/s';
  exceedances: Float64Array;
  curves: StationCurveRow[];
  /** stations without a curve on this basis, and why; none is missing from both lists */
  leftOut: { station: StationFacts; reason: string }[];
  /** 10th, 50th and 90th percentile over the stations at each exceedance; NaN where too few have a value */
  band: { p10: Float64Array; p50: Float64Array; p90: Float64Array };
}

/** One low-flow year of a record: how many days it has, and of what kind. */
export interface YearCoverage {
  /** calendar year in which the low-flow year begins */
  year: number;
  /** usable: the year counts; partial: it has values but does not count; missing: it has none */
  state: 'usable' | 'partial' | 'missing';
  days: number;
  missingDays: number;
  /** days that carry each flag; a day may carry several */
  flagged: {
    estimated: number;
    provisional: number;
    ice: number;
    belowDetection: number;
    suspect: number;
    rejected: number;
  };
  reason: string;
}

/** A station near this one, with its place in the ranking. */
export interface Neighbour {
  station: StationFacts;
  distanceKm: number;
  rank: number | null;
  percentPerDecade: number | null;
  trend: Trend | null;
}

/** All that a station's page shows. */
export interface StationDetail {
  station: StationFacts;
  basis: ResolvedBasis;
  /** the station's row of the region's ranking, and how many stations are ranked beside it */
  row: RankingRow;
  ranked: number;
  /** one sentence with figures and their uncertainty */
  verdict: string;
  minima: StationMinima['minima'];
  /** the slope line at the first and last usable year, in the unit of what is compared, with the lines of the 95 % interval; null when unranked */
  line: SlopeLine | null;
  curve: StationCurveRow | null;
  /** why there is no curve; null when there is one */
  noCurveReason: string | null;
  region: Pick<RegionCurves, 'unit' | 'exceedances' | 'band'>;
  coverage: YearCoverage[];
  /** nearest first, at most six */
  neighbours: Neighbour[];
}

export interface SlopeLine {
  firstYear: number;
  lastYear: number;
  /** at the first and last year, in the unit of what is compared */
  fitted: [number, number];
  /** the same for the ends of the slope's interval, turning about the middle of the line; null without an interval */
  low: [number, number] | null;
  high: [number, number] | null;
}
