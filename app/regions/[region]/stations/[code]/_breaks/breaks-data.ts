import { flowIn, UNIT_WORDS } from '@/app/components/format';
import type { ResolvedBasis } from '@/lib/basis';
import { INDEX_FACTS } from '@/lib/region/index-facts';
import type { RankingRow } from '@/lib/region/ranking-types';
import type { BreaksData } from './breaks-figure';

/** The annual figures that were tested, in the units asked for.
 *  @param span  first and last year of the page's time axis */
export function breaksData(
  row: Pick<RankingRow, 'years' | 'values' | 'trendOf'>,
  { index, units }: Pick<ResolvedBasis, 'index' | 'units'>,
  span: [number, number],
): BreaksData {
  const { years, values, trendOf } = row;
  if (trendOf === 'zero-days') return { years, values, factor: 1, unit: 'days', span };
  const { isFlow, unit } = INDEX_FACTS[index];
  if (!isFlow) return { years, values, factor: 1, unit, span };
  return { years, values, factor: flowIn(1, units) ?? 1, unit: UNIT_WORDS[units].flow, span };
}
