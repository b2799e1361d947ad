import type { Basis, ResolvedBasis } from '../basis.ts';
import { INDEX_FACTS } from '../region/index-facts.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import { startEnd } from '../region/start-end.ts';
import type { StartEnd } from '../region/window-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { rankingOf } from './ranking.ts';

/** The start–end chart of one station, with the row of the ranking that it belongs to. */
export interface StationStartEnd {
  row: RankingRow;
  basis: ResolvedBasis;
  /** of the slopes, before "per decade"; empty for a number without unit */
  slopeUnit: string;
  chart: StartEnd;
  key: string;
}

/** Start–end chart of a station of a region. Made anew each time: it takes a millisecond once the ranking is there.
 *  @param code  of a station that the region has */
export async function startEndOf(region: Pick<RegionRow, 'id'>, basis: Basis, code: string): Promise<StationStartEnd> {
  const { ranking, key } = await rankingOf(region, basis);
  const row = ranking.rows.find((candidate) => candidate.code === code)!;
  const slopeUnit = row.trendOf === 'zero-days' ? 'days' : INDEX_FACTS[ranking.basis.index].slopeUnit;
  return { row, basis: ranking.basis, slopeUnit, chart: startEnd(row, ranking.basis), key };
}
