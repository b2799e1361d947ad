import { type Basis, DEFAULT_BASIS, parseBasis, type ResolvedBasis } from '../../../lib/basis.ts';
import { firstDayOfLowFlowYear } from '../../../lib/calendar/low-flow-year.ts';
import type { AnnualMinima } from '../../../lib/lowflow/annual-minima-types.ts';
import type { RankingRow, StationFacts, StationMinima } from '../../../lib/region/ranking-types.ts';

/** Invented minima for tests. Every year's low comes 180 days after a May start unless said. */
export const YEAR_START = 5;
const MID_YEAR = 180;

export interface MinimaSpec {
  first: number;
  /** one value a year from `first`; NaN makes the year unusable */
  values: number[];
  /** days of zero flow each year; 0 by default */
  zeroDays?: number[];
  /** days after the start of the low-flow year; 180 by default */
  dayOfYear?: number[];
}

export function annualMinima({ first, values, zeroDays, dayOfYear }: MinimaSpec): AnnualMinima {
  const years = Int32Array.from(values, (_, i) => first + i);
  const usable = Uint8Array.from(values, (value) => (Number.isNaN(value) ? 0 : 1));
  return {
    years,
    usable,
    missingDays: new Int32Array(values.length),
    minimum: Float64Array.from(values),
    day: Int32Array.from(years, (year, i) => firstDayOfLowFlowYear(year, YEAR_START) + (dayOfYear?.[i] ?? MID_YEAR)),
    reason: values.map((value) => (Number.isNaN(value) ? 'invented gap' : '')),
    flaggedDays: new Int32Array(values.length),
    zeroDays: Float64Array.from(values, (_, i) => zeroDays?.[i] ?? 0),
    meanFlow: new Float64Array(values.length).fill(1),
  };
}

export function facts(code: string, rest: Partial<StationFacts> = {}): StationFacts {
  return {
    id: 1,
    code,
    name: `Invented ${code}`,
    river: 'Invented Water',
    latitude: 50,
    longitude: 10,
    areaKm2: 100,
    influence: 'natural',
    ...rest,
  };
}

export function station(code: string, spec: MinimaSpec, rest: Partial<StationFacts> = {}): StationMinima {
  return { station: facts(code, rest), minima: annualMinima(spec) };
}

/** `n` usable years of one value each. */
export const constant = (n: number, value = 1): number[] => new Array<number>(n).fill(value);

export const basisOf = (keys: Partial<Basis> = {}): Basis => parseBasis(keys, DEFAULT_BASIS);

export function resolvedBasis(keys: Partial<ResolvedBasis> = {}): ResolvedBasis {
  return {
    ...DEFAULT_BASIS,
    period: [1981, 2020],
    yearStart: YEAR_START,
    asked: { period: 'common', yearStart: 'auto' },
    ...keys,
  };
}

/** A ranked row with figures of its own, for what only reads rows. */
export function rankedRow(keys: Partial<RankingRow> = {}): RankingRow {
  return {
    ...facts('A'),
    rank: 1,
    rankLow: null,
    rankHigh: null,
    yearsUsed: 38,
    firstYear: 1985,
    lastYear: 2024,
    meanMinimum: 2,
    meanMinimumSpecific: 20,
    slopePerDecade: -0.124,
    slopeLow: -0.182,
    slopeHigh: -0.056,
    percentPerDecade: -6.2,
    specificPerDecade: -1.24,
    tau: -0.4,
    z: -3.2,
    p: 0.0014,
    pAdjusted: 0.003,
    trend: 'falling',
    trendOf: 'minima',
    zeroFlowYears: 0,
    zeroDaysPerDecade: null,
    zeroDaysLow: null,
    zeroDaysHigh: null,
    unrankedReason: null,
    drying: false,
    note: '',
    r1: 0.1,
    serialFactor: 1.2,
    intercept: 30,
    years: [1985, 2024],
    minima: [2.1, 1.9],
    index: 'minimum',
    values: [2.1, 1.9],
    meanValue: 2,
    valueSlope: -0.124,
    valueSlopeLow: -0.182,
    valueSlopeHigh: -0.056,
    steadiness: null,
    ...keys,
  };
}
