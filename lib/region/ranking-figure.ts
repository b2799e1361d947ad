import type { Basis } from '../basis.ts';
import { INDEX_FACTS, isOfMinus, perArea } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';

/** The figure that a row is ranked by, smallest first, so turned that less is drier; null when it has none.
 *  - `percent-per-decade`: % of the mean per decade; days per decade for dates and for zero-flow days, whose percentages
 *    say nothing.
 *  - `specific-change`: L/s/km² per decade of flows, mm per decade of deficits; the index's own unit per decade where
 *    an area has no part in it.
 *  - `kendall-tau`: tau-b, which already is that of what was tested. */
export function rankingFigure(
  row: Pick<RankingRow, 'trendOf' | 'percentPerDecade' | 'tau' | 'valueSlope' | 'areaKm2'>,
  rankBy: Basis['rankBy'],
): number | null {
  const { trendOf, percentPerDecade, tau, valueSlope, areaKm2 } = row;
  if (trendOf === null || trendOf === 'zero-days') return null;
  if (rankBy === 'kendall-tau') return tau;
  const index = trendOf === 'minima' ? 'minimum' : trendOf;
  const relative = INDEX_FACTS[index].hasPercent ? percentPerDecade : valueSlope;
  const figure = rankBy === 'percent-per-decade' ? relative : perArea(valueSlope, index, areaKm2);
  return figure !== null && isOfMinus(trendOf) ? 0 - figure : figure;
}
