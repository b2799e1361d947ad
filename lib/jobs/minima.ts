import type { Basis, BasisKey } from '../basis.ts';
import type { StationMinima } from '../region/ranking-types.ts';
import type { RegionRow } from '../store/regions.ts';
import { cached } from './cached.ts';
import { joinPacked, type PackedMinima, unpackMinima } from './pack-minima.ts';
import { runTask } from './pool.ts';
import { checkAsRead, withInputs } from './region-inputs.ts';
import { resultKey, type StationInput } from './result-key.ts';
import { chunksOf } from './share-out.ts';
import { yearStartOf } from './year-start.ts';

const KEYS: readonly BasisKey[] = ['yearStart', 'season', 'days', 'maxMissingDays', 'exclude'];

/** Annual minima of every station of a region, packed, with the first month of the low-flow year they are of. */
export interface RegionMinima {
  yearStart: number;
  key: string;
  packed: PackedMinima;
}

/** Annual minima of a region's stations under a basis, stations by code; a station without a record has no years.
 *  @returns `key`: equal exactly when all that the minima depend on is equal, good as an ETag
 *  @throws BasisError when the season does not fit into the low-flow year */
export async function minimaOf(
  region: Pick<RegionRow, 'id'>,
  basis: Basis,
): Promise<{ stations: StationMinima[]; yearStart: number; key: string }> {
  return withInputs(region.id, async (inputs) => {
    const { packed, yearStart, key } = await packedMinimaOf(inputs, basis);
    const minima = unpackMinima(packed);
    const stations = inputs.map(({ facts }) => ({ station: facts, minima: minima.get(facts.id)! }));
    return { stations, yearStart, key };
  });
}

/** The same in the form that goes to the workers. */
export async function packedMinimaOf(stations: readonly StationInput[], basis: Basis): Promise<RegionMinima> {
  const yearStart = await yearStartOf(stations, basis);
  const { season, days, maxMissingDays, exclude } = basis;
  const options = { yearStart, season, days, maxMissingDays, exclude };
  const key = resultKey('minima', { values: { ...basis, yearStart }, keys: KEYS }, stations, 'none');
  const packed = await cached('minima', key, async () => {
    const packs = chunksOf(stations).map(async (chunk) => {
      const stationIds = chunk.map(({ facts }) => facts.id);
      const read = await runTask('minima', { stationIds, options });
      checkAsRead(chunk, read.hashes);
      return read.packed;
    });
    return joinPacked(await Promise.all(packs));
  });
  return { yearStart, key, packed };
}
