import type { Basis } from '../basis.ts';
import { INDEX_FACTS, isOfMinus } from './index-facts.ts';
import type { RankingRow } from './ranking-types.ts';

/** m³ over km² are a thousandth of a millimetre each. */
const MM_PER_M3_KM2 = 1e-3;

type FigureRow = Pick<
  RankingRow,
  'trendOf' | 'percentPerDecade' | 'specificPerDecade' | 'tau' | 'valueSlope' | 'areaKm2'
>;

/** The figure that a row is ranked by, smallest first, so turned that less is drier; null when it has none.
 *  - `percent-per-decade`: % of the mean per decade; days per decade for dates and for zero-flow days, whose percentages
 *    say nothing.
 *  - `specific-change`: L/s/km² per decade of flows, mm per decade of deficits; the index's own unit per decade where
 *    an area has no part in it.
 *  - `kendall-tau`: tau-b, which already is that of what was tested. */
export function rankingFigure(row: FigureRow, rankBy: Basis['rankBy']): number | null {
  if (rankBy === 'kendall-tau') return row.tau;
  const figure = rankBy === 'percent-per-decade' ? relativeChange(row) : changePerArea(row);
  if (figure === null) return null;
  return isOfMinus(row.trendOf) ? 0 - figure : figure;
}

function relativeChange({ trendOf, percentPerDecade, valueSlope }: FigureRow): number | null {
  if (trendOf === null || trendOf === 'minima' || trendOf === 'zero-days') return percentPerDecade;
  return INDEX_FACTS[trendOf].hasPercent ? percentPerDecade : valueSlope;
}

function changePerArea({ trendOf, specificPerDecade, valueSlope, areaKm2 }: FigureRow): number | null {
  if (trendOf === 'deficit') {
    return valueSlope === null || areaKm2 === null || !(areaKm2 > 0) ? null : (valueSlope / areaKm2) * MM_PER_M3_KM2;
  }
  if (trendOf === null || trendOf === 'minima' || trendOf === 'zero-days') return specificPerDecade;
  return INDEX_FACTS[trendOf].isFlow ? specificPerDecade : valueSlope;
}
