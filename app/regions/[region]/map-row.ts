import { encodeRatios } from '@/app/components/spark-code';
import type { Basis } from '@/lib/basis';
import { INDEX_FACTS, perArea, percentOfMean } from '@/lib/region/index-facts';
import type { Ranking, RankingRow } from '@/lib/region/ranking-types';

/** A figure with its 95 % interval. */
interface Estimate {
  value: number | null;
  low: number | null;
  high: number | null;
}

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
  trendOf: RankingRow['trendOf'];
  percentPerDecade: number | null;
  /** slope of what is compared per decade, in its own unit and sign */
  valueSlope: number | null;
  /** % of the mean per decade, or days where a percentage says nothing, with the 95 % interval; null without either */
  change: Estimate | null;
  tau: number | null;
  zeroDaysPerDecade: number | null;
  pAdjusted: number | null;
  /** what the list is ordered by, with its 95 % interval: the basis's rankBy, or days a decade under Drying */
  figure: Estimate;
  /** the slope in % of what the small figure's axis is a ratio to, with its interval, and the line's height at mid-record */
  line: { percent: number; low: number | null; high: number | null; middle: number } | null;
  /** first year of `spark`, and what is compared as ratios to its mean (dates: half a year about it), encoded one a year */
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
  return ranking.rows.map((row) => mapRow(row, ranking.basis));
}

function mapRow(row: RankingRow, basis: Terms): MapRow {
  const drawn = drawnRatios(row, basis.index);
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
    trendOf: row.trendOf,
    percentPerDecade: round(row.percentPerDecade),
    valueSlope: round(row.valueSlope),
    change: row.drying ? null : changeOf(row, basis),
    tau: round(row.tau),
    zeroDaysPerDecade: round(row.zeroDaysPerDecade),
    pAdjusted: round(row.pAdjusted),
    figure: figureOf(row, basis),
    line: lineOf(row, drawn),
    sparkFirst: row.years[0] ?? 0,
    spark: encodeRatios(row.years, drawn.values, drawn.mean),
    unrankedReason: row.unrankedReason,
    note: row.note,
    steadiness: round(row.steadiness, 3),
  };
}

type Terms = Pick<Basis, 'rankBy' | 'index'>;

/** Dates are drawn from half a year before their mean, at 0, to half a year after it, at 2. */
const HALF_YEAR = 182.5;

/** In the unit of the figure the list is ordered by. What is drier when it grows keeps its own sign here. */
function figureOf(row: RankingRow, { rankBy, index }: Terms): Estimate {
  if (row.drying) {
    return { value: round(row.zeroDaysPerDecade), low: round(row.zeroDaysLow), high: round(row.zeroDaysHigh) };
  }
  if (rankBy === 'kendall-tau') return { value: round(row.tau), low: null, high: null };
  if (rankBy === 'percent-per-decade') return changeOf(row, { index }) ?? NONE;
  return estimate(row, (slope) => perArea(slope, index, row.areaKm2));
}

const NONE: Estimate = { value: null, low: null, high: null };

function estimate(row: RankingRow, inUnit: (slope: number | null) => number | null): Estimate {
  return {
    value: round(inUnit(row.valueSlope)),
    low: round(inUnit(row.valueSlopeLow)),
    high: round(inUnit(row.valueSlopeHigh)),
  };
}

function changeOf(row: RankingRow, { index }: Pick<Basis, 'index'>): Estimate | null {
  if (!INDEX_FACTS[index].hasPercent) return row.valueSlope === null ? null : estimate(row, (slope) => slope);
  if (row.percentPerDecade === null) return null;
  return estimate(row, (slope) => percentOfMean(slope, index, row.meanValue));
}

/** What the small figure shows, its mean, and what 100 % of its axis is in the slope's unit. */
interface Drawn {
  values: readonly number[];
  mean: number;
  whole: number;
}

/** Under Drying that is the minima still; dates, which have no zero, are told from half a year before their mean. */
function drawnRatios(row: RankingRow, index: Basis['index']): Drawn {
  const mean = (row.drying ? row.meanMinimum : row.meanValue) ?? Number.NaN;
  if (row.drying) return { values: row.minima, mean, whole: mean };
  if (index !== 'minimum-date') return { values: row.values, mean, whole: mean };
  return { values: row.values.map((value) => value - mean + HALF_YEAR), mean: HALF_YEAR, whole: HALF_YEAR };
}

function lineOf(row: RankingRow, { mean, whole }: Drawn): MapRow['line'] {
  const { intercept, valueSlope, meanValue, years } = row;
  if (row.drying || valueSlope === null || intercept === null || meanValue === null || !(whole > 0)) return null;
  const middleYear = (years[0] + years[years.length - 1]) / 2;
  const { value, low, high } = estimate(row, (slope) => (slope === null ? null : (100 * slope) / whole));
  const level = intercept + (valueSlope / 10) * middleYear - meanValue + mean;
  return { percent: value ?? 0, low, high, middle: round(level / whole) ?? 1 };
}
