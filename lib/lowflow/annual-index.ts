import { DAY_SECONDS } from '../calendar/day.ts';
import { type Season, seasonSpan } from '../calendar/season.ts';
import type { DailySeries } from '../series/daily-series.ts';
import { MEAN_DIGITS, roundSignificant } from '../series/round-significant.ts';
import { usableFlow } from '../series/usable-flow.ts';
import { quantileOfUnsorted } from '../statistics/quantile.ts';
import type { MinimaOptions } from './annual-minima.ts';
import type { AnnualMinima } from './annual-minima-types.ts';
import { smoothedMinimaBaseflow } from './baseflow.ts';

/** Annual indices that need the daily flows by themselves; the others come with the annual minima. */
export type RecordIndex = 'q95' | 'bfi' | 'deficit';

/** Shares of the time that a flow is not exceeded: of Q95, and of the Q90 below which there is a deficit. */
const BELOW_Q95 = 0.05;
const BELOW_Q90 = 0.1;
/** A year has a baseflow index when the baseflow of this share of its days is known. */
const BASEFLOW_SHARE = 0.8;

/** One figure of every year of `minima`: that of the year, or of the basis's season in it.
 *  - `q95`: the flow exceeded on 95 % of the days with a value, Weibull positions, m³/s.
 *  - `bfi`: baseflow over flow, by smoothed minima of the whole record, on the days whose baseflow is known; NaN when
 *    those are under 80 % of the year's, or their flow does not add up to more than 0.
 *  - `deficit`: volume below the record's Q90, m³: the sum over days of what they lack. The Q90 is that of all days of
 *    usable years. A missing day adds nothing, and no event is pooled or dropped, for the year is what is counted.
 *  @param minima  annual minima of the same series under the same options: they say which years are usable
 *  @returns       along `minima.years`, rounded to 10 significant digits; NaN for years that are not usable or too short
 *  Sources: duration curves as in Searcy 1959, USGS WSP 1542-A; baseflow at smoothedMinimaBaseflow; deficit by the
 *  threshold-level method of Yevjevich 1967 and Tallaksen & van Lanen 2004, Hydrological Drought, chapter 5. */
export function annualIndex(
  series: DailySeries,
  minima: AnnualMinima,
  index: RecordIndex,
  options: Pick<MinimaOptions, 'yearStart' | 'season' | 'exclude'>,
): Float64Array {
  const flow = usableFlow(series, options.exclude);
  const spans = usableSpans(series.firstDay, flow.length, minima, options);
  const figureOf = yearFigure(index, flow, spans);
  return Float64Array.from(spans, (span) =>
    span === null ? Number.NaN : roundSignificant(figureOf(span), MEAN_DIGITS),
  );
}

/** Positions of a year's days in the record, `to` exclusive, and how many days the year or season has. */
interface Span {
  from: number;
  to: number;
  days: number;
}

/** Of every year; null where it is not usable. */
function usableSpans(
  firstDay: number,
  length: number,
  minima: AnnualMinima,
  { yearStart, season }: { yearStart: number; season: Season },
): (Span | null)[] {
  return Array.from(minima.years, (year, i) => {
    if (minima.usable[i] !== 1) return null;
    const { first, last } = seasonSpan(year, yearStart, season);
    const from = Math.max(0, first - firstDay);
    return { from, to: Math.max(from, Math.min(length, last + 1 - firstDay)), days: last - first + 1 };
  });
}

function yearFigure(index: RecordIndex, flow: Float64Array, spans: readonly (Span | null)[]): (span: Span) => number {
  switch (index) {
    case 'q95':
      return ({ from, to }) => quantileOfUnsorted(flow.subarray(from, to), BELOW_Q95);
    case 'bfi': {
      const base = smoothedMinimaBaseflow(flow);
      return (span) => baseflowIndex(flow, base, span);
    }
    case 'deficit': {
      const threshold = quantileOfUnsorted(flowsIn(flow, spans), BELOW_Q90);
      return ({ from, to }) => deficitVolume(flow.subarray(from, to), threshold);
    }
  }
}

/** Baseflow over flow on the days whose baseflow is known; NaN when they are too few or hold no flow. */
function baseflowIndex(flow: Float64Array, base: Float64Array, { from, to, days }: Span): number {
  let known = 0;
  let ofBase = 0;
  let ofFlow = 0;
  for (let day = from; day < to; day += 1) {
    if (Number.isNaN(base[day])) continue;
    known += 1;
    ofBase += base[day];
    ofFlow += flow[day];
  }
  return known >= BASEFLOW_SHARE * days && ofFlow > 0 ? ofBase / ofFlow : Number.NaN;
}

/** What the flows lack to a threshold, added up, m³: Σ (threshold − flow) × 86,400 s over the days below it.
 *  @param flows      m³/s, NaN where missing
 *  @param threshold  m³/s; NaN makes the volume NaN
 *  Source: Yevjevich 1967, Colorado State University Hydrology Paper 23. */
export function deficitVolume(flows: Float64Array, threshold: number): number {
  if (Number.isNaN(threshold)) return Number.NaN;
  let lacking = 0;
  for (let day = 0; day < flows.length; day += 1) if (flows[day] < threshold) lacking += threshold - flows[day];
  return lacking * DAY_SECONDS;
}

function flowsIn(flow: Float64Array, spans: readonly (Span | null)[]): Float64Array {
  const used = spans.filter((span) => span !== null);
  const all = new Float64Array(used.reduce((days, { from, to }) => days + to - from, 0));
  let at = 0;
  for (const { from, to } of used) {
    all.set(flow.subarray(from, to), at);
    at += to - from;
  }
  return all;
}
