import { type Basis, BasisError, type BasisKey, seasonProblem } from '../basis.ts';
import { resolveYearStart } from '../region/year-start.ts';
import { cached } from './cached.ts';
import { runTask } from './pool.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';

const KEYS: readonly BasisKey[] = ['exclude'];
const MONTHS = 12;

/** First month of the low-flow year: the basis's own, or for `auto` the region's wettest month.
 *  @throws BasisError when the season does not fit into the year that `auto` came to */
export async function yearStartOf(stations: readonly StationInput[], basis: Basis): Promise<number> {
  if (basis.yearStart !== 'auto') return basis.yearStart;
  const yearStart = resolveYearStart(await regimesOf(stations, basis));
  const problem = seasonProblem(basis.season, yearStart);
  if (problem) throw new BasisError(`Basis key "season" does not fit: ${problem}.`);
  return yearStart;
}

async function regimesOf(stations: readonly StationInput[], basis: Basis): Promise<Float64Array[]> {
  const recorded = stations.filter(({ dataHash }) => dataHash !== null);
  const key = resultKey('regimes', { values: basis, keys: KEYS }, recorded, 'area');
  const ratios = await cached('regimes', key, async () => {
    const ids = recorded.map(({ facts }) => facts.id);
    const chunks = await Promise.all(
      chunksOf(ids).map((chunk) => runTask('regimes', { stationIds: Int32Array.from(chunk), exclude: basis.exclude })),
    );
    const all = new Float64Array(ids.length * MONTHS);
    let at = 0;
    for (const chunk of chunks) {
      all.set(chunk, at);
      at += chunk.length;
    }
    return all;
  });
  return recorded.map((_, i) => ratios.subarray(i * MONTHS, (i + 1) * MONTHS));
}
