import { type Certainty, chanceAmong, type DetectableTrend, type RankSpan } from '@/lib/region/certainty-types';
import type { Fill } from '../map-state.ts';

/** How sure the places of a ranking are, ready to be looked up by station. */
export interface CertaintyView {
  certainty: Certainty;
  /** ranked stations: the last place there is */
  places: number;
  replicates: number;
  toldApart: boolean;
  spans: ReadonlyMap<string, RankSpan>;
  detectable: ReadonlyMap<string, DetectableTrend>;
}

/** The answer as screens look things up in it. */
export function certaintyView(certainty: Certainty): CertaintyView {
  const { replicates, toldApart, spans, detectable } = certainty;
  return {
    certainty,
    places: spans.length,
    replicates,
    toldApart,
    spans: new Map(spans.map((span) => [span.code, span])),
    detectable: new Map(detectable.map((trend) => [trend.code, trend])),
  };
}

/** Probability of being among the k steepest declines; with k at or past the last place every station is.
 *  @returns null for a station that is not ranked, or where it was not computed that far */
export function amongSteepest(view: CertaintyView, code: string, k: number): number | null {
  const span = view.spans.get(code);
  return span ? chanceAmong(view.certainty, span, k) : null;
}

/** How narrow a station's span is: 1 where its place is certain, 0 where it may have any; null for one without a span. */
export function placeSureness({ places, spans }: CertaintyView, code: string): number | null {
  const span = spans.get(code);
  if (!span) return null;
  return places < 2 ? 1 : 1 - (span.rankHigh - span.rankLow) / (places - 1);
}

/** What part of a station's disc is filled; null where the filling says nothing of it. */
export function filledShare(view: CertaintyView, code: string, fill: Fill, k: number): number | null {
  return fill === 'steepest' ? amongSteepest(view, code, k) : placeSureness(view, code);
}
