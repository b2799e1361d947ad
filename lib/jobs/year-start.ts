import { type Basis, BasisError, type BasisKey, seasonProblem } from '../basis.ts';
import { resolveYearStart } from '../region/year-start.ts';
import { cached } from './cached.ts';
import { runTask } from './pool.ts';
import { checkAsRead } from './region-inputs.ts';
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
  const key = resultKey('regimes', { values: basis, keys: KEYS }, recorded, 'none');
  const chunks = await cached('regimes', key, () =>
    Promise.all(
      chunksOf(recorded).map(async (chunk) => {
        const stationIds = chunk.map(({ facts }) => facts.id);
        const { ratios, hashes } = await runTask('regimes', { stationIds, exclude: basis.exclude });
        checkAsRead(chunk, hashes);
        return ratios;
      }),
    ),
  );
  return chunks.flatMap((ratios) =>
    Array.from({ length: ratios.length / MONTHS }, (_, i) => ratios.subarray(i * MONTHS, (i + 1) * MONTHS)),
  );
}
