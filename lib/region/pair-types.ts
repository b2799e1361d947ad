import type { StationFacts } from './ranking-types.ts';

/** A station against reference stations, so that weather is taken out. */

/** What a comparison names of a station. */
export type NamedSite = Pick<StationFacts, 'code' | 'name'>;

/** One low-flow year that the station and all references have. */
export interface PairYear {
  year: number;
  /** the station's annual figure, in the unit of the index */
  station: number;
  /** mean over the references of their figures, each over its own mean of the common years: 1 is ordinary */
  reference: number;
  /** the station's figure over its own mean, over the reference; NaN where the reference is not above 0 */
  ratio: number;
  /** sums of both, each over its own mean, from the first common year on: the double-mass curve */
  stationSum: number;
  referenceSum: number;
}

/** Trend of one series of yearly figures by itself, under the basis's test and serial correction. Null where there is no
 *  answer. */
export interface PairTrend {
  /** with its 95 % interval, in the unit of the series */
  slopePerDecade: number | null;
  low: number | null;
  high: number | null;
  /** level of the slope line at calendar year 0 */
  intercept: number | null;
  /** of the series' mean, or of the minima's mean for residuals; null where that is not above 0 */
  percentPerDecade: number | null;
  percentLow: number | null;
  percentHigh: number | null;
  z: number | null;
  /** of this one test: nothing is adjusted, for the comparison was chosen beforehand */
  p: number | null;
  tau: number | null;
  r1: number | null;
  serialFactor: number;
}

export interface PairComparison {
  station: NamedSite;
  references: NamedSite[];
  years: PairYear[];
  /** trend of the station by itself over the common years, of the reference, and of the ratio */
  stationTrend: PairTrend | null;
  referenceTrend: PairTrend | null;
  ratioTrend: PairTrend | null;
  /** the trend of the ratio that these years would have shown in four cases of five, % per decade either way; given where
   *  none was found */
  detectable: number | null;
  /** Spearman's, of station and reference over the common years */
  correlation: number | null;
  /** in plain words with figures; the problem where there is one */
  sentence: string;
  /** what a reader must know before using the figures */
  warnings: string[];
  /** why there is no comparison, and what would do */
  problem: string | null;
}

/** One usable year with its minimum and the weather before it. */
export interface WeatherYear {
  year: number;
  /** m³/s */
  minimum: number;
  /** mm in the days that end with the date of the minimum */
  weather: number;
  /** the LOWESS curve at that weather, and what the minimum lies above it, m³/s */
  fitted: number;
  residual: number;
}

/** Trend of the minima given antecedent weather: of the residuals of a LOWESS curve (Helsel et al. 2020, chapter 12). */
export interface WeatherTrend {
  station: NamedSite;
  quantity: WeatherQuantity;
  /** where the weather was measured */
  from: NamedSite;
  /** days up to and with the date of the minimum that were summed */
  antecedentDays: number;
  years: WeatherYear[];
  /** of the minima as they are, of what the weather leaves of them, and of the weather itself, over the same years */
  plain: PairTrend | null;
  adjusted: PairTrend | null;
  weather: PairTrend | null;
  /** the trend given the weather that these years would have shown in four cases of five; as in PairComparison */
  detectable: number | null;
  /** Spearman's, of minima and weather */
  correlation: number | null;
  /** the same for other numbers of days, over the years that have each: a choice by it knows nothing of any trend */
  choices: { antecedentDays: number; correlation: number | null }[];
  sentence: string;
  warnings: string[];
  problem: string | null;
}

export const WEATHER_QUANTITIES = ['rainfall', 'potential-evaporation'] as const;
export type WeatherQuantity = (typeof WEATHER_QUANTITIES)[number];

/** A natural station that may serve as reference. */
export interface ReferenceCandidate extends NamedSite {
  /** great-circle distance; null when the place of either is not known */
  km: number | null;
  /** usable years that both have */
  commonYears: number;
  /** Spearman's over those years; null where one of the two does not vary */
  correlation: number | null;
}
