import type { Basis, ResolvedBasis } from '../basis.ts';
import type { RankingRow } from '../region/ranking-types.ts';
import { startEnd } from '../region/start-end.ts';
import type { StartEnd } from '../region/window-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { rankingOf } from './ranking.ts';

/** The start–end chart of one station, with the row of the ranking that it belongs to. */
export interface StationStartEnd {
  row: RankingRow;
  basis: ResolvedBasis;
  chart: StartEnd;
  key: string;
}

/** Start–end chart of a station of a region. Made anew each time: it takes a millisecond once the ranking is there.
 *  @param code  of a station that the region has */
export async function startEndOf(region: Pick<RegionRow, 'id'>, basis: Basis, code: string): Promise<StationStartEnd> {
  const { ranking, key } = await rankingOf(region, basis);
  const row = ranking.rows.find((candidate) => candidate.code === code)!;
  return { row, basis: ranking.basis, chart: startEnd(row, ranking.basis), key };
}
