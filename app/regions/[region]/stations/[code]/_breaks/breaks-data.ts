import type { ResolvedBasis } from '@/lib/basis';
import type { RankingRow } from '@/lib/region/ranking-types';
import { indexScale } from '../index-scale';
import type { BreaksData } from './breaks-figure';

/** The annual figures that were tested, with how they are shown.
 *  @param span  first and last year of the page's time axis */
export function breaksData(
  { years, values, trendOf }: Pick<RankingRow, 'years' | 'values' | 'trendOf'>,
  { index, days, units }: Pick<ResolvedBasis, 'index' | 'days' | 'units'>,
  span: [number, number],
): BreaksData {
  const scale = indexScale(trendOf === 'zero-days' ? 'zero-flow-days' : index, days, units);
  return { years, values, scale, span };
}
