/** A station against reference stations, so that weather is taken out. */

export interface PairYear {
  year: number;
  /** of the station and of the reference (mean of the references' values, each over its own mean), unit as the index */
  station: number;
  reference: number;
  /** NaN where the reference is not above 0 */
  ratio: number;
  /** sums from the first common year on: the double-mass curve */
  stationSum: number;
  referenceSum: number;
}

export interface PairTrend {
  slopePerDecade: number | null;
  low: number | null;
  high: number | null;
  percentPerDecade: number | null;
  z: number | null;
  p: number | null;
  tau: number | null;
  r1: number | null;
  serialFactor: number;
}

export interface PairComparison {
  station: string;
  references: string[];
  years: PairYear[];
  /** trend of the station by itself over the common years, of the reference, and of the ratio */
  stationTrend: PairTrend | null;
  referenceTrend: PairTrend | null;
  ratioTrend: PairTrend | null;
  /** in plain words with figures */
  sentence: string;
  /** correlation of the two, Spearman */
  correlation: number | null;
  problem: string | null;
}

/** Trend of the minima given antecedent weather: of the residuals of a LOWESS curve (Helsel et al. 2020, chapter 12). */
export interface WeatherTrend {
  station: string;
  quantity: string;
  /** where the weather was measured: a station's code */
  from: string;
  /** days before the minimum that were summed */
  antecedentDays: number;
  years: { year: number; minimum: number; weather: number; fitted: number; residual: number }[];
  plain: PairTrend | null;
  adjusted: PairTrend | null;
  sentence: string;
  problem: string | null;
}
