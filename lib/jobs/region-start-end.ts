import type { Ranking } from '../region/ranking-types.ts';
import { addCharts, regionSpan } from '../region/region-start-end.ts';
import type { StartEndRow } from '../region/start-end.ts';
import type { RegionStartEnd } from '../region/window-types.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { derivedKey } from './result-key.ts';
import { chunksOf } from './share-out.ts';

/** Kind under which the result is kept. */
export const WINDOWS = 'windows';

/** Key of the start–end chart of a region. */
export const regionStartEndKey = (rankingKey: string): string => derivedKey(WINDOWS, rankingKey);

/** Start–end chart of a region over its ranked stations.
 *  @throws an AbortError when cancelled */
export async function regionStartEndOf(
  { ranking, key }: { ranking: Ranking; key: string },
  context: WorkContext = {},
): Promise<RegionStartEnd> {
  return cached(WINDOWS, regionStartEndKey(key), async () => {
    const rows = ranking.rows.filter(({ rank }) => rank !== null).map(needed);
    const span = regionSpan(rows, ranking.basis);
    // an empty region has an empty chart
    const chunks = rows.length === 0 ? [rows] : chunksOf(rows);
    const charts = await inLanes(
      WINDOWS,
      chunks,
      (chunk) => runTask('startEndCounts', { rows: chunk, basis: ranking.basis, span }, { signal: context.signal }),
      context,
    );
    return addCharts(charts);
  });
}

/** Only what the workers read. */
function needed({ code, years, values, trendOf, r1, serialFactor }: StartEndRow): StartEndRow {
  return { code, years, values, trendOf, r1, serialFactor };
}
