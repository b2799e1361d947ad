import { type Certainty, chanceAmong, MOST_STEEPEST, USUAL_STEEPEST } from './certainty-types.ts';
import type { Ranking, RankingRow } from './ranking-types.ts';

/** How sure a row is, beside the span of its place. */
export interface Sureness {
  /** trend that the record would have shown in four cases of five, % of the mean per decade; null where there is no such */
  detectablePercent: number | null;
  /** k, and the probability of being among the k steepest declines; null for a row without a span */
  steepestK: number | null;
  amongSteepest: number | null;
}

/** A row of the ranking, with how sure it is where that has been computed. */
export type SureRow = RankingRow & Partial<Sureness>;

export interface SureRanking extends Ranking {
  rows: SureRow[];
}

/** Lays over a ranking how sure its places are.
 *  @param k  "among the k steepest declines"; with k at or past the last place every station is
 *  @throws RangeError when k is not a whole number from 1 to MOST_STEEPEST */
export function withCertainty(ranking: Ranking, certainty: Certainty, k = USUAL_STEEPEST): SureRanking {
  if (!(Number.isInteger(k) && k >= 1 && k <= MOST_STEEPEST)) {
    throw new RangeError(`withCertainty: k must be a whole number from 1 to ${MOST_STEEPEST}, got ${k}`);
  }
  const { spans, detectable } = certainty;
  const spanOf = new Map(spans.map((span) => [span.code, span]));
  const detectableAt = new Map(detectable.map((trend) => [trend.code, trend]));
  const rows = ranking.rows.map((row): SureRow => {
    const span = row.rank === null ? undefined : spanOf.get(row.code);
    return {
      ...row,
      rankLow: span?.rankLow ?? null,
      rankHigh: span?.rankHigh ?? null,
      detectablePercent: detectableAt.get(row.code)?.percentPerDecade ?? null,
      steepestK: span ? k : null,
      amongSteepest: span ? chanceAmong(certainty, span, k) : null,
    };
  });
  return { ...ranking, rows };
}
