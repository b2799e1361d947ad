/** How sure the order of a ranking is, and what a record could have shown. Both come from simulation, seeded from the
 *  data and the basis, so that the same input gives the same figures. */

/** The `amongSteepest` of a station reaches this far. */
export const MOST_STEEPEST = 50;

/** "Among the k steepest", when nobody names k. */
export const USUAL_STEEPEST = 5;

/** How sure one ranked station's place is. */
export interface RankSpan {
  code: string;
  /** ends of the 90 % interval of the place, 1 = steepest decline */
  rankLow: number;
  rankHigh: number;
  /** entry k − 1: share of replicates in which the station is among the k steepest declines, k up to MOST_STEEPEST or
   *  the number of ranked stations */
  amongSteepest: number[];
}

/** The trend that a station's record would have shown in four cases of five. */
export interface DetectableTrend {
  code: string;
  /** either way, per decade in the unit of what is tested: m³/s for minima, days under Drying */
  perDecade: number | null;
  /** the same in percent of the mean; null where there is no mean above 0 */
  percentPerDecade: number | null;
}

export interface Certainty {
  replicates: number;
  /** false: the trends differ by no more than chance, and every span is 1 to the number of ranked stations */
  toldApart: boolean;
  /** standard deviation of the true ranking figures among stations, as estimated (τ); in the figure's unit */
  trueSpread: number;
  /** of ranked stations, in ranking order */
  spans: RankSpan[];
  /** of ranked and drying stations, at the basis's alpha for the one station by itself */
  detectable: DetectableTrend[];
}

/** Probability of a station to be among the k steepest declines; with k at or past the last place every station is. */
export function chanceAmong(
  { spans }: Pick<Certainty, 'spans'>,
  { amongSteepest }: RankSpan,
  k: number,
): number | null {
  return k >= spans.length ? 1 : (amongSteepest[k - 1] ?? null);
}
