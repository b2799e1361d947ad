import { encodeRatios } from '@/app/components/spark-code';
import type { Basis } from '@/lib/basis';
import type { Ranking, RankingRow } from '@/lib/region/ranking-types';

/** What the map screen knows of a station: the ranking row without what only files need, so that 2,000 travel light. */
export interface MapRow {
  code: string;
  name: string;
  river: string;
  latitude: number | null;
  longitude: number | null;
  areaKm2: number | null;
  rank: number | null;
  drying: boolean;
  yearsUsed: number;
  zeroFlowYears: number;
  trend: RankingRow['trend'];
  percentPerDecade: number | null;
  tau: number | null;
  zeroDaysPerDecade: number | null;
  pAdjusted: number | null;
  /** what the list is ordered by, with its 95 % interval: the basis's rankBy, or days a decade under Drying */
  figure: { value: number | null; low: number | null; high: number | null };
  /** the slope as % of the mean per decade with its interval, and the line's height at mid-record as a ratio to the mean */
  line: { percent: number; low: number | null; high: number | null; middle: number } | null;
  /** first year of `spark`, and the minima as ratios to their mean, encoded one a year */
  sparkFirst: number;
  spark: string;
  unrankedReason: string | null;
  note: string;
  /** share of the windows of years that agree with the sign, 0 to 1 */
  steadiness: number | null;
}

const round = (value: number | null, figures = 4): number | null =>
  value === null || !Number.isFinite(value) ? null : Number(value.toPrecision(figures));

/** A ranking as the screen wants it, in the ranking's own order. */
export function mapRows(ranking: Ranking): MapRow[] {
  return ranking.rows.map((row) => mapRow(row, ranking.basis.rankBy));
}

function mapRow(row: RankingRow, rankBy: Basis['rankBy']): MapRow {
  return {
    code: row.code,
    name: row.name,
    river: row.river,
    latitude: round(row.latitude, 7),
    longitude: round(row.longitude, 7),
    areaKm2: row.areaKm2,
    rank: row.rank,
    drying: row.drying,
    yearsUsed: row.yearsUsed,
    zeroFlowYears: row.zeroFlowYears,
    trend: row.trend,
    percentPerDecade: round(row.percentPerDecade),
    tau: round(row.tau),
    zeroDaysPerDecade: round(row.zeroDaysPerDecade),
    pAdjusted: round(row.pAdjusted),
    figure: figureOf(row, rankBy),
    line: lineOf(row),
    sparkFirst: row.years[0] ?? 0,
    spark: encodeRatios(row.years, row.minima, row.meanMinimum ?? Number.NaN),
    unrankedReason: row.unrankedReason,
    note: row.note,
    steadiness: round(row.steadiness, 3),
  };
}

const percentOf = (slope: number | null, mean: number | null): number | null =>
  slope === null || mean === null || mean === 0 ? null : round((slope / mean) * 100);

function figureOf(row: RankingRow, rankBy: Basis['rankBy']): MapRow['figure'] {
  if (row.drying) {
    return { value: round(row.zeroDaysPerDecade), low: round(row.zeroDaysLow), high: round(row.zeroDaysHigh) };
  }
  if (rankBy === 'kendall-tau') return { value: round(row.tau), low: null, high: null };
  if (rankBy === 'specific-change') {
    // m³/s over km² is 1,000 L/s over km²
    const specific = (slope: number | null) =>
      slope === null || row.areaKm2 === null ? null : round((slope * 1000) / row.areaKm2);
    return { value: round(row.specificPerDecade), low: specific(row.slopeLow), high: specific(row.slopeHigh) };
  }
  return {
    value: round(row.percentPerDecade),
    low: percentOf(row.slopeLow, row.meanMinimum),
    high: percentOf(row.slopeHigh, row.meanMinimum),
  };
}

function lineOf(row: RankingRow): MapRow['line'] {
  const { percentPerDecade, slopePerDecade, intercept, meanMinimum, years } = row;
  if (percentPerDecade === null || slopePerDecade === null || intercept === null || !meanMinimum) return null;
  const middleYear = (years[0] + years[years.length - 1]) / 2;
  return {
    percent: round(percentPerDecade) ?? 0,
    low: percentOf(row.slopeLow, meanMinimum),
    high: percentOf(row.slopeHigh, meanMinimum),
    middle: round((intercept + (slopePerDecade / 10) * middleYear) / meanMinimum) ?? 1,
  };
}
