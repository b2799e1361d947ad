/** How an answer depends on the years chosen and on the other terms. */

/** Fewest usable years of a window. */
export const FEWEST_WINDOW_YEARS = 15;

/** Start–end chart of one station: cell (i, j) is the window from starts[i] to ends[j], at i·ends.length + j. */
export interface StartEnd {
  /** low-flow years, rising */
  starts: number[];
  ends: number[];
  /** NaN where the window has fewer than 15 usable years */
  z: Float32Array;
  /** in percent of the window's mean, with the sign of the slope; NaN where the mean is not above 0, or where a percentage
   *  means nothing */
  percentPerDecade: Float32Array;
  /** unit and sign of the index itself: m³/s for minima, days under Drying. Z is below 0 where it gets drier */
  slopePerDecade: Float32Array;
  /** unadjusted */
  p: Float32Array;
  /** share of the windows with the sign of the whole period; null without a sign or windows */
  steadiness: number | null;
  /** pairs of a start and an end year with at least 15 usable years between */
  windows: number;
}

/** A chart as it goes over HTTP: lists of numbers with 4 significant digits, null where there is none. */
export type OnTheWire<Chart> = {
  [Key in keyof Chart]: Chart[Key] extends ArrayBufferView ? (number | null)[] : Chart[Key];
};

/** Start–end chart of a region: over the ranked stations that have the window. Serial correction as in the stations'
 *  own charts. */
export interface RegionStartEnd {
  starts: number[];
  ends: number[];
  /** ranked stations with at least 15 usable years in the window; cells as above */
  stations: Uint16Array;
  /** of these, how many have a negative sign of S, and how many fall and rise with unadjusted p < alpha */
  negative: Uint16Array;
  falling: Uint16Array;
  rising: Uint16Array;
}

/** A station in two rankings. Null: not ranked there. */
export interface Movement {
  code: string;
  name: string;
  /** its place in each ranking */
  before: number | null;
  after: number | null;
  /** places moved up (steeper decline) in `after`, among the stations ranked in both, so that nobody moves for others that
   *  come or go: where the same stations are ranked, before − after. Null where it is ranked in only one */
  moved: number | null;
  trendBefore: string | null;
  trendAfter: string | null;
}

/** Two rankings compared. `before` is on the other terms, `after` on those at hand. */
export interface RankingMovement {
  rankedBefore: number;
  rankedAfter: number;
  rankedBoth: number;
  /** Kendall's tau-b between the places of stations ranked in both; null below 2 */
  tau: number | null;
  /** stations ranked in both whose place differs by more than a tenth of them */
  movedFar: number;
  /** median of |places moved| */
  medianMove: number | null;
  fallingBefore: number;
  fallingAfter: number;
  risingBefore: number;
  risingAfter: number;
  /** furthest first; then those ranked in one only */
  movements: Movement[];
}

/** The ranking under one other choice of one term. */
export interface Alternative {
  term: 'days' | 'yearStart' | 'season' | 'period' | 'serialCorrection';
  /** Example: "30-day minima" */
  label: string;
  /** basis keys that differ, as URL text: {"days": "30"} */
  change: Record<string, string>;
  /** true: this is what the basis says */
  current: boolean;
  ranked: number;
  falling: number;
  rising: number;
  /** against the basis at hand */
  tau: number | null;
  movedFar: number;
  /** `before` is its place under the basis at hand, `after` the one under this choice */
  furthest: Movement | null;
  /** why it cannot be computed; null when it can */
  problem: string | null;
}
