/** Before and after: levels between breaks that were known or chosen beforehand. */

/** A break is named by the first low-flow year after it. */
export interface Break {
  /** first low-flow year of the later part */
  year: number;
  /** where it comes from: a dated change of the station, or a person's choice */
  from: 'change' | 'chosen';
  /** Example: "dam, 1968-05-01: Upper Weir dam" */
  words: string;
  /** what it is summed up under: the kind of change, or the year. Examples: "dam", "from 1975/76 on" */
  label: string;
}

/** The years between two breaks. */
export interface Segment {
  first: number;
  last: number;
  /** usable years */
  years: number;
  median: number | null;
  mean: number | null;
}

/** One part against the one before it. */
export interface StepTest {
  break: Break;
  before: Segment;
  after: Segment;
  /** Hodges–Lehmann difference after − before, with its 95 % interval, unit of what is tested */
  difference: number | null;
  low: number | null;
  high: number | null;
  /** the same in percent of the median before; null where that is not above 0 */
  percent: number | null;
  percentLow: number | null;
  percentHigh: number | null;
  /** rank-sum test with Var × serialFactor, two-sided */
  z: number | null;
  p: number | null;
  /** Benjamini–Hochberg over all steps of the table */
  pAdjusted: number | null;
  serialFactor: number;
  /** under 10 years a side, and the like; empty when there is nothing to say */
  warning: string;
}

/** A break that the data suggest: shown, never tested. */
export interface SuggestedBreak {
  /** last year of the first part */
  lastBefore: number;
  k: number;
  /** by the sieve where r1 > 0, else the approximation */
  p: number;
  pBySieve: boolean;
  /** true beside a significant trend: step or trend cannot be told apart */
  besideTrend: boolean;
  words: string;
}

export interface StationBreaks {
  code: string;
  name: string;
  /** what is compared, and its unit; empty for a number without unit. Examples: "7-day minima", "m³/s" */
  tested: string;
  unit: string;
  /** one more than there are steps */
  segments: Segment[];
  steps: StepTest[];
  /** breaks without usable years on both sides */
  leftOut: { break: Break; reason: string }[];
  suggested: SuggestedBreak | null;
  /** why there is no answer; null when there is one */
  problem: string | null;
}

/** One chosen break (or each station's own changes) over all ranked stations. */
export interface RegionBreaks {
  stations: StationBreaks[];
  /** by label of the breaks: steps tested, lower and higher after with adjusted p < alpha (family: all steps of the table),
   *  median of the steps in percent */
  summary: { label: string; tested: number; lower: number; higher: number; medianPercent: number | null }[];
}
