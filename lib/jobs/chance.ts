import { createHash } from 'node:crypto';
import type { ChanceSeries } from '../region/chance-series.ts';
import type { Ranking } from '../region/ranking-types.ts';
import type { Chance } from '../region/regional-answers.ts';
import type { ChanceMethod } from '../region/regional-types.ts';
import { joinTrendBits } from '../statistics/trend-bits.ts';
import { cached } from './cached.ts';
import { inLanes, type WorkContext } from './lanes.ts';
import { runTask } from './pool.ts';
import { derivedKey } from './result-key.ts';
import { chunksOf } from './share-out.ts';

/** Orders of the years that are tried. */
const PERMUTATIONS = 10_000;

/** Key of what chance does to the stations of a ranking. */
export const chanceKey = (rankingKey: string, method: ChanceMethod): string => derivedKey('chance', rankingKey, method);

/** What chance does to every ranked station, replicate by replicate, so that any group of them is counted in a moment.
 *  @param key  of the ranking
 *  @throws an AbortError when cancelled */
export function chanceOf(
  { rows, basis }: Ranking,
  key: string,
  method: ChanceMethod,
  context: WorkContext = {},
): Promise<Chance> {
  return cached('chance', chanceKey(key, method), async () => {
    const { alpha, serialCorrection } = basis;
    const tested = rows.map(({ code, rank, years, values, trendOf }) => ({ code, rank, years, values, trendOf }));
    const stations = await runTask('seriesForChance', { rows: tested, basis: { alpha, serialCorrection } });
    const seed = seedOf(stations);
    const parts = await inLanes(
      'chance',
      chunksOf(stations.codes.map((_, i) => i)),
      (places) => {
        const series = places.map((i) => stations.series[i]);
        const critical = places.map((i) => stations.critical[i]);
        return runTask('permuteYears', { series, critical, replicates: PERMUTATIONS, seed }, context);
      },
      context,
    );
    return { method, bits: joinTrendBits(parts), lag1: stations.lag1 };
  });
}

/** Names the random draws by the series that they are made for: the same wherever and however often they are computed. */
function seedOf({ codes, years, series }: ChanceSeries): string {
  const hash = createHash('sha256').update(JSON.stringify([codes, Array.from(years)]));
  for (const values of series) hash.update(JSON.stringify(Array.from(values)));
  return hash.digest('hex');
}
